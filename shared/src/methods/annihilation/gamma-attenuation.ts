import { ATTENUATION, BUILD_UP, DENSITY, EXTENT, EXTENT_OR_NONE } from '../bounds';
import { defineMethod, line, refuse } from '../define';
import type { Method } from '../types';
import { ANNIHILATION, FUSION, NUCLEAR_ELECTRIC, NUCLEAR_THERMAL, SHIELDING_CAUTION } from '../vocabulary';

const CONCEPTS = [ANNIHILATION, FUSION, NUCLEAR_THERMAL, NUCLEAR_ELECTRIC];
const REFERENCE =
  'J. H. Hubbell and S. M. Seltzer, NIST SRD 126 (attenuation coefficients); exponential law of narrow beams.';
const BUILD_UP_CAUTION =
  'Without a build-up factor the result holds for a narrow beam only; a broad beam lets through more, up to ten times and beyond at ten mean free paths. Ignoring build-up is not conservative.';
const CASCADE_CAUTION =
  'Above about 10 MeV the exponential gives first interactions only; the cascade behind them needs some 20 to 25 radiation lengths to be contained.';

const material = {
  mu_rho: { tex: '\\mu/\\rho', label: 'mass attenuation coefficient', unit: 'm^2/kg', bounds: ATTENUATION },
  rho: { tex: '\\rho', label: 'shield density', unit: 'kg/m^3', bounds: DENSITY },
};
const buildUp = { tex: 'B', label: 'build-up factor', unit: '1', bounds: BUILD_UP, default: 1 };
const layers = {
  mu: { tex: '\\mu', label: 'linear attenuation coefficient', unit: '1/m' },
  x_h: { tex: 'x_{1/2}', label: 'half-value layer', unit: 'm' },
  x_t: { tex: 'x_{1/10}', label: 'tenth-value layer', unit: 'm' },
};
const layerLines = [
  line('mu', '\\mu', 'mu_rho * rho', '1/m'),
  line('x_h', 'x_{1/2}', 'log(2) / mu', 'm'),
  line('x_t', 'x_{1/10}', 'log(10) / mu', 'm'),
];

/** Transmission of gammas through a shield thickness (m), narrow beam times build-up, with half- and tenth-value layers (m). */
export const gammaTransmission: Method = defineMethod({
  id: 'gamma-transmission',
  version: '1.0.0',
  family: 'M9',
  name: 'Gamma transmission of a shield',
  summary: 'Share of gammas that passes a shield of known thickness, with half-value and tenth-value layers.',
  equation: 'T = B\\, e^{-\\mu x},\\quad \\mu = \\frac{\\mu}{\\rho}\\rho',
  inputs: { ...material, x: { tex: 'x', label: 'shield thickness', unit: 'm', bounds: EXTENT_OR_NONE }, B: buildUp },
  outputs: {
    ...layers,
    n_x: { tex: '\\mu x', label: 'thickness in mean free paths', unit: '1' },
    T: { tex: 'T', label: 'transmission', unit: '1' },
  },
  proof: [...layerLines, line('n_x', '\\mu x', 'mu * x', '1'), line('T', 'T', 'min(1, B * exp(-n_x))', '1')],
  validity: 'One photon energy within the table of the coefficient; the transmission is capped at 1.',
  reference: REFERENCE,
  cautions: [BUILD_UP_CAUTION, CASCADE_CAUTION, SHIELDING_CAUTION],
  concepts: CONCEPTS,
  checks: ['M9-05', 'M9-06', 'M9-10'],
  solve({ mu_rho, rho, x, B }, { warn }) {
    const mu = mu_rho * rho;
    if (B === 1 && mu * x > 1) warn('No build-up factor is given for a shield of more than one mean free path.');
    return { mu, x_h: Math.LN2 / mu, x_t: Math.LN10 / mu, n_x: mu * x, T: Math.min(1, B * Math.exp(-mu * x)) };
  },
});

