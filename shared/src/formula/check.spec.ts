import { parseUnit, type TemperatureKind } from '@shared/units';
import type { Formula } from './ast';
import { checkFormula, type Typed } from './check';
import { parseFormula } from './parse';

function typed(unit: string, temperature?: TemperatureKind): Typed {
  const result = parseUnit(unit);
  if (!result.ok) throw new Error(result.message);
  return { dimension: result.unit.dimension, temperature };
}

function formula(text: string): Formula {
  const result = parseFormula(text);
  if (!result.ok) throw new Error(result.error.message);
  return result.formula;
}

const SCOPE: ReadonlyMap<string, Typed> = new Map([
  ['F', typed('N')],
  ['m', typed('kg')],
  ['t', typed('s')],
  ['v', typed('m/s')],
  ['P', typed('W')],
  ['A', typed('m^2')],
  ['I_sp', typed('s')],
  ['g_0', typed('m/s^2')],
  ['R', typed('1')],
  ['phi', typed('deg')],
  ['sigma', typed('W/(m^2 K^4)')],
  ['T_1', typed('K', 'absolute')],
  ['T_2', typed('K', 'absolute')],
  ['dT', typed('K', 'difference')],
  ['tau', typed('K')],
]);

const check = (text: string) => checkFormula(formula(text), SCOPE);

describe('checkFormula: results', () => {
  it.each([
    ['I_sp * g_0 * log(R)', 'm/s'],
    ['(P / (0.9 * sigma * A))^(1/4)', 'K'],
    ['sqrt(P / m * t)', 'm/s'],
    ['cbrt(A^(3/2))', 'm'],
    ['A^0.5', 'm'],
    ['A^-0.5 * 1', '1/m'],
    ['R^(R + 1)', '1'],
    ['m * v^2 / 2', 'J'],
    ['hypot(v, v, v)', 'm/s'],
    ['abs(F) + min(F, 2*F, 0)', 'N'],
    ['atan2(F, 2*F) + sin(phi)', '1'],
    ['sign(F) * m', 'kg'],
    ['F > 0 ? F : 0', 'N'],
    ['R > 1 ? 0 : F', 'N'],
    ['0 + F - 0', 'N'],
    ['(F > 0) * m', 'kg'],
    ['F / m == g_0 ? 1 : 0', '1'],
    ['0', '1'],
  ])('%s is in %s', (text, unit) => {
    expect(check(text)).toEqual({ ok: true, type: { dimension: typed(unit).dimension } });
  });
});

describe('checkFormula: refusals name the place and both dimensions', () => {
  it.each([
    ['F + m', 'dimension', 'F + m', 'adds a mass (kg) to a force (N)'],
    ['R * (F - t)', 'dimension', '(F - t)', 'subtracts a time (s) from a force (N)'],
    ['F + 1', 'dimension', 'F + 1', 'adds a plain number to a force (N)'],
    ['F < m ? 1 : 2', 'dimension', 'F < m', 'compares a force (N) with a mass (kg)'],
    ['R > 1 ? F : m', 'dimension', 'R > 1 ? F : m', 'gives a force (N) or a mass (kg)'],
    ['F ? 1 : 2', 'dimension', 'F', 'a force (N)'],
    ['log(m / t * 2)', 'dimension', 'm / t * 2', 'log takes a plain number'],
    ['exp(v)', 'dimension', 'v', 'exp takes a plain number'],
    ['sin(t)', 'dimension', 't', 'a time (s)'],
    ['floor(F)', 'dimension', 'F', 'floor takes a plain number'],
    ['min(F, m)', 'dimension', 'min(F, m)', 'not a force (N) and a mass (kg)'],
    ['atan2(F, m)', 'dimension', 'atan2(F, m)', 'not a force (N) and a mass (kg)'],
    ['2^t', 'dimension', 't', 'exponent'],
    ['m^R', 'exponent', 'R', 'a mass (kg)'],
    ['m^(1/97)', 'exponent', '(1/97)', 'simple fraction'],
    ['m^1e6', 'exponent', 'm^1e6', 'exponents beyond'],
    ['1 + x', 'undeclared-name', 'x', 'x is not declared'],
    ['1 + constant_c', 'undeclared-name', 'constant_c', 'declared names are F, m'],
  ])('%s', (text, code, marked, words) => {
    const result = check(text);
    if (result.ok) throw new Error('accepted');
    expect(result.error.code).toBe(code);
    expect(result.error.message).toContain(words);
    expect(text.slice(result.error.from, result.error.to)).toBe(marked);
  });
});

describe('checkFormula: temperatures', () => {
  const kelvin = typed('K').dimension;
  it.each([
    ['T_1 - T_2', 'difference'],
    ['T_1 + dT', 'absolute'],
    ['dT + T_1', 'absolute'],
    ['T_1 - dT', 'absolute'],
    ['dT + dT', 'difference'],
    ['-T_1 + T_2', 'difference'],
    ['0 - T_1 + T_2', 'difference'],
    ['T_1 + (T_2 - T_1) / 2', 'absolute'],
    ['2 * dT', 'difference'],
    ['max(T_1, T_2)', 'absolute'],
    ['R > 1 ? T_1 : T_2', 'absolute'],
    ['2 * T_1', undefined],
    ['(T_1^4 + T_2^4)^(1/4)', undefined],
    ['T_1 * R + T_2 * R', undefined],
  ])('%s is %s', (text, temperature) => {
    expect(check(text)).toEqual({
      ok: true,
      type: temperature ? { dimension: kelvin, temperature } : { dimension: kelvin },
    });
  });

  it.each([
    ['T_1 + T_2', 'adds two absolute temperatures'],
    ['dT - T_1', 'subtracts an absolute temperature from a temperature difference'],
    ['R > 1 ? T_1 : dT', 'an absolute temperature or a temperature difference'],
    ['T_1 < dT', 'compares an absolute temperature with a temperature difference'],
    ['min(T_1, dT)', 'not an absolute temperature and a temperature difference'],
  ])('%s is refused', (text, words) => {
    const result = check(text);
    if (result.ok) throw new Error('accepted');
    expect(result.error.code).toBe('temperature');
    expect(result.error.message).toContain(words);
  });
});
