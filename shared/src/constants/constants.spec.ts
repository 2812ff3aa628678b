import { all, create, type Unit as MathUnit } from 'mathjs';
import { parseUnit, unitOf } from '@shared/units';
import { CONSTANTS, CONSTANTS_VERSION, constantById } from '.';

function valueOf(id: string): number {
  const constant = constantById(id);
  if (!constant) throw new Error(`There is no constant ${id}.`);
  return constant.value;
}

/** The constants of mathjs are properties of an instance, each a value with a unit. */
const mathjs = create(all ?? {}) as unknown as Readonly<Record<string, MathUnit | undefined>>;

const differenceOf = (actual: number, expected: number): number => Math.abs(actual / expected - 1);

describe('the table of constants', () => {
  it('has one version, unique ids that formulas can use as names, coherent SI units and a source each', () => {
    expect(CONSTANTS_VERSION).toMatch(/^2022\.\d+$/);
    expect(new Set(CONSTANTS.map((constant) => constant.id)).size).toBe(CONSTANTS.length);
    for (const constant of CONSTANTS) {
      const unit = parseUnit(constant.unit);
      expect([constant.id, unit.ok && unit.unit.factor]).toEqual([constant.id, 1]);
      expect(constant.symbol).toMatch(/^[A-Za-z][A-Za-z0-9_]*$/);
      expect(constant.source).not.toBe('');
      expect(constant.value).toBeGreaterThan(0);
      expect(constant.uncertainty).toBeGreaterThanOrEqual(0);
      expect(constantById(constant.id)).toBe(constant);
    }
    expect(constantById('nothing')).toBeUndefined();
  });

  /** Printed by scipy.constants.physical_constants of SciPy 1.17.1, which carries the CODATA 2022 table: exact match. */
  it.each([
    ['G', 6.6743e-11, 1.5e-15],
    ['h_P', 6.62607015e-34, 0],
    ['k_B', 1.380649e-23, 0],
    ['N_A', 6.02214076e23, 0],
    ['q_e', 1.602176634e-19, 0],
    ['mu_0', 1.25663706127e-6, 2e-16],
    ['epsilon_0', 8.8541878188e-12, 1.4e-21],
    ['m_u', 1.66053906892e-27, 5.2e-37],
    ['m_proton', 1.67262192595e-27, 5.2e-37],
    ['m_neutron', 1.67492750056e-27, 8.5e-37],
    ['m_electron', 9.1093837139e-31, 2.8e-40],
    ['E_proton', 1.50327761802e-10, 4.7e-20],
    ['E_neutron', 1.50534976514e-10, 7.6e-20],
    ['E_electron', 8.187105788e-14, 2.6e-23],
  ])('holds the CODATA 2022 value of %s', (id, value, uncertainty) => {
    expect(constantById(id)).toMatchObject({ value, uncertainty });
  });

  /** mathjs carries CODATA 2018; its neutron mass is of an older adjustment. */
  it.each([
    ['c', 'speedOfLight', 0],
    ['g_0', 'gravity', 0],
    ['G', 'gravitationConstant', 1e-15],
    ['h_P', 'planckConstant', 1e-15],
    ['k_B', 'boltzmann', 1e-15],
    ['N_A', 'avogadro', 1e-15],
    ['R_gas', 'gasConstant', 1e-15],
    ['sigma', 'stefanBoltzmann', 1e-14],
    ['q_e', 'elementaryCharge', 1e-15],
    ['mu_0', 'magneticConstant', 1e-9],
    ['epsilon_0', 'electricConstant', 1e-9],
    ['m_u', 'atomicMass', 2e-9],
    ['m_proton', 'protonMass', 2e-9],
    ['m_neutron', 'neutronMass', 3e-7],
    ['m_electron', 'electronMass', 2e-9],
  ])('agrees on %s with mathjs within the change between adjustments', (id, name, relative) => {
    const expected = mathjs[name]?.toNumber(constantById(id)?.unit.replace('1/mol', 'mol^-1') ?? '') ?? NaN;
    expect(differenceOf(valueOf(id), expected)).toBeLessThanOrEqual(relative);
  });

  it('is consistent with the relations that define its exact values', () => {
    const { PI } = Math;
    const sigma = (2 * PI ** 5 * valueOf('k_B') ** 4) / (15 * valueOf('h_P') ** 3 * valueOf('c') ** 2);
    expect(differenceOf(valueOf('sigma'), sigma)).toBeLessThanOrEqual(1e-14);
    expect(differenceOf(valueOf('R_gas'), valueOf('N_A') * valueOf('k_B'))).toBeLessThanOrEqual(1e-15);
    // μ0 ε0 c² = 1 and E = m c², both to the digits published.
    expect(differenceOf(valueOf('mu_0') * valueOf('epsilon_0') * valueOf('c') ** 2, 1)).toBeLessThanOrEqual(2e-11);
    for (const particle of ['proton', 'neutron', 'electron']) {
      expect(differenceOf(valueOf(`E_${particle}`), valueOf(`m_${particle}`) * valueOf('c') ** 2)).toBeLessThanOrEqual(
        2e-11,
      );
    }
    expect(valueOf('ly')).toBe(valueOf('c') * valueOf('yr_Julian'));
  });

  it('is consistent with the nominal solar values of IAU 2015 B3', () => {
    // L = 4 π R² σ T⁴ to the rounding of T (5772 K ± 0.5 K: 4 × 0.5/5772 = 3.5e-4) and S = L/(4 π au²) to that of S (0.5/1361).
    const luminosity = 4 * Math.PI * valueOf('R_sun') ** 2 * valueOf('sigma') * valueOf('T_sun') ** 4;
    expect(differenceOf(luminosity, valueOf('L_sun'))).toBeLessThanOrEqual(3.5e-4);
    expect(differenceOf(valueOf('L_sun') / (4 * Math.PI * valueOf('au') ** 2), valueOf('S_sun'))).toBeLessThanOrEqual(
      4e-4,
    );
    // IAU 2009 best estimate 1.32712440018e20 rounds to the nominal value.
    expect(differenceOf(valueOf('GM_sun'), 1.327_124_400_18e20)).toBeLessThanOrEqual(1e-9);
  });

  it('has the values that the unit table uses', () => {
    expect(unitOf('c').factor).toBe(valueOf('c'));
    expect(unitOf('g0').factor).toBe(valueOf('g_0'));
    expect(unitOf('u').factor).toBe(valueOf('m_u'));
    expect(unitOf('eV').factor).toBe(valueOf('q_e'));
    expect(unitOf('au').factor).toBe(valueOf('au'));
    expect(unitOf('ly').factor).toBe(valueOf('ly'));
    expect(unitOf('yr').factor).toBe(valueOf('yr_Julian'));
  });
});
