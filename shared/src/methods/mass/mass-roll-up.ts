import { MASS_OR_NONE } from '../bounds';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { EVERY } from '../vocabulary';

function terms(items: number, term: (index: number) => string): string {
  return Array.from({ length: items }, (_, index) => term(index + 1)).join(' + ');
}

/** Basic, predicted and total mass (kg) from items with growth allowances; propellant and payload get no growth. */
export const massRollUp: Method = defineMethod({
  id: 'mass-roll-up',
  version: '1.0.0',
  family: 'M15',
  name: 'Mass roll-up with growth allowance',
  summary: 'Basic, predicted and total mass from items with their growth allowances, propellant and payload apart.',
  equation: 'm = \\sum_i m_i (1 + g_i) + m_p + m_{pl}',
  inputs: {
    m_p: { tex: 'm_p', label: 'propellant mass', unit: 't', bounds: MASS_OR_NONE, default: 0 },
    m_pl: { tex: 'm_{pl}', label: 'payload mass', unit: 't', bounds: MASS_OR_NONE, default: 0 },
  },
  group: {
    name: 'items',
    label: 'mass items',
    ports: {
      mass: {
        tex: 'm',
        label: 'basic mass',
        unit: 't',
        bounds: { ...MASS_OR_NONE, reason: 'no negative mass is known' },
      },
      growth: {
        tex: 'g',
        label: 'growth allowance',
        unit: '%',
        bounds: { min: 0, reason: 'an allowance adds mass; take a saving out of the basic mass instead' },
      },
    },
    atLeast: 1,
    atMost: 60,
  },
  outputs: {
    m_basic: { tex: 'm_{basic}', label: 'basic dry mass', unit: 't' },
    m_pred: { tex: 'm_{pred}', label: 'predicted dry mass', unit: 't' },
    MGA: { tex: 'MGA', label: 'mass growth allowance of the whole', unit: '%' },
    m: { tex: 'm', label: 'total mass', unit: 't' },
  },
  proofFor: (items) => [
    line(
      'm_basic',
      'm_{basic}',
      terms(items, (i) => `mass_${i}`),
      'kg',
    ),
    line(
      'm_pred',
      'm_{pred}',
      terms(items, (i) => `mass_${i} * (1 + growth_${i})`),
      'kg',
    ),
    line('MGA', 'MGA', '(m_pred - m_basic) / m_basic', '1'),
    line('m', 'm', 'm_pred + m_p + m_pl', 'kg'),
  ],
  validity: 'Every item once; growth applied once to each item; propellant computed elsewhere and free of growth.',
  reference:
    'Terms of ANSI/AIAA S-120A-2015 (catalogue page seen); basic mass times one plus allowance is common practice.',
  cautions: [
    'Growth tables by category and maturity are the user’s data; do not add a system margin to items that already carry it.',
  ],
  concepts: EVERY,
  checks: ['M15-02'],
  solve({ m_p, m_pl }, { items, warn }) {
    const m_basic = items.reduce((sum, item) => sum + item.mass, 0);
    const growth = items.reduce((sum, item) => sum + item.mass * item.growth, 0);
    if (items.some((item) => item.growth > 1)) warn('A growth allowance is above 100 %.');
    const m_pred = m_basic + growth;
    return { m_basic, m_pred, MGA: m_basic > 0 ? growth / m_basic : 0, m: m_pred + m_p + m_pl };
  },
});

/** Mass growth allowance and the three margins in use, each named by its denominator, from limit, basic and predicted mass (kg). */
export const massMargins: Method = defineMethod({
  id: 'mass-margins',
  version: '1.0.0',
  family: 'M15',
  name: 'Mass margins by definition',
  summary: 'Growth allowance and the three margin definitions in use, each with its own denominator.',
  equation: 'M_A = \\frac{L - m_b}{L},\\quad M_B = \\frac{L - m_b}{m_b},\\quad M_C = \\frac{L - m_{pred}}{m_b}',
  inputs: {
    L: {
      tex: 'L',
      label: 'mass limit',
      unit: 't',
      bounds: { min: 0, minExclusive: true, reason: 'a mass limit is positive' },
    },
    m_b: {
      tex: 'm_b',
      label: 'basic mass',
      unit: 't',
      bounds: { min: 0, minExclusive: true, reason: 'a basic mass is positive' },
    },
    m_pred: {
      tex: 'm_{pred}',
      label: 'predicted mass',
      unit: 't',
      bounds: { min: 0, minExclusive: true, reason: 'a predicted mass is positive' },
    },
  },
  outputs: {
    MGA: { tex: 'MGA', label: 'growth allowance, (predicted − basic)/basic', unit: '%' },
    M_A: { tex: 'M_A', label: 'margin A, (limit − basic)/limit', unit: '%' },
    M_B: { tex: 'M_B', label: 'margin B, (limit − basic)/basic', unit: '%' },
    M_C: { tex: 'M_C', label: 'margin C, (limit − predicted)/basic', unit: '%' },
  },
  proof: [
    line('MGA', 'MGA', '(m_pred - m_b) / m_b', '1'),
    line('M_A', 'M_A', '(L - m_b) / L', '1'),
    line('M_B', 'M_B', '(L - m_b) / m_b', '1'),
    line('M_C', 'M_C', '(L - m_pred) / m_b', '1'),
  ],
  validity: 'All three masses of the same boundary and state.',
  reference:
    'A: JPL Design Principles; B: GSFC-STD-1000; C: ANSI/AIAA S-120A (definitions from memory, common practice).',
  cautions: ['Never mix definitions: print the name and the denominator with every margin.'],
  concepts: EVERY,
  checks: ['M15-04', 'M15-06'],
  solve({ L, m_b, m_pred }, { warn }) {
    if (m_pred < m_b) warn('The predicted mass is below the basic mass: the growth allowance comes out negative.');
    return { MGA: (m_pred - m_b) / m_b, M_A: (L - m_b) / L, M_B: (L - m_b) / m_b, M_C: (L - m_pred) / m_b };
  },
});
