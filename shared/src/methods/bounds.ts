import { plainNumber } from '@shared/units';
import type { Bounds } from './types';

/** Speed of light in vacuum, m/s, exact (SI definition). */
const LIGHT = 299_792_458;
/** Standard acceleration of free fall, m/s², exact (CGPM 1901). */
const STANDARD_GRAVITY = 9.80665;

/**
 * A sentence naming the bound that `si` breaks and why it holds, or null when it is kept. NaN and infinities break every
 * bound. `format` writes the bound with its unit; without it the bare SI number stands.
 */
export function checkBounds(si: number, bounds: Bounds, format: (si: number) => string = plainNumber): string | null {
  const { min, max, reason } = bounds;
  if (!Number.isFinite(si)) return `must be a finite number (${reason})`;
  if (min !== undefined && (bounds.minExclusive ? si <= min : si < min)) {
    return `must be ${bounds.minExclusive ? 'above' : 'at least'} ${format(min)} (${reason})`;
  }
  if (max !== undefined && (bounds.maxExclusive ? si >= max : si > max)) {
    return `must be ${bounds.maxExclusive ? 'below' : 'at most'} ${format(max)} (${reason})`;
  }
  return null;
}

function above(min: number, reason: string): Bounds {
  return { min, minExclusive: true, reason };
}
function atLeast(min: number, reason: string): Bounds {
  return { min, reason };
}
function share(reason: string): Bounds {
  return { min: 0, max: 1, reason };
}

export const MASS = above(0, 'no negative rest mass is known');
export const MASS_OR_NONE = atLeast(0, 'a payload or residual mass may be zero, never negative');
export const TEMPERATURE = above(0, 'third law: absolute zero is not reached');
export const SINK_TEMPERATURE = atLeast(0, 'an equivalent sink temperature of 0 K stands for empty space');
export const VEHICLE_SPEED: Bounds = {
  min: 0,
  max: LIGHT,
  maxExclusive: true,
  reason: 'special relativity: a massive body stays below the speed of light',
};
export const EXHAUST_SPEED: Bounds = {
  min: 0,
  minExclusive: true,
  max: LIGHT,
  reason: 'special relativity: exhaust reaches the speed of light only as light',
};
export const SPECIFIC_IMPULSE: Bounds = {
  min: 0,
  minExclusive: true,
  max: LIGHT / STANDARD_GRAVITY,
  reason: 'specific impulse cannot pass c/g_0, the photon limit',
};
export const DELTA_V = atLeast(0, 'a velocity budget adds magnitudes; a sum of rapidities may pass the speed of light');
export const THRUST = atLeast(0, 'thrust is a magnitude');
export const THRUST_PER_JET_POWER = atLeast(
  1 / LIGHT,
  'momentum of light: on-board jet power buys at least 1/c of thrust',
);
export const THRUST_PER_BEAM_POWER: Bounds = {
  min: 0,
  max: 2 / LIGHT,
  reason: 'momentum of light: full reflection at rest gives 2/c of thrust',
};
export const EFFICIENCY = share('energy conservation');
export const EFFICIENCY_ABOVE_ZERO: Bounds = { min: 0, minExclusive: true, max: 1, reason: 'energy conservation' };
export const HEAT_ENGINE_EFFICIENCY: Bounds = {
  min: 0,
  max: 1,
  maxExclusive: true,
  reason: 'Carnot: at most 1 − T_cold/T_hot, which is below 1',
};
export const SUNLIGHT_CONVERSION: Bounds = { min: 0, max: 0.933, reason: 'Landsberg limit at full concentration' };
export const PERFORMANCE_COEFFICIENT = atLeast(0, 'a ratio of powers; it is not an efficiency and may exceed 1');
export const WASTE_HEAT = atLeast(0, 'energy conservation');
export const EMISSIVITY: Bounds = {
  min: 0,
  minExclusive: true,
  max: 1,
  reason: 'no surface emits more than a black body',
};
export const SURFACE_SHARE = share('a share of the light that falls on a surface');
export const BURN_FRACTION = share('a fraction of the fuel');
export const FUEL_SPECIFIC_ENERGY: Bounds = {
  min: 0,
  minExclusive: true,
  max: LIGHT ** 2,
  reason: 'mass-energy: no fuel releases more than c² per mass, all reacting mass counted',
};
export const ANTIMATTER_SPECIFIC_ENERGY: Bounds = {
  min: 0,
  minExclusive: true,
  max: 2 * LIGHT ** 2,
  reason: 'annihilation gives 2c² per mass of antimatter alone, its partner matter not counted',
};
export const SPECIFIC_POWER = above(0, 'power and mass are positive');
export const MASS_RATIO = atLeast(1, 'propellant mass is not negative');
export const PART_OF_TOTAL: Bounds = {
  min: 0,
  minExclusive: true,
  max: 1,
  maxExclusive: true,
  reason: 'a proper part of one total',
};
export const POSITIVE_RATIO = above(0, 'a ratio of two positive masses; it may exceed 1');
export const GROWTH = above(-1, 'the mass with its growth stays positive');
export const DENSITY = above(0, 'mass and volume are positive');
export const PRESSURE = atLeast(0, 'absolute pressure of a fluid');
export const AREAL_MASS = above(0, 'mass and area are positive');
export const EXTENT = above(0, 'lengths, areas, times and installed powers are positive');
export const EXTENT_OR_NONE = atLeast(0, 'a length, area, time or power is not negative');
export const ATTENUATION = above(0, 'matter removes photons from a beam');
export const TRANSMISSION: Bounds = { min: 0, minExclusive: true, max: 1, reason: 'exp(−μx) lies in (0, 1]' };
export const BUILD_UP = atLeast(1, 'scattered photons add to the direct beam, they never subtract');
export const PROBABILITY = share('a probability, or a share of time or of throttle');
export const PHOTON_ENERGY = above(0, 'photon energy and wavelength are positive');
export const COUNT = atLeast(0, 'a count per volume, area or time');
export const ECCENTRICITY = atLeast(0, 'conic sections');
export const LORENTZ_FACTOR = atLeast(1, 'special relativity');
export const SOLAR_DISTANCE = above(6.957e8, 'outside the photosphere, nominal solar radius 6.957e8 m (IAU 2015 B3)');
export const HYDROGEN_LIQUID: Bounds = { min: 13.8, max: 33.1, reason: 'liquid hydrogen: triple to critical point' };
export const OXYGEN_LIQUID: Bounds = { min: 54.4, max: 154.6, reason: 'liquid oxygen: triple to critical point' };
export const METHANE_LIQUID: Bounds = { min: 90.7, max: 190.6, reason: 'liquid methane: triple to critical point' };
