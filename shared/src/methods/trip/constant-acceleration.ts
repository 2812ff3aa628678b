import { EXTENT, EXTENT_OR_NONE } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { FAST } from '../vocabulary';
import { TRIP_REFERENCE, TRIP_VALIDITY, acceleration } from './ports';

/** Ship-clock time (s) under constant proper acceleration (m/s²) from rest: time (s), distance (m), speed. */
export const constantAcceleration: Method = defineMethod({
  id: 'constant-acceleration',
  version: '1.0.0',
  family: 'M3',
  name: 'Constant proper acceleration from rest',
  summary: 'Elapsed time, distance and speed after a time on the ship’s clock under constant proper acceleration.',
  equation:
    't = \\frac{c}{a}\\sinh\\frac{a\\tau}{c},\\quad x = \\frac{c^2}{a}\\left(\\cosh\\frac{a\\tau}{c} - 1\\right)',
  inputs: {
    a: acceleration,
    tau: { tex: '\\tau', label: 'time on the ship’s clock', unit: 'yr', bounds: EXTENT_OR_NONE },
  },
  outputs: {
    phi: { tex: '\\phi', label: 'rapidity gained', unit: '1' },
    t: { tex: 't', label: 'elapsed time at the starting point', unit: 'yr' },
    x: { tex: 'x', label: 'distance', unit: 'ly' },
    beta: { tex: '\\beta', label: 'speed over c', unit: '1' },
    gamma: { tex: '\\gamma', label: 'Lorentz factor', unit: '1' },
  },
  proof: [
    line('phi', '\\phi', 'a * tau / c', '1'),
    line('t', 't', 'c / a * sinh(phi)', 's'),
    line('x', 'x', 'c^2 / a * 2 * sinh(phi / 2)^2', 'm'),
    line('beta', '\\beta', 'tanh(phi)', '1'),
    line('gamma', '\\gamma', 'cosh(phi)', '1'),
  ],
  constants: constantIds('c'),
  validity: TRIP_VALIDITY,
  reference: TRIP_REFERENCE,
  cautions: [],
  concepts: FAST,
  checks: ['M3-04', 'M3-05', 'M3-07'],
  solve({ a, tau }) {
    const phi = (a * tau) / c;
    // cosh φ − 1 written as 2 sinh²(φ/2), which loses no digits on a short burn.
    const x = ((2 * c ** 2) / a) * Math.sinh(phi / 2) ** 2;
    return { phi, t: (c / a) * Math.sinh(phi), x, beta: Math.tanh(phi), gamma: Math.cosh(phi) };
  },
});

/** Time (s) and ship-clock time (s) over a distance (m) under constant proper acceleration (m/s²), arriving at full speed. */
export const accelerateOverDistance: Method = defineMethod({
  id: 'accelerate-over-distance',
  version: '1.0.0',
  family: 'M3',
  name: 'Constant proper acceleration over a distance',
  summary: 'Time, ship-clock time and final speed after accelerating from rest over a distance without braking.',
  equation:
    't = \\sqrt{\\left(\\frac{x}{c}\\right)^2 + \\frac{2x}{a}},\\quad \\tau = \\frac{c}{a}\\cosh^{-1}\\left(1 + \\frac{a x}{c^2}\\right)',
  inputs: { a: acceleration, x: { tex: 'x', label: 'distance', unit: 'ly', bounds: EXTENT } },
  outputs: {
    phi: { tex: '\\phi', label: 'rapidity gained', unit: '1' },
    t: { tex: 't', label: 'elapsed time at the starting point', unit: 'yr' },
    tau: { tex: '\\tau', label: 'time on the ship’s clock', unit: 'yr' },
    beta: { tex: '\\beta', label: 'final speed over c', unit: '1' },
    K: { tex: 'K', label: 'propellant per final mass, photon rocket', unit: '1' },
  },
  proof: [
    line('phi', '\\phi', '2 * asinh(sqrt(a * x / 2) / c)', '1'),
    line('t', 't', 'sqrt((x / c)^2 + 2 * x / a)', 's'),
    line('tau', '\\tau', 'c / a * phi', 's'),
    line('beta', '\\beta', 'tanh(phi)', '1'),
    line('K', 'K', 'expm1(phi)', '1'),
  ],
  constants: constantIds('c'),
  validity: TRIP_VALIDITY,
  reference: TRIP_REFERENCE,
  cautions: ['The propellant is that of an ideal photon rocket, the least any rocket can need.'],
  concepts: FAST,
  checks: ['M2-05'],
  solve({ a, x }) {
    const phi = 2 * Math.asinh(Math.sqrt((a * x) / 2) / c);
    return {
      phi,
      t: Math.sqrt((x / c) ** 2 + (2 * x) / a),
      tau: (c / a) * phi,
      beta: Math.tanh(phi),
      K: Math.expm1(phi),
    };
  },
});
