import { c, constantIds } from '../constants';
import { defineMethod, line, refuse } from '../define';
import type { Method } from '../types';
import { ANNIHILATION, FUSION } from '../vocabulary';

const fraction = { min: 0, max: 1, reason: 'a share of the fuel mass-energy' };

/** Effective exhaust speed (m/s) from the energy and rest mass that leave with the jet per fuel mass-energy. */
export const exhaustWithLosses: Method = defineMethod({
  id: 'exhaust-with-losses',
  version: '1.0.0',
  family: 'M2',
  name: 'Exhaust with losses',
  summary:
    'Effective exhaust speed when only a share of the fuel energy leaves as a jet, and the waste that goes with it.',
  equation: 'w = \\eta_n\\, c\\,\\sqrt{e^2 - r^2},\\quad \\frac{P_w}{P_j} = \\frac{1 - e}{e}',
  inputs: {
    e_j: {
      tex: 'e',
      label: 'share of the fuel mass-energy that leaves with the collimated jet',
      unit: '1',
      bounds: { ...fraction, minExclusive: true },
    },
    r_j: { tex: 'r', label: 'share that is rest mass of the jet', unit: '1', bounds: fraction },
    eta_n: {
      tex: '\\eta_n',
      label: 'collimation, mean cosine to the axis',
      unit: '1',
      bounds: { min: 0, minExclusive: true, max: 1, reason: 'a mean cosine of a jet that pushes' },
    },
  },
  outputs: {
    w: { tex: 'w', label: 'effective exhaust speed', unit: 'c' },
    v_x: { tex: 'v_x', label: 'speed of the exhaust particles', unit: 'c' },
    s_w: { tex: 'P_w/P_j', label: 'waste over jet energy', unit: '1' },
  },
  proof: [
    line('p_j', 'p', 'sqrt((e_j - r_j) * (e_j + r_j))', '1'),
    line('w', 'w', 'eta_n * p_j * c', 'm/s'),
    line('v_x', 'v_x', 'p_j / e_j * c', 'm/s'),
    line('s_w', 'P_w/P_j', '(1 - e_j) / e_j', '1'),
  ],
  constants: constantIds('c'),
  validity:
    'One kind of exhaust; what is not jet leaves without net momentum in the ship frame, escaping or radiated after the ship absorbed it.',
  reference:
    'Momentum of the exhaust per fuel mass-energy; reproduces the number in the abstract of S. Westmoreland, Acta Astronautica 67 (2010) 1248, arXiv:0910.1965.',
  cautions: [
    'The speed of the exhaust particles is not the effective exhaust speed.',
    'Waste that the ship absorbs has to be radiated: check the radiators.',
  ],
  concepts: [ANNIHILATION, FUSION],
  checks: [],
  solve({ e_j, r_j, eta_n }) {
    if (r_j > e_j) {
      return refuse(
        'r_j',
        `The rest-mass share ${r_j} is above the energy share ${e_j}; the energy of the jet includes its rest mass.`,
      );
    }
    const p_j = Math.sqrt((e_j - r_j) * (e_j + r_j));
    const w = eta_n * p_j * c;
    if (w === 0)
      return refuse(
        'r_j',
        'The jet has no energy beyond its rest mass and gives no thrust; lower the rest-mass share.',
      );
    return { w, v_x: (p_j / e_j) * c, s_w: (1 - e_j) / e_j };
  },
});
