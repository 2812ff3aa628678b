import type { Check } from './check';

const MARGINS = { L: 1000, m_b: 700, m_pred: 800 };

/** Family M15: mass roll-up and margins. */
export const MASS_CHECKS: readonly Check[] = [
  {
    id: 'M15-02',
    method: 'mass-roll-up',
    inputs: { mass_1: 100, growth_1: 0.05, mass_2: 50, growth_2: 0.1, mass_3: 200, growth_3: 0.2 },
    output: 'm_pred',
    expected: 400,
    tolerance: 1e-9,
    provenance: 'arithmetic',
    source: '100 × 1.05 + 50 × 1.10 + 200 × 1.20, category percentages of the Solar Orbiter EID-A (R-2656)',
  },
  {
    id: 'M15-04',
    method: 'mass-margins',
    inputs: MARGINS,
    output: 'M_A',
    expected: [30, '%'],
    tolerance: 1e-9,
    provenance: 'common-practice',
    source: 'Definition A, (limit − basic)/limit',
  },
  {
    id: 'M15-06',
    method: 'mass-margins',
    inputs: MARGINS,
    output: 'MGA',
    expected: [14.2857142857143, '%'],
    tolerance: 1e-9,
    provenance: 'common-practice',
    source: 'Terms of ANSI/AIAA S-120A, (predicted − basic)/basic',
  },
];
