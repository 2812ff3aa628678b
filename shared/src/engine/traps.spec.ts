import { parseUnit, toSi } from '@shared/units';
import { checkFormula, parseFormula } from '@shared/formula';
import { LIMIT_TOLERANCE } from './checks';
import { buildModel } from './build';
import { formulaOf, line, modelOf, valueOf } from './testing-models';

/** One test for each way in which such engines are known to go wrong. */
describe('traps', () => {
  it('1 equality at a limit: one relative tolerance, margin 0 on the good side, nothing rounded beyond it', () => {
    const check = (relation: 'at-least' | 'at-most', value: number, limit: number) =>
      modelOf({ x: value }, {}, { checks: [{ id: 'k', node: 'x', relation, limit }] }).margin('k');
    expect(LIMIT_TOLERANCE).toBe(1e-9);
    // 0.1 + 0.2 is 4e-17 above 0.3: a double's rounding is no violation.
    expect(check('at-most', 0.1 + 0.2, 0.3)).toEqual({ ok: true, value: 0 });
    expect(check('at-least', 0.3, 0.1 + 0.2)).toEqual({ ok: true, value: 0 });
    expect(check('at-least', 1e9 - 0.9, 1e9)).toEqual({ ok: true, value: 0 });
    expect(check('at-least', 1e9 - 2, 1e9)).toEqual({ ok: true, value: -2 });
    expect(check('at-most', 0, 0)).toEqual({ ok: true, value: 0 });
    const margin = check('at-most', 1e-300, 0);
    expect(margin.ok && margin.value).toBe(-1e-300);
  });

  it('2 NaN and Infinity never leave, and never keep propagating', () => {
    const model = modelOf({ x: -1, y: 1 }, { r: 'sqrt(x)', s: 'r + y', i: 'y / (x + 1)', j: 'atan(i)' });
    for (const id of ['r', 's', 'i', 'j'])
      expect(model.outcome(id)).toHaveProperty('failure.origin', id === 's' ? 'r' : id === 'j' ? 'i' : id);
    expect(model.set(new Map([['y', 2]]))).toEqual(['y']);
    expect(model.set(new Map([['x', -2]]))).toEqual(['x', 'i', 'j']);
  });

  it('3 sqrt(-1), log(-1) and (-8)^(1/3) are domain errors, not complex numbers', () => {
    const model = modelOf({ x: -1 }, { a: 'sqrt(x)', b: 'log(x)', c: '(8*x)^(1/3)', d: 'cbrt(8*x)' });
    for (const id of ['a', 'b', 'c'])
      expect(model.outcome(id)).toMatchObject({ failure: { code: 'domain', origin: id } });
    expect(valueOf(model, 'd')).toBe(-2);
  });

  it('4 temperatures: 5 K more than 20 °C is 298.15 K, and two absolute ones do not add up', () => {
    const unit = (text: string) => {
      const parsed = parseUnit(text);
      if (!parsed.ok) throw new Error(parsed.message);
      return parsed.unit;
    };
    const celsius = unit('°C');
    const model = modelOf(
      { dT: toSi(5, unit('K'), 'difference'), T: toSi(20, celsius, 'absolute') },
      { sum: 'T + dT' },
    );
    // 20 + 273.15 + 5, rounding of one double
    expect(valueOf(model, 'sum')).toBeCloseTo(298.15, 10);
    const absolute = { dimension: celsius.dimension, temperature: 'absolute' as const };
    const scope = new Map([
      ['T', absolute],
      ['U', absolute],
    ]);
    expect(checkFormula(formulaOf('T + U'), scope)).toMatchObject({ ok: false, error: { code: 'temperature' } });
    // 0 °C and 273.15 K are one temperature.
    const same = modelOf({ a: toSi(0, celsius), b: 273.15 }, { same: 'a == b' });
    expect(valueOf(same, 'same')).toBe(1);
  });

  it('5 an angle counts as a plain number, in radians', () => {
    const degree = parseUnit('deg');
    if (!degree.ok) throw new Error(degree.message);
    const scope = new Map([['phi', { dimension: degree.unit.dimension }]]);
    expect(checkFormula(formulaOf('sin(phi) + phi'), scope).ok).toBe(true);
    // sin 30° = 1/2; 1e-15 for the rounding of pi/6
    expect(valueOf(modelOf({ phi: toSi(30, degree.unit) }, { s: 'sin(phi)' }), 's')).toBeCloseTo(0.5, 15);
  });

  it('6 a name is only what is bound to it', () => {
    for (const name of ['m', 'g', 'h', 't', 'T', 'K', 'dT', 'pi', 'e']) {
      const formula = formulaOf(`2 * ${name}`);
      expect(buildModel({ inputs: [], formulas: [{ id: 'f', formula, bind: new Map() }], functions: [] })).toEqual({
        ok: false,
        unknown: name,
        in: 'f',
      });
    }
  });

  it('7 units do not occur in formulas', () => {
    for (const text of ['5 cm', '3 kg + m', '2 degC', '10 m/s to km/h']) expect(parseFormula(text).ok).toBe(false);
  });

  it('8 1e400 and 1e-400 are refused, not made Infinity and 0', () => {
    for (const text of ['1e400', 'x * 1e-400', '1e309 - x']) {
      expect(parseFormula(text)).toMatchObject({ ok: false, error: { code: 'number-range' } });
    }
    const model = modelOf({ x: 1e200 }, { y: 'x * x', z: '1 / y' });
    expect(model.outcome('z')).toMatchObject({ failure: { code: 'overflow', origin: 'y' } });
  });

  it('9 gives the same bits from scratch as after edits, within one engine', () => {
    const lines = { a: 'tanh(x) ^ 1.7', b: 'exp(a) - expm1(a)', c: 'hypot(a, b, x)' };
    const edited = modelOf({ x: 0.3 }, lines);
    edited.set(new Map([['x', 0.7]]));
    expect([...edited.values(['a', 'b', 'c'])]).toEqual([...modelOf({ x: 0.7 }, lines).values(['a', 'b', 'c'])]);
  });

  it('10 a what-if copies nothing: it takes back only what it wrote', () => {
    const lines: Record<string, string> = {};
    for (let i = 0; i < 2000; i++) lines[`n${i}`] = `y + ${i}`;
    const model = modelOf({ x: 1, y: 2 }, { ...lines, only: 'x^2' });
    const seen = model.whatIf(new Map([['x', 3]]), (changed) => changed);
    expect(seen).toEqual(['x', 'only']);
  });

  it('tells 0 from -0', () => {
    const model = modelOf({ x: 1, y: 2 }, { p: 'x * 0', q: 'atan2(p, -1)', k: 'atan2(-0, -1)' });
    expect(valueOf(model, 'q')).toBe(Math.PI);
    expect(valueOf(model, 'k')).toBe(-Math.PI);
    model.set(new Map([['x', -1]]));
    expect(valueOf(model, 'q')).toBe(-Math.PI);
  });

  it('keeps folded arguments apart when several temporaries are in use', () => {
    const model = modelOf(
      { a: 1, b: 2, c: 3 },
      {
        m: 'max(a, b, a*b + c, c*c - b)',
        h: 'min(a + b, hypot(a, b, c*c, a + b), c)',
        s: '(a < b < a*b + c) * ((a + b) / (c + a) > 0 ? (b + c) * (a + c) : 0)',
      },
    );
    // max(1, 2, 5, 7); min(3, √(1+4+81+9), 3); 1 · (5 · 4)
    expect([...model.values(['m', 'h', 's'])]).toEqual([7, 3, 20]);
  });

  it('carries a chain and a fan of 10,000 without recursion', () => {
    const formulas = Array.from({ length: 10_000 }, (_, i) => ({
      ...line(`n${i}`, 'x + 1'),
      bind: new Map([['x', i === 0 ? 'x' : `n${i - 1}`]]),
    }));
    const built = buildModel({ inputs: [{ id: 'x', value: 1 }], formulas, functions: [] });
    if (!built.ok) throw new Error('refused');
    expect(built.model.set(new Map([['x', null]]))).toHaveLength(10_001);
    expect(built.model.outcome('n9999')).toMatchObject({ failure: { origin: 'x' } });
    built.model.set(new Map([['x', 5]]));
    expect(valueOf(built.model, 'n9999')).toBe(10_005);
  });
});
