import { ATTENUATION, EXTENT, EXTENT_OR_NONE, MASS } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ANNIHILATION, FUSION, NUCLEAR_ELECTRIC, NUCLEAR_THERMAL, SHIELDING_CAUTION } from '../vocabulary';

/** Power (W) that a shield absorbs from gammas and its heating rate (K/s) with nothing carried away, first interactions. */
export const shieldHeating: Method = defineMethod({
  id: 'shield-heating',
  version: '1.0.0',
  family: 'M9',
  name: 'Shield heating by gammas',
  summary: 'Power deposited in a shield and how fast it warms up when nothing cools it.',
  equation: 'P_d = P_\\gamma\\left(1 - e^{-\\mu_{en} x}\\right),\\quad \\dot T = \\frac{P_d}{m c_p}',
  inputs: {
    P_g: { tex: 'P_\\gamma', label: 'gamma power onto the shield', unit: 'MW', bounds: EXTENT_OR_NONE },
    mu_en: { tex: '\\mu_{en}', label: 'energy-absorption coefficient', unit: '1/m', bounds: ATTENUATION },
    x: { tex: 'x', label: 'shield thickness', unit: 'm', bounds: EXTENT_OR_NONE },
    m: { tex: 'm', label: 'shield mass that takes the heat', unit: 'kg', bounds: MASS },
    c_p: { tex: 'c_p', label: 'specific heat capacity', unit: 'J/(kg K)', bounds: EXTENT },
  },
  outputs: {
    s: { tex: 's', label: 'share deposited', unit: '1' },
    P_d: { tex: 'P_d', label: 'power deposited', unit: 'MW' },
    Tdot: { tex: '\\dot T', label: 'heating rate', unit: 'K/s', temperature: 'difference' },
  },
  proof: [
    line('s', 's', '-expm1(-mu_en * x)', '1'),
    line('P_d', 'P_d', 's * P_g', 'W'),
    line('Tdot', '\\dot T', 'P_d / (m * c_p)', 'K/s'),
  ],
  validity: 'First interactions with the energy-absorption coefficient; uniform temperature; no cooling.',
  reference: 'J. H. Hubbell and S. M. Seltzer, NIST SRD 126 (coefficients); energy balance.',
  cautions: [
    'A lower bound for thick shields with cascades; for containment take the whole gamma power.',
    SHIELDING_CAUTION,
  ],
  concepts: [ANNIHILATION, FUSION, NUCLEAR_THERMAL, NUCLEAR_ELECTRIC],
  checks: ['M9-12'],
  solve({ P_g, mu_en, x, m, c_p }) {
    const s = -Math.expm1(-mu_en * x);
    return { s, P_d: s * P_g, Tdot: (s * P_g) / (m * c_p) };
  },
});
