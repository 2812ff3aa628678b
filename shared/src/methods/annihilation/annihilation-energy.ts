import { EXTENT, MASS } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line } from '../define';
import type { Method } from '../types';
import { ANNIHILATION, REACTOR_CAUTION, SHIELDING_CAUTION } from '../vocabulary';

/** Energy per mass of TNT, J/kg, by convention. */
const TNT = 4.184e6;
const MASS_CAUTION =
  'Say which mass is meant: antimatter alone releases 2c² per kilogram, antimatter with its partner matter c².';

const shareBounds = { min: 0, max: 1, reason: 'a share of the power' };

/** Energy (J) from the annihilation of a mass of antimatter (kg) with as much matter: 2mc². */
export const annihilationEnergy: Method = defineMethod({
  id: 'annihilation-energy',
  version: '1.0.0',
  family: 'M9',
  name: 'Annihilation energy of antimatter',
  summary: 'Energy released when a mass of antimatter meets as much matter.',
  equation: 'E = 2 m_a c^2',
  inputs: {
    m_a: { tex: 'm_a', label: 'mass of antimatter alone', unit: 'kg', bounds: MASS },
    q_TNT: { tex: 'q_{TNT}', label: 'energy per mass of TNT', unit: 'MJ/kg', bounds: EXTENT, default: TNT },
  },
  outputs: {
    m: { tex: 'm', label: 'mass annihilated, both partners', unit: 'kg' },
    E: { tex: 'E', label: 'energy released', unit: 'J' },
    m_TNT: { tex: 'm_{TNT}', label: 'equivalent mass of TNT', unit: 't' },
  },
  proof: [line('m', 'm', '2 * m_a', 'kg'), line('E', 'E', 'm * c^2', 'J'), line('m_TNT', 'm_{TNT}', 'E / q_TNT', 'kg')],
  constants: constantIds('c'),
  validity: 'Annihilation at rest, complete.',
  reference: 'Mass-energy equivalence; TNT convention 4.184 GJ per tonne.',
  cautions: [MASS_CAUTION, REACTOR_CAUTION],
  concepts: [ANNIHILATION],
  checks: ['M9-01', 'M9-14'],
  solve({ m_a, q_TNT }) {
    const E = 2 * m_a * c ** 2;
    return { m: 2 * m_a, E, m_TNT: E / q_TNT };
  },
});

/** Mean power (W) over a time (s) from the annihilation of a total mass (kg), with its gamma and absorbed shares. */
export const annihilationPower: Method = defineMethod({
  id: 'annihilation-power',
  version: '1.0.0',
  family: 'M9',
  name: 'Mean annihilation power and its shares',
  summary:
    'Power released on average over the time of thrust, the share that leaves as gammas and the part the structure absorbs.',
  equation: 'P = \\frac{m c^2}{t},\\quad P_{abs} = f_{abs} f_\\gamma P',
  inputs: {
    m: { tex: 'm', label: 'mass annihilated, both partners', unit: 't', bounds: MASS },
    t: { tex: 't', label: 'time over which it is released', unit: 'yr', bounds: EXTENT },
    f_g: { tex: 'f_\\gamma', label: 'share released as gammas', unit: '%', bounds: shareBounds },
    f_abs: { tex: 'f_{abs}', label: 'share of the gammas that the structure absorbs', unit: '%', bounds: shareBounds },
  },
  outputs: {
    E: { tex: 'E', label: 'energy released', unit: 'J' },
    P: { tex: 'P', label: 'mean power released', unit: 'TW' },
    P_g: { tex: 'P_\\gamma', label: 'mean gamma power', unit: 'TW' },
    P_abs: { tex: 'P_{abs}', label: 'mean power absorbed by the structure', unit: 'GW' },
  },
  proof: [
    line('E', 'E', 'm * c^2', 'J'),
    line('P', 'P', 'E / t', 'W'),
    line('P_g', 'P_\\gamma', 'f_g * P', 'W'),
    line('P_abs', 'P_{abs}', 'f_abs * P_g', 'W'),
  ],
  constants: constantIds('c'),
  validity: 'Mean over the time of thrust; annihilation complete. The gamma share is data with its own source.',
  reference:
    'Mass-energy equivalence. Proton–antiproton at rest gives about 38 % of its energy to neutral pions and so to gammas (balance of mean multiplicities, from memory; “about one third” is often quoted).',
  cautions: [MASS_CAUTION, SHIELDING_CAUTION],
  concepts: [ANNIHILATION],
  checks: [],
  solve({ m, t, f_g, f_abs }) {
    const E = m * c ** 2;
    const P = E / t;
    return { E, P, P_g: f_g * P, P_abs: f_abs * f_g * P };
  },
});
