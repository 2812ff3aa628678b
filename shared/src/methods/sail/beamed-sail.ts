import { EXTENT, MASS, SURFACE_SHARE, VEHICLE_SPEED } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line, refuse } from '../define';
import type { Method } from '../types';
import { BEAMED, SOLAR_SAIL } from '../vocabulary';
import { SAIL_VALIDITY, reflectivity } from './ports';

/** Force (N) and acceleration (m/s²) of a beam of power P (W) on a sail that recedes at v (m/s). Forward 1984, Marx 1966. */
export const beamedSail: Method = defineMethod({
  id: 'beamed-sail',
  version: '1.0.0',
  family: 'M11',
  name: 'Beamed sail acceleration',
  summary: 'Force and acceleration that a beam gives a sail, at rest or moving away from the source.',
  equation: 'F = \\frac{(2 r + \\alpha) P}{c}\\,\\frac{1 - \\beta}{1 + \\beta},\\quad a = F/m',
  inputs: {
    P: { tex: 'P', label: 'beam power at the source', unit: 'GW', bounds: EXTENT },
    m: { tex: 'm', label: 'sailcraft mass', unit: 'kg', bounds: MASS },
    r: reflectivity,
    alpha: { tex: '\\alpha', label: 'absorptance', unit: '1', bounds: SURFACE_SHARE, default: 0 },
    v: { tex: 'v', label: 'speed away from the source', unit: 'c', bounds: VEHICLE_SPEED, default: 0 },
  },
  outputs: {
    F: { tex: 'F', label: 'force on the sail', unit: 'N' },
    a: { tex: 'a', label: 'proper acceleration', unit: 'm/s^2' },
  },
  proof: [
    line('beta', '\\beta', 'v / c', '1'),
    line('F', 'F', '(2 * r + alpha) * P / c * (1 - beta) / (1 + beta)', 'N'),
    line('a', 'a', 'F / m', 'm/s^2'),
  ],
  constants: constantIds('c'),
  validity: `${SAIL_VALIDITY} Normal incidence, the whole beam on the sail, steady source; the force is that in the frame of the sail.`,
  reference:
    'R. L. Forward, Journal of Spacecraft and Rockets 21 (1984) 187 (abstract seen); G. Marx, Nature 211 (1966) 22.',
  cautions: [],
  concepts: [BEAMED],
  checks: ['M11-03'],
  solve({ P, m, r, alpha, v }) {
    if (r + alpha > 1) {
      return refuse(
        'alpha',
        `Reflectivity ${r} and absorptance ${alpha} add up to more than 1; a surface shares out what falls on it.`,
      );
    }
    const beta = v / c;
    const F = ((((2 * r + alpha) * P) / c) * (1 - beta)) / (1 + beta);
    return { F, a: F / m };
  },
});

/** Spot radius and diameter (m) of a diffraction-limited beam at a distance (m): first zero of the Airy pattern. */
export const beamDiffraction: Method = defineMethod({
  id: 'beam-diffraction',
  version: '1.0.0',
  family: 'M11',
  name: 'Beam spot by diffraction',
  summary: 'Spot size of a diffraction-limited beam at a distance; the spot holds 84 % of the energy.',
  equation: 'r = 1.22\\,\\frac{\\lambda L}{D}',
  inputs: {
    lambda: { tex: '\\lambda', label: 'wavelength', unit: 'um', bounds: EXTENT },
    L: { tex: 'L', label: 'distance', unit: 'au', bounds: EXTENT },
    D: { tex: 'D', label: 'diameter of the transmitter', unit: 'm', bounds: EXTENT },
  },
  outputs: {
    r: { tex: 'r', label: 'spot radius to the first zero', unit: 'm' },
    d: { tex: 'd', label: 'spot diameter', unit: 'm' },
  },
  proof: [line('r', 'r', '1.2196698912665045 * lambda * L / D', 'm'), line('d', 'd', '2 * r', 'm')],
  validity: 'Circular aperture, uniformly lit, far field, no pointing error.',
  reference: 'Airy pattern; first zero of the Bessel function J₁ over π is 1.2197.',
  cautions: ['State whether the sail diameter is matched to the radius or to the diameter of the spot.'],
  concepts: [BEAMED],
  checks: [],
  solve({ lambda, L, D }) {
    const r = (1.2196698912665045 * lambda * L) / D;
    return { r, d: 2 * r };
  },
});

/** Distance (m) and time (s) to reach a speed (m/s) at constant acceleration (m/s²) from rest, classical. */
export const accelerationDistance: Method = defineMethod({
  id: 'acceleration-distance',
  version: '1.0.0',
  family: 'M11',
  name: 'Acceleration distance',
  summary: 'Distance and time to reach a speed from rest at constant acceleration, far below the speed of light.',
  equation: 'd = \\frac{v^2}{2a},\\quad t = \\frac{v}{a}',
  inputs: {
    v: { tex: 'v', label: 'speed to reach', unit: 'km/s', bounds: VEHICLE_SPEED },
    a: { tex: 'a', label: 'acceleration', unit: 'm/s^2', bounds: EXTENT },
  },
  outputs: {
    d: { tex: 'd', label: 'distance', unit: 'au' },
    t: { tex: 't', label: 'time', unit: 'd' },
  },
  proof: [line('d', 'd', 'v^2 / (2 * a)', 'm'), line('t', 't', 'v / a', 's')],
  validity: 'Classical; constant acceleration.',
  reference: 'Kinematics.',
  cautions: [],
  concepts: [SOLAR_SAIL, BEAMED],
  checks: [],
  solve({ v, a }, { warn }) {
    if (v > 0.1 * c) warn('The speed is above 0.1 c; use constant proper acceleration.');
    return { d: v ** 2 / (2 * a), t: v / a };
  },
});
