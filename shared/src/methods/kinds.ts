import type { TemperatureKind } from '@shared/units';
import * as bound from './bounds';
import type { Bounds } from './types';

/** A kind of quantity: what it measures and the physics that no value of it can break. */
export interface QuantityKind {
  id: string;
  name: string;
  unit: string;
  temperature?: TemperatureKind;
  /** Hard: refused outside. Null where physics sets no limit on the value alone. */
  bounds: Bounds | null;
  /** Flagged outside, never refused. */
  soft?: Bounds;
}

function kind(id: string, name: string, unit: string, bounds: Bounds | null, soft?: Bounds): QuantityKind {
  return soft ? { id, name, unit, bounds, soft } : { id, name, unit, bounds };
}
function temperature(id: string, name: string, bounds: Bounds | null, tag: TemperatureKind = 'absolute'): QuantityKind {
  return { id, name, unit: 'K', temperature: tag, bounds };
}

/**
 * Kinds that a quantity can be given, with their hard bounds. Kinds that are easily confused are kept apart on purpose:
 * energy per mass of antimatter alone reaches 2c², a tank mass per propellant mass may exceed 1, a sum of rapidities
 * may pass c, a coefficient of performance or fusion gain is no efficiency, beamed power is not bound by stored energy.
 */
export const QUANTITY_KINDS: readonly QuantityKind[] = [
  kind('mass', 'mass', 'kg', bound.MASS),
  kind('payload-mass', 'payload or residual mass', 'kg', bound.MASS_OR_NONE),
  temperature('temperature', 'temperature of a body', bound.TEMPERATURE),
  temperature('sink-temperature', 'equivalent sink temperature', bound.SINK_TEMPERATURE),
  temperature('temperature-difference', 'temperature difference', null, 'difference'),
  temperature('liquid-hydrogen-temperature', 'storage temperature of liquid hydrogen', bound.HYDROGEN_LIQUID),
  temperature('liquid-oxygen-temperature', 'storage temperature of liquid oxygen', bound.OXYGEN_LIQUID),
  temperature('liquid-methane-temperature', 'storage temperature of liquid methane', bound.METHANE_LIQUID),
  kind('vehicle-speed', 'vehicle, cruise or relative speed', 'km/s', bound.VEHICLE_SPEED),
  kind('exhaust-speed', 'effective exhaust speed', 'km/s', bound.EXHAUST_SPEED),
  kind('specific-impulse', 'specific impulse', 's', bound.SPECIFIC_IMPULSE),
  kind('delta-v', 'delta-v', 'km/s', bound.DELTA_V),
  kind('acceleration', 'acceleration', 'm/s^2', null),
  kind('thrust', 'thrust', 'N', bound.THRUST),
  kind('thrust-per-jet-power', 'thrust per on-board jet power', 'N/W', bound.THRUST_PER_JET_POWER),
  kind('thrust-per-beam-power', 'thrust per reflected beam power', 'N/W', bound.THRUST_PER_BEAM_POWER),
  kind('mass-flow', 'mass flow', 'kg/s', bound.COUNT),
  kind('efficiency', 'energy efficiency', '1', bound.EFFICIENCY),
  kind('thruster-efficiency', 'thruster total efficiency', '1', bound.EFFICIENCY_ABOVE_ZERO),
  kind('heat-engine-efficiency', 'heat-engine efficiency', '1', bound.HEAT_ENGINE_EFFICIENCY),
  kind('sunlight-conversion-efficiency', 'sunlight conversion efficiency', '1', bound.SUNLIGHT_CONVERSION, {
    min: 0,
    max: 0.34,
    reason: 'about the limit of one junction under one sun; concentration or several junctions go beyond',
  }),
  kind('coefficient-of-performance', 'coefficient of performance', '1', bound.PERFORMANCE_COEFFICIENT),
  kind('fusion-gain', 'fusion gain', '1', bound.PERFORMANCE_COEFFICIENT),
  kind('waste-heat', 'waste heat', 'W', bound.WASTE_HEAT),
  kind('heat-flux', 'heat flux', 'W/m^2', null),
  kind('emissivity', 'emissivity', '1', bound.EMISSIVITY),
  kind('absorptance', 'absorptance', '1', bound.SURFACE_SHARE),
  kind('reflectivity', 'reflectivity', '1', bound.SURFACE_SHARE),
  kind('transmittance', 'transmittance', '1', bound.SURFACE_SHARE),
  kind('burn-fraction', 'burn fraction or burn-up', '1', bound.BURN_FRACTION),
  kind(
    'fuel-specific-energy',
    'energy per mass of fuel, all reacting mass counted',
    'J/kg',
    bound.FUEL_SPECIFIC_ENERGY,
  ),
  kind('antimatter-specific-energy', 'energy per mass of antimatter alone', 'J/kg', bound.ANTIMATTER_SPECIFIC_ENERGY),
  kind('specific-power', 'specific power', 'W/kg', bound.SPECIFIC_POWER),
  kind('specific-mass', 'specific mass of a power system', 'kg/kW', bound.SPECIFIC_POWER),
  kind('mass-ratio', 'mass ratio', '1', bound.MASS_RATIO),
  kind('fraction-of-total', 'propellant, structural or tank fraction of a total', '1', bound.PART_OF_TOTAL),
  kind('tank-to-propellant-ratio', 'tank mass per propellant mass', '1', bound.POSITIVE_RATIO),
  kind('margin', 'margin', '1', bound.GROWTH, { min: 0, reason: 'a negative margin means that the limit is not met' }),
  kind('growth-allowance', 'mass growth allowance', '1', bound.GROWTH, {
    min: 0,
    reason: 'a negative allowance takes mass away from the estimate',
  }),
  kind('density', 'density', 'kg/m^3', bound.DENSITY, {
    min: 0,
    max: 23_000,
    reason: 'the densest ordinary matter, osmium, has 22 590 kg/m³',
  }),
  kind('pressure', 'fluid pressure, absolute', 'Pa', bound.PRESSURE),
  kind('stress', 'stress in a solid', 'Pa', null),
  kind('areal-mass', 'areal mass or loading', 'kg/m^2', bound.AREAL_MASS),
  kind('length', 'length', 'm', bound.EXTENT),
  kind('area', 'area', 'm^2', bound.EXTENT),
  kind('volume', 'volume', 'm^3', bound.EXTENT),
  kind('duration', 'duration', 's', bound.EXTENT),
  kind('power', 'installed power', 'W', bound.EXTENT),
  kind('energy', 'energy', 'J', null),
  kind('heat-capacity', 'specific heat capacity', 'J/(kg K)', bound.SPECIFIC_POWER),
  kind('mass-attenuation', 'mass attenuation coefficient', 'm^2/kg', bound.ATTENUATION),
  kind('attenuation', 'linear attenuation coefficient', '1/m', bound.ATTENUATION),
  kind('transmission', 'transmission of a shield', '1', bound.TRANSMISSION),
  kind('build-up', 'build-up factor', '1', bound.BUILD_UP),
  kind('probability', 'probability, reliability, duty cycle or throttle', '1', bound.PROBABILITY),
  kind('photon-energy', 'photon energy', 'eV', bound.PHOTON_ENERGY),
  kind('wavelength', 'wavelength', 'm', bound.PHOTON_ENERGY),
  kind('number-density', 'number density', '1/m^3', bound.COUNT),
  kind('particle-flux', 'particle flux', '1/(m^2 s)', bound.COUNT),
  kind('absorbed-dose', 'absorbed dose', 'J/kg', bound.COUNT),
  kind('eccentricity', 'eccentricity', '1', bound.ECCENTRICITY),
  kind('lorentz-factor', 'Lorentz factor', '1', bound.LORENTZ_FACTOR),
  kind('solar-distance', 'distance from the Sun', 'au', bound.SOLAR_DISTANCE),
  kind('angle', 'angle', 'deg', null),
  kind('ratio', 'pure number', '1', null),
];

const byId = new Map(QUANTITY_KINDS.map((entry) => [entry.id, entry]));

/** The kind with this id, or undefined. */
export function quantityKind(id: string): QuantityKind | undefined {
  return byId.get(id);
}
