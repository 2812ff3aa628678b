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
  finEfficiency,
} from './ports';

/** Net heat (W) rejected by an emitting area (m²) at a temperature (K) to a sink (K). Stefan–Boltzmann law. */
export const radiatorHeatRejection: Method = defineMethod({
  id: 'radiator-heat-rejection',
  version: '1.0.0',
  family: 'M7',
  name: 'Radiator heat rejection',
  summary: 'Net heat that an emitting area rejects to its surroundings.',
  equation: 'Q = \\eta_f\\,\\varepsilon\\,\\sigma A \\left(T_r^4 - T_s^4\\right)',
  inputs: {
    A: { tex: 'A', label: 'emitting area', unit: 'm^2', bounds: EXTENT },
    eps: emissivity,
    T_r: radiatorTemperature,
    T_s: sinkTemperature,
    eta_f: finEfficiency,
  },
  outputs: {
    q: { tex: 'q', label: 'net heat flux', unit: 'W/m^2' },
    Q: { tex: 'Q', label: 'net heat rejected', unit: 'MW' },
  },
  proof: [line('q', 'q', 'eta_f * eps * sigma * (T_r^4 - T_s^4)', 'W/m^2'), line('Q', 'Q', 'q * A', 'W')],
  constants: constantIds('sigma'),
  validity: RADIATION_VALIDITY,
  reference: RADIATION_REFERENCE,
  cautions: [
    'A flat panel that radiates from both faces counts twice its panel area; faces that see each other count only as their convex envelope.',
  ],
  concepts: EVERY,
  checks: [],
  solve({ A, eps, T_r, T_s, eta_f }) {
    if (T_r <= T_s) return sinkTooWarm(T_r, T_s);
    const q = eta_f * eps * sigma * (T_r ** 4 - T_s ** 4);
    return { q, Q: q * A };
  },
});
