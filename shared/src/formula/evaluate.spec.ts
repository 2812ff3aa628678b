import { evaluateFormula } from './evaluate';
import type { Outcome } from './outcome';
import { parseFormula } from './parse';

function evaluate(text: string, values: Record<string, number> = {}): Outcome {
  const result = parseFormula(text);
  if (!result.ok) throw new Error(`${text}: ${result.error.message}`);
  return evaluateFormula(result.formula, new Map(Object.entries(values)));
}

describe('evaluateFormula', () => {
  it.each<[string, number]>([
    ['2 + 3*4', 14],
    ['-2^2', -4],
    ['2^3^2', 512],
    ['2^-1', 0.5],
    ['7 / 2', 3.5],
    ['sqrt(2)^2 < 2.0000001', 1],
    ['1 < 2 < 3', 1],
    ['1 < 3 < 2', 0],
    ['2 > 1 ? 10 : 20', 10],
    ['0 ? 10 : 20', 20],
    ['hypot(3, 4)', 5],
    ['hypot(2, 3, 6)', 7],
    ['min(3, 1, 2) + max(3, 1, 2)', 4],
    ['atan2(0, -1) - acos(-1)', 0],
    ['cbrt(-8)', -2],
    ['round(2.5) + round(-2.5)', 0],
    ['round(-2.5)', -3],
    ['floor(-1.5)', -2],
    ['ceil(1.2)', 2],
    ['sign(-3)', -1],
    ['abs(-3)', 3],
    ['0^0', 1],
    ['(-2)^3', -8],
    ['log10(1000)', 3],
    ['log2(8)', 3],
    ['expm1(0) + log1p(0)', 0],
  ])('%s = %d', (text, expected) => {
    // Arithmetic by hand; 1e-15 covers one rounding of the library functions.
    const outcome = evaluate(text);
    expect(outcome.ok && Math.abs(outcome.value - expected) <= 1e-15 * Math.max(1, Math.abs(expected))).toBe(true);
  });

  it.each([
    ['sqrt(-1)', 'domain', 'square root of a negative number'],
    ['log(-1)', 'domain', 'logarithm of a negative number'],
    ['log(0)', 'domain', 'logarithm of zero'],
    ['exp(log(0))', 'domain', 'logarithm of zero'],
    ['(-8)^(1/3)', 'domain', 'a fractional power of a negative number'],
    ['1 / 0', 'division-by-zero', 'division by zero'],
    ['1 / (1 / 0)', 'division-by-zero', 'division by zero'],
    ['0 / 0', 'division-by-zero', 'division by zero'],
    ['0^-1', 'division-by-zero', 'zero raised to a negative power'],
    ['exp(1000)', 'overflow', 'a value too large to be computed with'],
    ['atan(1e300 * 1e300)', 'overflow', 'a value too large to be computed with'],
    ['min(1, 1e300 * 1e300)', 'overflow', 'a value too large to be computed with'],
    ['asin(1.1)', 'domain', 'asin of a number outside -1 to 1'],
    ['acosh(0.9)', 'domain', 'acosh of a number below 1'],
    ['atanh(1)', 'domain', 'atanh of a number not between -1 and 1'],
    ['log1p(-1)', 'domain', 'log1p of a number not above -1'],
    ['sqrt(-1) > 0 ? 1 : 2', 'domain', 'square root of a negative number'],
    ['(0/0)^0', 'division-by-zero', 'division by zero'],
  ])('%s has no value', (text, code, message) => {
    expect(evaluate(text)).toEqual({ ok: false, failure: { code, message, origin: '' } });
  });

  it('computes only the branch that the condition chooses', () => {
    expect(evaluate('x > 0 ? log(x) : 0', { x: -1 })).toEqual({ ok: true, value: 0 });
  });

  it('names the missing name, the leftmost first', () => {
    expect(evaluate('a + b', { c: 1 })).toEqual({
      ok: false,
      failure: { code: 'missing', message: 'a has no value', origin: 'a' },
    });
    expect(evaluate('a + b', { a: 1, b: NaN })).toMatchObject({ failure: { origin: 'b' } });
  });
});
