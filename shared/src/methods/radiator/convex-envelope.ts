import { EXTENT } from '../bounds';
import { constantIds, sigma } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';
import {
  RADIATION_REFERENCE,
  RADIATION_VALIDITY,
  emissivity,
  radiatorTemperature,
  sinkTemperature,
  sinkTooWarm,
} from './ports';

/** Net heat (W) rejected by faces (m²) inside a convex envelope (m²); the smaller of the two areas emits. */
export const radiatorConvexEnvelope: Method = defineMethod({
  id: 'radiator-convex-envelope',
  version: '1.0.0',
  family: 'M7',
  name: 'Radiator within a convex envelope',
  summary: 'Net heat rejected by faces that may see each other: never more than their convex envelope can emit.',
  equation: 'Q = \\varepsilon_a\\,\\sigma \\min(A_f, A_c) \\left(T_r^4 - T_s^4\\right)',
  inputs: {
    A_f: { tex: 'A_f', label: 'area of all faces', unit: 'm^2', bounds: EXTENT },
    A_c: { tex: 'A_c', label: 'area of the convex envelope', unit: 'm^2', bounds: EXTENT },
    eps: emissivity,
    T_r: radiatorTemperature,
    T_s: sinkTemperature,
  },
  outputs: {
    A_eff: { tex: 'A_{eff}', label: 'effective emitting area', unit: 'm^2' },
    eps_a: { tex: '\\varepsilon_a', label: 'apparent emissivity of the envelope', unit: '1' },
    Q: { tex: 'Q', label: 'net heat rejected', unit: 'MW' },
    Q_f: { tex: 'Q_f', label: 'heat if every face saw only space', unit: 'MW' },
  },
  proof: [
    line('A_eff', 'A_{eff}', 'min(A_f, A_c)', 'm^2'),
    line('eps_a', '\\varepsilon_a', 'eps / (eps + (1 - eps) * A_eff / A_f)', '1'),
    line('Q', 'Q', 'eps_a * sigma * A_eff * (T_r^4 - T_s^4)', 'W'),
    line('Q_f', 'Q_f', 'eps * sigma * A_f * (T_r^4 - T_s^4)', 'W'),
  ],
  constants: constantIds('sigma'),
  validity: `${RADIATION_VALIDITY} The apparent emissivity assumes uniform radiosity in the cavities between the faces, approximate for V-grooves.`,
  reference: `${RADIATION_REFERENCE} Envelope rule: reciprocity of view factors, checked against J. R. Howell’s V-groove factor (from memory).`,
  cautions: ['Fins that see each other add nothing beyond the envelope.'],
  concepts: EVERY,
  checks: ['M7-11'],
  solve({ A_f, A_c, eps, T_r, T_s }, { warn }) {
    if (T_r <= T_s) return sinkTooWarm(T_r, T_s);
    const A_eff = Math.min(A_f, A_c);
    if (A_c < A_f) warn('The faces exceed their convex envelope; the envelope emits.');
    const eps_a = eps / (eps + ((1 - eps) * A_eff) / A_f);
    const difference = T_r ** 4 - T_s ** 4;
    return { A_eff, eps_a, Q: eps_a * sigma * A_eff * difference, Q_f: eps * sigma * A_f * difference };
  },
});
