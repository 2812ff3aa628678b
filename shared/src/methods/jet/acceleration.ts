import { EFFICIENCY_ABOVE_ZERO, EXHAUST_SPEED, EXTENT, MASS } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ELECTRIC, EVERY } from '../vocabulary';

/** Acceleration (m/s²) of a vehicle under a thrust (N). */
export const startAcceleration: Method = defineMethod({
  id: 'start-acceleration',
  version: '1.0.0',
  family: 'M5',
  name: 'Acceleration from thrust',
  summary: 'Acceleration of a vehicle of known mass under thrust.',
  equation: 'a = F/m',
  inputs: {
    F: { tex: 'F', label: 'thrust', unit: 'N' },
    m: { tex: 'm', label: 'vehicle mass', unit: 't', bounds: MASS },
  },
  outputs: { a: { tex: 'a', label: 'acceleration', unit: 'm/s^2' } },
  proof: [line('a', 'a', 'F / m', 'm/s^2')],
  validity: 'Mass at the moment of interest; no other force.',
  reference: 'Newton’s second law.',
  cautions: [],
  concepts: EVERY,
  checks: [],
  solve: ({ F, m }) => ({ a: F / m }),
});

/** Acceleration (m/s²) at start from electric power (W), efficiency, exhaust speed (m/s) and vehicle mass (kg). */
export const electricAcceleration: Method = defineMethod({
  id: 'electric-acceleration',
  version: '1.0.0',
  family: 'M5',
  name: 'Acceleration from electric power',
  summary: 'Acceleration that electric thrusters give a vehicle of known mass.',
  equation: 'a = \\frac{2\\,\\eta P}{v_e m}',
  inputs: {
    P: { tex: 'P', label: 'electric power to the thrusters', unit: 'MW', bounds: EXTENT },
    eta: { tex: '\\eta', label: 'thruster total efficiency', unit: '1', bounds: EFFICIENCY_ABOVE_ZERO },
    v_e: { tex: 'v_e', label: 'effective exhaust speed', unit: 'km/s', bounds: EXHAUST_SPEED },
    m: { tex: 'm', label: 'vehicle mass', unit: 't', bounds: MASS },
  },
  outputs: {
    F: { tex: 'F', label: 'thrust', unit: 'N' },
    a: { tex: 'a', label: 'acceleration', unit: 'm/s^2' },
  },
  proof: [line('F', 'F', '2 * eta * P / v_e', 'N'), line('a', 'a', 'F / m', 'm/s^2')],
  validity: 'Constant power and efficiency; exhaust speed far below c; mass at the moment of interest.',
  reference: 'R. G. Jahn, Physics of Electric Propulsion, 1968, ch. 1 (from memory); Newton’s second law.',
  cautions: [],
  concepts: ELECTRIC,
  checks: ['M5-12'],
  solve({ P, eta, v_e, m }) {
    const F = (2 * eta * P) / v_e;
    return { F, a: F / m };
  },
});
