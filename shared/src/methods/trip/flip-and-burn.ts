import { VEHICLE_SPEED } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { FAST } from '../vocabulary';
import { TRIP_REFERENCE, TRIP_VALIDITY, acceleration, distance, tripOutputs } from './ports';

/** Time (s) and ship-clock time (s) over a distance (m), accelerating to the middle and braking to rest. */
export const flipAndBurn: Method = defineMethod({
  id: 'flip-and-burn',
  version: '1.0.0',
  family: 'M3',
  name: 'Accelerate, turn over, brake',
  summary: 'Time, ship-clock time and peak speed of a trip that accelerates to its middle and brakes to rest.',
  equation:
    't = 2\\sqrt{\\left(\\frac{d}{2c}\\right)^2 + \\frac{d}{a}},\\quad \\tau = \\frac{2c}{a}\\cosh^{-1}\\left(1 + \\frac{a d}{2c^2}\\right)',
  inputs: { a: acceleration, d: distance },
  outputs: tripOutputs,
  proof: [
    line('phi', '\\phi', '2 * asinh(sqrt(a * d) / (2 * c))', '1'),
    line('beta', '\\beta', 'tanh(phi)', '1'),
    line('gamma', '\\gamma', '1 + a * d / (2 * c^2)', '1'),
    line('t', 't', '2 * sqrt((d / (2 * c))^2 + d / a)', 's'),
    line('tau', '\\tau', '2 * c / a * phi', 's'),
    line('phi_t', '\\phi_t', '2 * phi', '1'),
    line('K', 'K', 'expm1(phi_t)', '1'),
  ],
  constants: constantIds('c'),
  validity: `${TRIP_VALIDITY} At rest at both ends.`,
  reference: TRIP_REFERENCE,
  cautions: ['The propellant is that of an ideal photon rocket, the least any rocket can need.'],
  concepts: FAST,
  checks: ['M2-06', 'M3-01', 'M3-03', 'M3-09', 'M3-12', 'M3-13'],
  solve({ a, d }) {
    const phi = 2 * Math.asinh(Math.sqrt(a * d) / (2 * c));
    return {
      beta: Math.tanh(phi),
      gamma: 1 + (a * d) / (2 * c ** 2),
      t: 2 * Math.sqrt((d / (2 * c)) ** 2 + d / a),
      tau: ((2 * c) / a) * phi,
      phi_t: 2 * phi,
      K: Math.expm1(2 * phi),
    };
  },
});

/** Time (s) and ship-clock time (s) over a distance (m) with a cruise at capped speed (m/s) between two burns. */
export const tripWithCruise: Method = defineMethod({
  id: 'trip-with-cruise',
  version: '1.0.0',
  family: 'M3',
  name: 'Accelerate, cruise, brake',
  summary: 'Time and ship-clock time of a trip whose speed is capped; a cap above the peak of the trip has no effect.',
  equation: 't = \\frac{2\\gamma_m v_m}{a} + \\frac{d - 2x_1}{v_m},\\quad x_1 = \\frac{c^2}{a}(\\gamma_m - 1)',
  inputs: {
    a: acceleration,
    d: distance,
    v_m: {
      tex: 'v_m',
      label: 'cruise speed cap',
      unit: 'c',
      bounds: {
        ...VEHICLE_SPEED,
        minExclusive: true,
        reason: 'a cruise needs a speed above 0 and below that of light',
      },
    },
  },
  outputs: { x_1: { tex: 'x_1', label: 'distance of one burn', unit: 'ly' }, ...tripOutputs },
  proof: [
    line('beta_m', '\\beta_m', 'v_m / c', '1'),
    line('gamma_m', '\\gamma_m', '1 / sqrt((1 - beta_m) * (1 + beta_m))', '1'),
    line('x_1', 'x_1', 'min((gamma_m * v_m)^2 / (a * (1 + gamma_m)), d / 2)', 'm'),
    line('phi', '\\phi', '2 * asinh(sqrt(a * x_1 / 2) / c)', '1'),
    line('beta', '\\beta', 'tanh(phi)', '1'),
    line('gamma', '\\gamma', 'cosh(phi)', '1'),
    line('t', 't', '2 * c / a * sinh(phi) + (d - 2 * x_1) / (beta * c)', 's'),
    line('tau', '\\tau', '2 * c / a * phi + (d - 2 * x_1) / (gamma * beta * c)', 's'),
    line('phi_t', '\\phi_t', '2 * phi', '1'),
    line('K', 'K', 'expm1(phi_t)', '1'),
  ],
  constants: constantIds('c'),
  validity: `${TRIP_VALIDITY} At rest at both ends.`,
  reference: TRIP_REFERENCE,
  cautions: ['The propellant is that of an ideal photon rocket, the least any rocket can need.'],
  concepts: FAST,
  checks: [],
  solve({ a, d, v_m }, { warn }) {
    const beta_m = v_m / c;
    const gamma_m = 1 / Math.sqrt((1 - beta_m) * (1 + beta_m));
    const reach = (gamma_m * v_m) ** 2 / (a * (1 + gamma_m));
    if (reach >= d / 2) warn('The speed cap lies above the peak speed of the trip and has no effect.');
    const x_1 = Math.min(reach, d / 2);
    const phi = 2 * Math.asinh(Math.sqrt((a * x_1) / 2) / c);
    const beta = Math.tanh(phi);
    const gamma = Math.cosh(phi);
    const cruise = (d - 2 * x_1) / (beta * c);
    return {
      x_1,
      beta,
      gamma,
      t: ((2 * c) / a) * Math.sinh(phi) + cruise,
      tau: ((2 * c) / a) * phi + cruise / gamma,
      phi_t: 2 * phi,
      K: Math.expm1(2 * phi),
    };
  },
});
