import { defineMethod, line } from '../define';
import type { Method } from '../types';
import {
  IMPULSIVE_VALIDITY,
  TRANSFER_CONCEPTS,
  TRANSFER_REFERENCE,
  bodyRadius,
  inclinationChange,
  insideBody,
  massParameter,
  orbitRadius,
} from './ports';

const r_1 = orbitRadius('r_1', 'radius of the first orbit');
const r_2 = orbitRadius('r_2', 'radius of the last orbit');
const piLine = line('pi', '\\pi', '3.141592653589793', '1');
const total = { tex: '\\Delta v', label: 'total delta-v', unit: 'km/s' };

/** Impulses (m/s) and time (s) of a Hohmann transfer between circular orbits (m), an optional plane change at the last. */
export const hohmannTransfer: Method = defineMethod({
  id: 'hohmann-transfer',
  version: '1.0.0',
  family: 'M12',
  name: 'Hohmann transfer',
  summary:
    'Two-impulse transfer between circular orbits, with an optional plane change combined with the last impulse.',
  equation:
    '\\Delta v_1 = \\left|\\sqrt{\\tfrac{\\mu}{r_1}}\\left(\\sqrt{\\tfrac{2 r_2}{r_1 + r_2}} - 1\\right)\\right|,\\quad t = \\pi\\sqrt{\\frac{(r_1 + r_2)^3}{8\\mu}}',
  inputs: { mu: massParameter, r_1, r_2, di: { ...inclinationChange, default: 0 }, R_b: bodyRadius },
  outputs: {
    dv_1: { tex: '\\Delta v_1', label: 'first impulse', unit: 'km/s' },
    dv_2: { tex: '\\Delta v_2', label: 'last impulse', unit: 'km/s' },
    dv: total,
    t: { tex: 't', label: 'transfer time', unit: 'h' },
  },
  proof: [
    piLine,
    line('dv_1', '\\Delta v_1', 'abs(sqrt(mu / r_1) * (sqrt(2 * r_2 / (r_1 + r_2)) - 1))', 'm/s'),
    line('v_c', 'v_c', 'sqrt(mu / r_2)', 'm/s'),
    line('v_t', 'v_t', 'v_c * sqrt(2 * r_1 / (r_1 + r_2))', 'm/s'),
    line('dv_2', '\\Delta v_2', 'sqrt((v_c - v_t)^2 + 4 * v_c * v_t * sin(di / 2)^2)', 'm/s'),
    line('dv', '\\Delta v', 'dv_1 + dv_2', 'm/s'),
    line('t', 't', 'pi * sqrt(((r_1 + r_2) / 2)^3 / mu)', 's'),
  ],
  validity: IMPULSIVE_VALIDITY,
  reference: TRANSFER_REFERENCE,
  cautions: [],
  concepts: TRANSFER_CONCEPTS,
  checks: ['M12-01', 'M12-05', 'M12-15'],
  solve({ mu, r_1: r1, r_2: r2, di, R_b }) {
    const inside = insideBody('r_1', r1, R_b) ?? insideBody('r_2', r2, R_b);
    if (inside) return inside;
    const dv_1 = Math.abs(Math.sqrt(mu / r1) * (Math.sqrt((2 * r2) / (r1 + r2)) - 1));
    const circular = Math.sqrt(mu / r2);
    const arriving = circular * Math.sqrt((2 * r1) / (r1 + r2));
    const dv_2 = Math.hypot(circular - arriving, 2 * Math.sqrt(circular * arriving) * Math.sin(di / 2));
    return { dv_1, dv_2, dv: dv_1 + dv_2, t: Math.PI * Math.sqrt(((r1 + r2) / 2) ** 3 / mu) };
  },
});

/** Impulses (m/s) and time (s) of a bi-elliptic transfer by way of an intermediate apoapsis (m). */
export const biellipticTransfer: Method = defineMethod({
  id: 'bielliptic-transfer',
  version: '1.0.0',
  family: 'M12',
  name: 'Bi-elliptic transfer',
  summary: 'Three-impulse transfer between circular orbits by way of a far apoapsis.',
  equation:
    '\\Delta v = \\sum_{k=1}^{3} |\\Delta v_k|,\\quad t = \\pi\\sqrt{\\frac{a_1^3}{\\mu}} + \\pi\\sqrt{\\frac{a_2^3}{\\mu}}',
  inputs: { mu: massParameter, r_1, r_b: orbitRadius('r_b', 'intermediate apoapsis radius'), r_2, R_b: bodyRadius },
  outputs: {
    dv_1: { tex: '\\Delta v_1', label: 'first impulse', unit: 'km/s' },
    dv_2: { tex: '\\Delta v_2', label: 'impulse at the apoapsis', unit: 'km/s' },
    dv_3: { tex: '\\Delta v_3', label: 'last impulse', unit: 'km/s' },
    dv: total,
    t: { tex: 't', label: 'transfer time', unit: 'h' },
  },
  proof: [
    piLine,
    line('a_1', 'a_1', '(r_1 + r_b) / 2', 'm'),
    line('a_2', 'a_2', '(r_2 + r_b) / 2', 'm'),
    line('dv_1', '\\Delta v_1', 'abs(sqrt(mu * (2 / r_1 - 1 / a_1)) - sqrt(mu / r_1))', 'm/s'),
    line('dv_2', '\\Delta v_2', 'abs(sqrt(mu * (2 / r_b - 1 / a_2)) - sqrt(mu * (2 / r_b - 1 / a_1)))', 'm/s'),
    line('dv_3', '\\Delta v_3', 'abs(sqrt(mu * (2 / r_2 - 1 / a_2)) - sqrt(mu / r_2))', 'm/s'),
    line('dv', '\\Delta v', 'dv_1 + dv_2 + dv_3', 'm/s'),
    line('t', 't', 'pi * sqrt(a_1^3 / mu) + pi * sqrt(a_2^3 / mu)', 's'),
  ],
  validity: IMPULSIVE_VALIDITY,
  reference: TRANSFER_REFERENCE,
  cautions: ['Better than Hohmann only above a radius ratio of about 12, always above 15.58.'],
  concepts: TRANSFER_CONCEPTS,
  checks: ['M12-04', 'M12-13'],
  solve({ mu, r_1: r1, r_b, r_2: r2, R_b }, { warn }) {
    const inside = insideBody('r_1', r1, R_b) ?? insideBody('r_2', r2, R_b) ?? insideBody('r_b', r_b, R_b);
    if (inside) return inside;
    if (r_b < Math.max(r1, r2))
      warn('The intermediate radius lies inside one of the orbits: this is no bi-elliptic transfer.');
    const [a1, a2] = [(r1 + r_b) / 2, (r2 + r_b) / 2];
    const speed = (r: number, a: number) => Math.sqrt(mu * (2 / r - 1 / a));
    const dv_1 = Math.abs(speed(r1, a1) - Math.sqrt(mu / r1));
    const dv_2 = Math.abs(speed(r_b, a2) - speed(r_b, a1));
    const dv_3 = Math.abs(speed(r2, a2) - Math.sqrt(mu / r2));
    const t = Math.PI * (Math.sqrt(a1 ** 3 / mu) + Math.sqrt(a2 ** 3 / mu));
    return { dv_1, dv_2, dv_3, dv: dv_1 + dv_2 + dv_3, t };
  },
});
