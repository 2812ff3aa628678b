import { EXTENT_OR_NONE } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import {
  IMPULSIVE_VALIDITY,
  TRANSFER_CONCEPTS,
  TRANSFER_REFERENCE,
  bodyRadius,
  insideBody,
  massParameter,
  orbitRadius,
} from './ports';

/** Delta-v (m/s) from a circular orbit (m) onto a hyperbola with an excess speed (m/s). */
export const escapeDeltaV: Method = defineMethod({
  id: 'escape-delta-v',
  version: '1.0.0',
  family: 'M12',
  name: 'Escape from a circular orbit',
  summary: 'Impulse from a circular orbit to escape with a given excess speed, and the launch energy it stands for.',
  equation: '\\Delta v = \\sqrt{v_\\infty^2 + \\frac{2\\mu}{r}} - \\sqrt{\\frac{\\mu}{r}}',
  inputs: {
    mu: massParameter,
    r: orbitRadius('r', 'radius of the circular orbit'),
    v_inf: { tex: 'v_\\infty', label: 'hyperbolic excess speed', unit: 'km/s', bounds: EXTENT_OR_NONE, default: 0 },
    R_b: bodyRadius,
  },
  outputs: {
    v_c: { tex: 'v_c', label: 'circular speed', unit: 'km/s' },
    C_3: { tex: 'C_3', label: 'launch energy', unit: 'km^2/s^2' },
    dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s' },
  },
  proof: [
    line('v_c', 'v_c', 'sqrt(mu / r)', 'm/s'),
    line('C_3', 'C_3', 'v_inf^2', 'm^2/s^2'),
    line('dv', '\\Delta v', 'sqrt(C_3 + 2 * mu / r) - v_c', 'm/s'),
  ],
  validity: IMPULSIVE_VALIDITY,
  reference: TRANSFER_REFERENCE,
  cautions: ['A low-thrust escape costs about the circular speed, 0.8 to 1.0 of it depending on acceleration.'],
  concepts: TRANSFER_CONCEPTS,
  checks: ['M12-12', 'M12-18'],
  solve({ mu, r, v_inf, R_b }) {
    const inside = insideBody('r', r, R_b);
    if (inside) return inside;
    const v_c = Math.sqrt(mu / r);
    return { v_c, C_3: v_inf ** 2, dv: Math.sqrt(v_inf ** 2 + (2 * mu) / r) - v_c };
  },
});

/** Speed (m/s) and period (s) of a circular orbit (m). */
export const circularOrbit: Method = defineMethod({
  id: 'circular-orbit',
  version: '1.0.0',
  family: 'M12',
  name: 'Circular orbit',
  summary: 'Speed and period of a circular orbit.',
  equation: 'v_c = \\sqrt{\\frac{\\mu}{r}},\\quad T = 2\\pi\\sqrt{\\frac{r^3}{\\mu}}',
  inputs: { mu: massParameter, r: orbitRadius('r', 'orbit radius'), R_b: bodyRadius },
  outputs: {
    v_c: { tex: 'v_c', label: 'circular speed', unit: 'km/s' },
    t: { tex: 'T', label: 'period', unit: 'h' },
  },
  proof: [
    line('pi', '\\pi', '3.141592653589793', '1'),
    line('v_c', 'v_c', 'sqrt(mu / r)', 'm/s'),
    line('t', 'T', '2 * pi * r / v_c', 's'),
  ],
  validity: 'Two bodies.',
  reference: TRANSFER_REFERENCE,
  cautions: [],
  concepts: TRANSFER_CONCEPTS,
  checks: [],
  solve({ mu, r, R_b }) {
    const inside = insideBody('r', r, R_b);
    if (inside) return inside;
    const v_c = Math.sqrt(mu / r);
    return { v_c, t: (2 * Math.PI * r) / v_c };
  },
});
