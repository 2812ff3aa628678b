import { EXTENT } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { TRANSFER_CONCEPTS, bodyRadius, inclinationChange, insideBody, massParameter, orbitRadius } from './ports';

/** Largest plane change of Edelbaum's solution, rad; beyond it V_0 + V_f. */
const LARGEST_CHANGE = 2;

/** Delta-v (m/s) and time (s) of a low-thrust spiral with plane change between circular orbits. Edelbaum 1961. */
export const edelbaumTransfer: Method = defineMethod({
  id: 'edelbaum-transfer',
  version: '1.0.0',
  family: 'M12',
  name: 'Low-thrust spiral with plane change',
  summary: 'Delta-v and time of a slow spiral between circular orbits of different radius and plane.',
  equation:
    '\\Delta v = \\sqrt{V_0^2 - 2 V_0 V_f\\cos\\left(\\tfrac{\\pi}{2}\\Delta i\\right) + V_f^2},\\quad t = \\Delta v/f',
  inputs: {
    mu: massParameter,
    a_0: orbitRadius('a_0', 'radius of the first orbit'),
    a_f: orbitRadius('a_f', 'radius of the last orbit'),
    di: { ...inclinationChange, default: 0 },
    f: { tex: 'f', label: 'constant acceleration', unit: 'mm/s^2', bounds: EXTENT },
    R_b: bodyRadius,
  },
  outputs: {
    V_0: { tex: 'V_0', label: 'speed on the first orbit', unit: 'km/s' },
    V_f: { tex: 'V_f', label: 'speed on the last orbit', unit: 'km/s' },
    dv: { tex: '\\Delta v', label: 'delta-v', unit: 'km/s' },
    t: { tex: 't', label: 'transfer time', unit: 'd' },
  },
  proof: [
    line('pi', '\\pi', '3.141592653589793', '1'),
    line('V_0', 'V_0', 'sqrt(mu / a_0)', 'm/s'),
    line('V_f', 'V_f', 'sqrt(mu / a_f)', 'm/s'),
    line('dv', '\\Delta v', 'sqrt((V_0 - V_f)^2 + 4 * V_0 * V_f * sin(pi / 4 * min(di, 2))^2)', 'm/s'),
    line('t', 't', 'dv / f', 's'),
  ],
  validity: 'Quasi-circular spiral at constant acceleration; plane change up to 2 rad (114.6°), beyond it V_0 + V_f.',
  reference: 'T. N. Edelbaum, ARS Journal 31 (1961) 1079; J. A. Kechichian, JGCD 1997 (from memory).',
  cautions: [],
  concepts: TRANSFER_CONCEPTS,
  checks: ['M12-07', 'M12-09', 'M12-06', 'M12-17'],
  solve({ mu, a_0, a_f, di, f, R_b }, { warn }) {
    const inside = insideBody('a_0', a_0, R_b) ?? insideBody('a_f', a_f, R_b);
    if (inside) return inside;
    if (di > LARGEST_CHANGE) warn('The plane change is above 2 rad (114.6°); the delta-v is V_0 + V_f.');
    const V_0 = Math.sqrt(mu / a_0);
    const V_f = Math.sqrt(mu / a_f);
    const half = Math.sin((Math.PI / 4) * Math.min(di, LARGEST_CHANGE));
    const dv = Math.hypot(V_0 - V_f, 2 * Math.sqrt(V_0 * V_f) * half);
    return { V_0, V_f, dv, t: dv / f };
  },
});
