import { EMISSIVITY, SURFACE_SHARE } from '../bounds';
import { constantIds, sigma } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { BEAMED, SOLAR_SAIL } from '../vocabulary';
import { irradiance } from './ports';

/** Equilibrium temperature (K) of a sail lit by an intensity (W/m²) that radiates from both faces. */
export const sailTemperature: Method = defineMethod({
  id: 'sail-temperature',
  version: '1.0.0',
  family: 'M11',
  name: 'Sail temperature',
  summary: 'Equilibrium temperature of a thin sail that radiates from both faces.',
  equation: 'T = \\left[\\frac{\\alpha S}{\\sigma(\\varepsilon_f + \\varepsilon_b)}\\right]^{1/4}',
  inputs: {
    S: irradiance,
    alpha: { tex: '\\alpha', label: 'absorptance', unit: '1', bounds: SURFACE_SHARE },
    eps_f: { tex: '\\varepsilon_f', label: 'emissivity of the lit face', unit: '1', bounds: EMISSIVITY },
    eps_b: { tex: '\\varepsilon_b', label: 'emissivity of the dark face', unit: '1', bounds: EMISSIVITY },
  },
  outputs: { T: { tex: 'T', label: 'sail temperature', unit: 'K', temperature: 'absolute' } },
  proof: [line('T', 'T', '(alpha * S / (sigma * (eps_f + eps_b)))^0.25', 'K')],
  constants: constantIds('sigma'),
  validity: 'Normal incidence, thin sail at one temperature, sink at 0 K.',
  reference: 'Stefan–Boltzmann law.',
  cautions: [],
  concepts: [SOLAR_SAIL, BEAMED],
  checks: ['M11-09'],
  solve: ({ S, alpha, eps_f, eps_b }) => ({ T: Math.sqrt(Math.sqrt((alpha * S) / (sigma * (eps_f + eps_b)))) }),
});
