/** A physical constant or nominal value, in SI, with where it comes from. */
export interface Constant {
  /** Permanent identifier; the same text as the symbol. */
  readonly id: string;
  /** Name as formulas write it, such as g_0. */
  readonly symbol: string;
  readonly tex: string;
  readonly name: string;
  /** In SI. */
  readonly value: number;
  /** Coherent SI unit text. */
  readonly unit: string;
  /** Standard uncertainty in SI; 0 for a value that is exact by definition or nominal. */
  readonly uncertainty: number;
  readonly source: string;
}

/** Changes whenever a value, an uncertainty or the list changes; stored with every baseline. */
export const CONSTANTS_VERSION = '2022.1';

const CODATA = 'CODATA 2022 (Mohr, Newell, Taylor, Tiesinga; NIST, May 2024)';
const EXACT = `${CODATA}, exact by the definition of the SI`;
const NOMINAL = 'IAU 2015 Resolution B3, nominal value';
const PDG = 'Particle Data Group, Review of Particle Physics 2022, from memory';

type Row = [
  symbol: string,
  tex: string,
  name: string,
  value: number,
  unit: string,
  uncertainty: number,
  source: string,
];

/** One electronvolt in joules, exact; the pion rest energies are published in MeV. */
const MEV = 1.602_176_634e-13;

const ROWS: readonly Row[] = [
  ['c', 'c', 'speed of light in vacuum', 299_792_458, 'm/s', 0, EXACT],
  ['g_0', 'g_0', 'standard gravity', 9.806_65, 'm/s^2', 0, '3rd CGPM (1901), exact by convention; also in CODATA 2022'],
  ['G', 'G', 'Newtonian constant of gravitation', 6.674_30e-11, 'm^3/(kg s^2)', 1.5e-15, CODATA],
  ['h_P', 'h', 'Planck constant', 6.626_070_15e-34, 'J s', 0, EXACT],
  ['k_B', 'k_B', 'Boltzmann constant', 1.380_649e-23, 'J/K', 0, EXACT],
  ['N_A', 'N_A', 'Avogadro constant', 6.022_140_76e23, '1/mol', 0, EXACT],
  ['R_gas', 'R', 'molar gas constant', 8.314_462_618_153_24, 'J/(mol K)', 0, `${EXACT} (N_A k_B)`],
  [
    'sigma',
    '\\sigma',
    'Stefan-Boltzmann constant',
    5.670_374_419_184_43e-8,
    'W/(m^2 K^4)',
    0,
    `${EXACT} (2 π⁵ k_B⁴/(15 h³ c²), rounded)`,
  ],
  ['q_e', 'e', 'elementary charge', 1.602_176_634e-19, 'C', 0, EXACT],
  ['mu_0', '\\mu_0', 'vacuum magnetic permeability', 1.256_637_061_27e-6, 'H/m', 2.0e-16, CODATA],
  ['epsilon_0', '\\varepsilon_0', 'vacuum electric permittivity', 8.854_187_8188e-12, 'F/m', 1.4e-21, CODATA],
  ['m_u', 'm_u', 'atomic mass constant', 1.660_539_068_92e-27, 'kg', 5.2e-37, CODATA],
  ['m_proton', 'm_{\\mathrm{p}}', 'proton mass', 1.672_621_925_95e-27, 'kg', 5.2e-37, CODATA],
  ['m_neutron', 'm_{\\mathrm{n}}', 'neutron mass', 1.674_927_500_56e-27, 'kg', 8.5e-37, CODATA],
  ['m_electron', 'm_{\\mathrm{e}}', 'electron mass', 9.109_383_7139e-31, 'kg', 2.8e-40, CODATA],
  ['E_proton', 'm_{\\mathrm{p}} c^2', 'proton rest energy', 1.503_277_618_02e-10, 'J', 4.7e-20, CODATA],
  ['E_neutron', 'm_{\\mathrm{n}} c^2', 'neutron rest energy', 1.505_349_765_14e-10, 'J', 7.6e-20, CODATA],
  ['E_electron', 'm_{\\mathrm{e}} c^2', 'electron rest energy', 8.187_105_788e-14, 'J', 2.6e-23, CODATA],
  [
    'E_pion_charged',
    'm_{\\pi^{\\pm}} c^2',
    'charged pion rest energy, 139.57039 MeV',
    139.570_39 * MEV,
    'J',
    0.000_18 * MEV,
    PDG,
  ],
  [
    'E_pion_neutral',
    'm_{\\pi^0} c^2',
    'neutral pion rest energy, 134.9768 MeV',
    134.9768 * MEV,
    'J',
    0.0005 * MEV,
    PDG,
  ],
  ['S_sun', 'S_\\odot', 'total solar irradiance at 1 au', 1361, 'W/m^2', 0, NOMINAL],
  ['L_sun', 'L_\\odot', 'solar luminosity', 3.828e26, 'W', 0, NOMINAL],
  ['R_sun', 'R_\\odot', 'solar radius', 6.957e8, 'm', 0, NOMINAL],
  ['GM_sun', 'GM_\\odot', 'solar mass parameter', 1.327_1244e20, 'm^3/s^2', 0, NOMINAL],
  ['T_sun', 'T_\\odot', 'solar effective temperature', 5772, 'K', 0, NOMINAL],
  [
    'GM_earth',
    'GM_\\oplus',
    'geocentric gravitational constant',
    3.986_004_418e14,
    'm^3/s^2',
    8e5,
    'IERS Conventions (2010), table 1.1, TCG-compatible',
  ],
  [
    'GM_saturn',
    'GM_{\\mathrm{Saturn}}',
    'gravitational parameter of Saturn without its moons',
    3.793_120_623_436_167e16,
    'm^3/s^2',
    1.3e9,
    'JPL NAIF gm_de440.tpc, BODY699_GM (Park et al. 2021, AJ 161:105); uncertainty: its difference from the DE431 value',
  ],
  ['au', '\\mathrm{au}', 'astronomical unit', 149_597_870_700, 'm', 0, 'IAU 2012 Resolution B2, exact'],
  ['ly', '\\mathrm{ly}', 'light-year', 9_460_730_472_580_800, 'm', 0, 'IAU: c × Julian year, exact'],
  [
    'yr_Julian',
    'a_{\\mathrm{J}}',
    'Julian year',
    31_557_600,
    's',
    0,
    'IAU Style Manual 1989: 365.25 d of 86 400 s, exact',
  ],
];

/** The one set of constants of the product, CODATA 2022 and IAU 2015. */
export const CONSTANTS: readonly Constant[] = Object.freeze(
  ROWS.map(([symbol, tex, name, value, unit, uncertainty, source]) =>
    Object.freeze({ id: symbol, symbol, tex, name, value, unit, uncertainty, source }),
  ),
);

const byId = new Map(CONSTANTS.map((constant) => [constant.id, constant]));

/** Finds a constant by its identifier. */
export function constantById(id: string): Constant | undefined {
  return byId.get(id);
}
