import { AREAL_MASS, EXTENT_OR_NONE } from '../bounds';
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

/** Emitting area (m²), panel area (m²) and panel mass (kg) that reject a heat (W). Stefan–Boltzmann law. */
export const radiatorSizing: Method = defineMethod({
  id: 'radiator-sizing',
  version: '1.0.0',
  family: 'M7',
  name: 'Radiator area and mass',
  summary: 'Emitting area, panel area and mass of a radiator that has to reject a given heat.',
  equation:
    'A = \\frac{Q}{\\eta_f\\,\\varepsilon\\,\\sigma \\left(T_r^4 - T_s^4\\right)},\\quad m = \\sigma_m \\frac{A}{N_f}',
  inputs: {
    Q: { tex: 'Q', label: 'heat to reject', unit: 'MW', bounds: EXTENT_OR_NONE },
    eps: emissivity,
    T_r: radiatorTemperature,
    sigma_m: { tex: '\\sigma_m', label: 'areal mass per panel area', unit: 'kg/m^2', bounds: AREAL_MASS },
    N_f: {
      tex: 'N_f',
      label: 'radiating faces per panel',
      unit: '1',
      bounds: { min: 1, max: 2, reason: 'a flat panel radiates from one face or from both' },
      default: 2,
    },
    T_s: sinkTemperature,
    eta_f: finEfficiency,
  },
  outputs: {
    A: { tex: 'A', label: 'emitting area', unit: 'm^2' },
    A_p: { tex: 'A_p', label: 'panel area', unit: 'm^2' },
    m: { tex: 'm', label: 'radiator mass', unit: 'kg' },
  },
  proof: [
    line('A', 'A', 'Q / (eta_f * eps * sigma * (T_r^4 - T_s^4))', 'm^2'),
    line('A_p', 'A_p', 'A / N_f', 'm^2'),
    line('m', 'm', 'sigma_m * A_p', 'kg'),
  ],
  constants: constantIds('sigma'),
  validity: `${RADIATION_VALIDITY} Panels see only their sink.`,
  reference: RADIATION_REFERENCE,
  cautions: ['The areal mass is per panel area, not per emitting face.'],
  concepts: EVERY,
  checks: ['M7-10'],
  solve({ Q, eps, T_r, sigma_m, N_f, T_s, eta_f }) {
    if (T_r <= T_s) return sinkTooWarm(T_r, T_s);
    const A = Q / (eta_f * eps * sigma * (T_r ** 4 - T_s ** 4));
    return { A, A_p: A / N_f, m: (sigma_m * A) / N_f };
  },
});