/** Shield thickness (m) and mass (kg) over an area (m²) for a reduction factor, narrow beam times build-up. */
export const gammaShield: Method = defineMethod({
  id: 'gamma-shield',
  version: '1.0.0',
  family: 'M9',
  name: 'Gamma shield thickness and mass',
  summary: 'Thickness that reduces gammas by a factor, and the mass of such a shield over an area.',
  equation: 'x = \\frac{\\ln(K B)}{\\mu},\\quad m = \\rho\\, x A',
  inputs: {
    ...material,
    K: {
      tex: 'K',
      label: 'reduction factor',
      unit: '1',
      bounds: { min: 1, reason: 'a shield reduces; a factor below 1 would amplify' },
    },
    A: { tex: 'A', label: 'shielded area', unit: 'm^2', bounds: EXTENT },
    B: buildUp,
  },
  outputs: {
    ...layers,
    x: { tex: 'x', label: 'shield thickness', unit: 'm' },
    sigma_m: { tex: '\\sigma_m', label: 'areal mass', unit: 'kg/m^2' },
    m: { tex: 'm', label: 'shield mass', unit: 't' },
  },
  proof: [
    ...layerLines,
    line('x', 'x', 'log(K * B) / mu', 'm'),
    line('sigma_m', '\\sigma_m', 'rho * x', 'kg/m^2'),
    line('m', 'm', 'sigma_m * A', 'kg'),
  ],
  validity:
    'One photon energy within the table of the coefficient; plane shield over a flat area; build-up taken at the final thickness.',
  reference: REFERENCE,
  cautions: [BUILD_UP_CAUTION, CASCADE_CAUTION, SHIELDING_CAUTION],
  concepts: CONCEPTS,
  checks: ['M9-08'],
  solve({ mu_rho, rho, K, A, B }, { warn }) {
    const mu = mu_rho * rho;
    const x = Math.log(K * B) / mu;
    if (B === 1 && K > Math.E) warn('No build-up factor is given for a shield of more than one mean free path.');
    return { mu, x_h: Math.LN2 / mu, x_t: Math.LN10 / mu, x, sigma_m: rho * x, m: rho * x * A };
  },
});

/** Linear attenuation coefficient (1/m) of a mixture: mass fractions times mass attenuation coefficients (m²/kg). */
export const mixtureAttenuation: Method = defineMethod({
  id: 'mixture-attenuation',
  version: '1.0.0',
  family: 'M9',
  name: 'Attenuation coefficient of a mixture',
  summary: 'Mass and linear attenuation coefficient of a material from those of its constituents.',
  equation: '\\frac{\\mu}{\\rho} = \\sum_i w_i \\left(\\frac{\\mu}{\\rho}\\right)_i',
  inputs: { rho: material.rho },
  group: {
    name: 'constituents',
    label: 'constituents',
    ports: {
      w: { tex: 'w', label: 'mass fraction', unit: '1', bounds: { min: 0, max: 1, reason: 'a share of the mass' } },
      mu_rho: material.mu_rho,
    },
    atLeast: 1,
    atMost: 20,
  },
  outputs: {
    mu_rho: { tex: '\\mu/\\rho', label: 'mass attenuation coefficient', unit: 'm^2/kg' },
    mu: { tex: '\\mu', label: 'linear attenuation coefficient', unit: '1/m' },
  },
  proofFor: (items) => [
    line(
      'mu_rho',
      '\\mu/\\rho',
      Array.from({ length: items }, (_, i) => `w_${i + 1} * mu_rho_${i + 1}`).join(' + '),
      'm^2/kg',
    ),
    line('mu', '\\mu', 'mu_rho * rho', '1/m'),
  ],
  validity: 'All coefficients at the same photon energy.',
  reference: 'J. H. Hubbell and S. M. Seltzer, NIST SRD 126 (mixture rule).',
  cautions: [SHIELDING_CAUTION],
  concepts: CONCEPTS,
  checks: [],
  solve({ rho }, { items }) {
    const total = items.reduce((sum, item) => sum + item.w, 0);
    if (Math.abs(total - 1) > 1e-6) {
      return refuse('w_1', `The mass fractions add up to ${total}; they must add up to 1.`);
    }
    const mu_rho = items.reduce((sum, item) => sum + item.w * item.mu_rho, 0);
    return { mu_rho, mu: mu_rho * rho };
  },
});
