import { MASS_OR_NONE, VEHICLE_SPEED } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';

/** Kinetic energy (J) of a rest mass (kg) at a speed (m/s), exact at any speed below c. */
export const kineticEnergy: Method = defineMethod({
  id: 'kinetic-energy',
  version: '1.0.0',
  family: 'M4',
  name: 'Kinetic energy',
  summary: 'Kinetic energy of a body at any speed below that of light.',
  equation: 'E_k = (\\gamma - 1) m c^2',
  inputs: {
    m: { tex: 'm', label: 'rest mass', unit: 'kg', bounds: MASS_OR_NONE },
    v: { tex: 'v', label: 'speed', unit: 'km/s', bounds: VEHICLE_SPEED },
  },
  outputs: {
    gamma: { tex: '\\gamma', label: 'Lorentz factor', unit: '1' },
    E_k: { tex: 'E_k', label: 'kinetic energy', unit: 'J' },
  },
  proof: [
    line('beta', '\\beta', 'v / c', '1'),
    line('gamma', '\\gamma', '1 / sqrt((1 - beta) * (1 + beta))', '1'),
    line('E_k', 'E_k', 'm * (gamma * v)^2 / (1 + gamma)', 'J'),
  ],
  constants: constantIds('c'),
  validity: 'Special relativity, in the frame in which the speed is given.',
  reference: 'Special relativity; the proof writes (γ − 1)c² as (γv)²/(1 + γ), which loses no digits at low speed.',
  cautions: [],
  concepts: EVERY,
  checks: ['M4-01', 'M4-08'],
  solve({ m, v }) {
    const beta = v / c;
    const gamma = 1 / Math.sqrt((1 - beta) * (1 + beta));
    return { gamma, E_k: (m * (gamma * v) ** 2) / (1 + gamma) };
  },
});
