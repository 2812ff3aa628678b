import { EXTENT, MASS } from '../bounds';
import { c, constantIds } from '../constants';
import { defineMethod, line, refuse, show } from '../define';
import type { Method } from '../types';
import { ANNIHILATION, SHIELDING_CAUTION } from '../vocabulary';

/** One MeV in joules, exact. */
const MEV = 1.602176634e-13;

/** Shares of a proton–antiproton annihilation that go to charged pions and to gammas, and the pion decay length (m). */
export const annihilationSplit: Method = defineMethod({
  id: 'annihilation-split',
  version: '1.0.0',
  family: 'M9',
  name: 'Products of proton–antiproton annihilation',
  summary: 'How the annihilation energy splits between charged pions and gammas, and how far the pions fly.',
  equation: 'f_\\gamma = 1 - \\frac{n E_\\pi}{2 E_{\\mathrm p}},\\quad \\ell = \\frac{p}{m_\\pi}\\,\\tau',
  inputs: {
    n: {
      tex: 'n',
      label: 'mean number of charged pions',
      unit: '1',
      bounds: { min: 0, reason: 'a count' },
      default: 3,
    },
    E_pi: {
      tex: 'E_\\pi',
      label: 'mean total energy of a charged pion',
      unit: 'MeV',
      bounds: MASS,
      default: 389 * MEV,
    },
    m_pi: {
      tex: 'm_\\pi c^2',
      label: 'rest energy of the charged pion',
      unit: 'MeV',
      bounds: MASS,
      default: 139.57039 * MEV,
    },
    E_p: {
      tex: 'E_{\\mathrm p}',
      label: 'rest energy of the proton',
      unit: 'MeV',
      bounds: MASS,
      default: 938.27208816 * MEV,
    },
    tau: { tex: '\\tau', label: 'lifetime of the charged pion', unit: 'ns', bounds: EXTENT, default: 2.6033e-8 },
  },
  outputs: {
    E: { tex: 'E', label: 'annihilation energy at rest', unit: 'MeV' },
    f_ch: { tex: 'f_{ch}', label: 'share in charged pions', unit: '%' },
    f_k: { tex: 'f_k', label: 'share in kinetic energy of charged pions', unit: '%' },
    f_g: { tex: 'f_\\gamma', label: 'share in gammas from neutral pions', unit: '%' },
    l: { tex: '\\ell', label: 'mean decay length of charged pions', unit: 'm' },
  },
  proof: [
    line('E', 'E', '2 * E_p', 'J'),
    line('f_ch', 'f_{ch}', 'n * E_pi / E', '1'),
    line('f_k', 'f_k', 'n * (E_pi - m_pi) / E', '1'),
    line('f_g', 'f_\\gamma', '1 - f_ch', '1'),
    line('l', '\\ell', 'sqrt((E_pi / m_pi - 1) * (E_pi / m_pi + 1)) * c * tau', 'm'),
  ],
  constants: constantIds('c'),
  validity:
    'Annihilation at rest in free space; mean multiplicities and energies, which are data with their own source.',
  reference:
    'Means from R. L. Forward and R. H. Frisbee (from memory): 3 charged pions of 389 MeV and 2 neutral of 355 MeV; PDG pion mass and lifetime (from memory).',
  cautions: ['Literature often says “about one third” for the gammas; this balance gives 38 %.', SHIELDING_CAUTION],
  concepts: [ANNIHILATION],
  checks: ['M2-12', 'M9-02', 'M9-04', 'M9-13'],
  solve({ n, E_pi, m_pi, E_p, tau }) {
    const E = 2 * E_p;
    if (E_pi < m_pi) {
      return refuse(
        'E_pi',
        `The total energy of a pion ${show(E_pi, 'MeV')} is below its rest energy ${show(m_pi, 'MeV')}; it includes it.`,
      );
    }
    const f_ch = (n * E_pi) / E;
    if (f_ch > 1)
      return refuse(
        'n',
        `The charged pions would carry ${(f_ch * 100).toPrecision(3)} % of the energy; at most 100 % is there.`,
      );
    const ratio = E_pi / m_pi;
    return { E, f_ch, f_k: (n * (E_pi - m_pi)) / E, f_g: 1 - f_ch, l: Math.sqrt((ratio - 1) * (ratio + 1)) * c * tau };
  },
});
