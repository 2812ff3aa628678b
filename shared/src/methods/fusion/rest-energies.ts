/** One MeV in joules, exact. */
const MEV = 1.602176634e-13;

export type Nuclide = 'n' | 'p' | 'd' | 't' | 'h' | 'alpha';

export const REST_ENERGY_SOURCE = 'nuclear rest energies CODATA 2018 (P. Mohr et al.), from memory';

/** Nuclear rest energies, J, from CODATA 2018 values in MeV; CODATA 2022 differs by a few parts in 10⁹. */
export const REST_ENERGY: Readonly<Record<Nuclide, number>> = {
  n: 939.56542052 * MEV,
  p: 938.27208816 * MEV,
  d: 1875.61294257 * MEV,
  t: 2808.92113298 * MEV,
  h: 2808.39160743 * MEV,
  alpha: 3727.3794066 * MEV,
};
