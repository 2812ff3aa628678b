import { EXTENT, MASS } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line, refuse } from '../define';
import type { Method } from '../types';
import { FUSION, REACTOR_CAUTION, SHIELDING_CAUTION } from '../vocabulary';
import { REST_ENERGY, REST_ENERGY_SOURCE, type Nuclide } from './rest-energies';

const NAMES: Readonly<Record<Nuclide, string>> = {
  n: 'neutron',
  p: 'proton',
  d: 'deuteron',
  t: 'triton',
  h: 'helion',
  alpha: 'alpha particle',
};

interface Reaction {
  id: string;
  name: string;
  tex: string;
  reactants: readonly [Nuclide, Nuclide];
  products: readonly [Nuclide, Nuclide];
  checks: readonly string[];
}

function restEnergy(subscript: number, nuclide: Nuclide) {
  return {
    tex: `E_${subscript}`,
    label: `rest energy of the ${NAMES[nuclide]}`,
    unit: 'MeV',
    bounds: { ...MASS, reason: 'rest energies are positive' },
    default: REST_ENERGY[nuclide],
  };
}

/** A two-body fusion reaction: energy released, energy per fuel mass (J/kg), product energies at zero temperature. */
function reactionMethod({ id, name, tex, reactants, products, checks }: Reaction): Method {
  return defineMethod({
    id,
    version: '1.0.0',
    family: 'M10',
    name: `Fusion energy of ${name}`,
    summary: `Energy released by ${name} fusion, per reaction and per mass of fuel, and how the two products share it.`,
    equation: `${tex}:\\; Q = (m_1 + m_2 - m_3 - m_4) c^2,\\quad q = \\frac{Q}{m_1 + m_2}`,
    inputs: {
      m: { tex: 'm', label: 'mass of fuel burned', unit: 'kg', bounds: EXTENT, default: 1 },
      E_1: restEnergy(1, reactants[0]),
      E_2: restEnergy(2, reactants[1]),
      E_3: restEnergy(3, products[0]),
      E_4: restEnergy(4, products[1]),
    },
    outputs: {
      Q: { tex: 'Q', label: 'energy per reaction', unit: 'MeV' },
      f: { tex: 'f', label: 'share of the fuel mass released', unit: '1' },
      q: { tex: 'q', label: 'energy per mass of fuel', unit: 'J/kg' },
      K_3: { tex: 'K_3', label: `kinetic energy of the ${NAMES[products[0]]}`, unit: 'MeV' },
      K_4: { tex: 'K_4', label: `kinetic energy of the ${NAMES[products[1]]}`, unit: 'MeV' },
      E: { tex: 'E', label: 'energy from the fuel burned', unit: 'J' },
    },
    proof: [
      line('E_M', 'E_M', 'E_1 + E_2', 'J'),
      line('Q', 'Q', 'E_M - E_3 - E_4', 'J'),
      line('f', 'f', 'Q / E_M', '1'),
      line('q', 'q', 'f * c^2', 'J/kg'),
      line('K_3', 'K_3', 'Q * (Q + 2 * E_4) / (2 * E_M)', 'J'),
      line('K_4', 'K_4', 'Q * (Q + 2 * E_3) / (2 * E_M)', 'J'),
      line('E', 'E', 'q * m', 'J'),
    ],
    constants: constantIds('c'),
    validity: 'Reactants at rest (zero temperature), no side reactions.',
    reference: `Energy and momentum balance; ${REST_ENERGY_SOURCE}; NRL Plasma Formulary (from memory).`,
    cautions: [
      'Neutrons and X-rays leave as waste heat and radiation, not as thrust.',
      REACTOR_CAUTION,
      SHIELDING_CAUTION,
    ],
    concepts: [FUSION],
    checks,
    solve({ m, E_1, E_2, E_3, E_4 }) {
      const E_M = E_1 + E_2;
      const Q = E_M - E_3 - E_4;
      if (Q <= 0)
        return refuse('E_3', 'The products have at least the rest energy of the reactants: no energy is released.');
      // K_3 = (M² + m_3² − m_4²)/(2M) − m_3 factored through Q, which keeps all digits.
      const K_3 = (Q * (Q + 2 * E_4)) / (2 * E_M);
      const K_4 = (Q * (Q + 2 * E_3)) / (2 * E_M);
      const f = Q / E_M;
      return { Q, f, q: f * c ** 2, K_3, K_4, E: f * c ** 2 * m };
    },
  });
}

export const deuteriumTritium: Method = reactionMethod({
  id: 'fusion-energy-d-t',
  name: 'deuterium–tritium',
  tex: '\\mathrm{D + T \\to {}^4He + n}',
  reactants: ['d', 't'],
  products: ['alpha', 'n'],
  checks: ['M10-01', 'M10-05', 'M10-08'],
});
export const deuteriumHelium3: Method = reactionMethod({
  id: 'fusion-energy-d-he3',
  name: 'deuterium–helium-3',
  tex: '\\mathrm{D + {}^3He \\to {}^4He + p}',
  reactants: ['d', 'h'],
  products: ['alpha', 'p'],
  checks: ['M10-09'],
});
export const deuteriumNeutronBranch: Method = reactionMethod({
  id: 'fusion-energy-d-d-n',
  name: 'deuterium–deuterium, neutron branch',
  tex: '\\mathrm{D + D \\to {}^3He + n}',
  reactants: ['d', 'd'],
  products: ['h', 'n'],
  checks: ['M10-03'],
});
export const deuteriumProtonBranch: Method = reactionMethod({
  id: 'fusion-energy-d-d-p',
  name: 'deuterium–deuterium, proton branch',
  tex: '\\mathrm{D + D \\to T + p}',
  reactants: ['d', 'd'],
  products: ['t', 'p'],
  checks: [],
});

/** Energy per fuel mass (J/kg) of a reaction whose energy and reactant masses (kg) are given as data. */
export const fuelSpecificEnergy: Method = defineMethod({
  id: 'fuel-specific-energy',
  version: '1.0.0',
  family: 'M10',
  name: 'Energy per fuel mass from reaction energy',
  summary:
    'Energy per mass of fuel of any reaction whose energy and reactant masses are known, such as p–¹¹B (8.7 MeV).',
  equation: 'q = \\frac{Q}{m_1 + m_2}',
  inputs: {
    Q: { tex: 'Q', label: 'energy per reaction', unit: 'MeV', bounds: EXTENT },
    m_1: { tex: 'm_1', label: 'mass of the first reactant', unit: 'u', bounds: MASS },
    m_2: { tex: 'm_2', label: 'mass of the second reactant', unit: 'u', bounds: MASS },
  },
  outputs: {
    q: { tex: 'q', label: 'energy per mass of fuel', unit: 'J/kg' },
    f: { tex: 'f', label: 'share of the fuel mass released', unit: '1' },
  },
  proof: [line('q', 'q', 'Q / (m_1 + m_2)', 'J/kg'), line('f', 'f', 'q / c^2', '1')],
  constants: constantIds('c'),
  validity: 'All reacting mass counted.',
  reference: 'Mass-energy balance.',
  cautions: [REACTOR_CAUTION],
  concepts: [FUSION],
  checks: [],
  solve({ Q, m_1, m_2 }) {
    const q = Q / (m_1 + m_2);
    if (q > c ** 2)
      return refuse(
        'Q',
        'The reaction energy exceeds the rest energy of the reactants; give the energy of one reaction.',
      );
    return { q, f: q / c ** 2 };
  },
});
