import { buildModel } from './build';
import type { FunctionSpec } from './model';
import { line, modelOf, valueOf } from './testing-models';

const sumAndProduct: FunctionSpec = {
  id: 'f',
  inputs: ['a', 'b'],
  outputs: ['sum', 'product'],
  label: 'Sum and product',
  compute: ([a = NaN, b = NaN]) =>
    a < 0 ? { ok: false, message: 'a must not be negative' } : { ok: true, values: [a + b, a * b] },
};

describe('buildModel', () => {
  it('refuses a cycle by its path, each feeding the next', () => {
    const built = buildModel({
      inputs: [{ id: 'x', value: 1 }],
      formulas: [line('a', 'b + x'), line('b', 'c * 2'), line('c', 'a'), line('d', 'a'), line('e', 'd')],
      functions: [],
    });
    if (built.ok || !('cycle' in built)) throw new Error('built');
    // a reads b, b reads c, c reads a: so a feeds c, c feeds b, b feeds a. d and e only wait for the cycle.
    const start = built.cycle.indexOf('a');
    expect([...built.cycle.slice(start), ...built.cycle.slice(0, start)]).toEqual(['a', 'c', 'b']);
  });

  it('refuses a line that reads itself, and a cycle through a function', () => {
    expect(buildModel({ inputs: [], formulas: [line('a', 'a + 1')], functions: [] })).toEqual({
      ok: false,
      cycle: ['a'],
    });
    const built = buildModel({
      inputs: [{ id: 'b', value: 1 }],
      formulas: [line('a', 'product')],
      functions: [sumAndProduct],
    });
    expect(built).toMatchObject({ ok: false, cycle: expect.arrayContaining(['a', 'product']) });
  });

  it('refuses unknown nodes and unbound names', () => {
    const unbound = { ...line('a', 'x + 1'), bind: new Map<string, string>() };
    expect(buildModel({ inputs: [], formulas: [unbound], functions: [] })).toEqual({
      ok: false,
      unknown: 'x',
      in: 'a',
    });
    expect(buildModel({ inputs: [], formulas: [line('a', 'y')], functions: [] })).toEqual({
      ok: false,
      unknown: 'y',
      in: 'a',
    });
    expect(buildModel({ inputs: [], formulas: [], functions: [sumAndProduct] })).toEqual({
      ok: false,
      unknown: 'a',
      in: 'f',
    });
    const checks = [{ id: 'k', node: 'z', relation: 'at-least' as const, limit: 1 }];
    expect(buildModel({ inputs: [], formulas: [], functions: [], checks })).toEqual({
      ok: false,
      unknown: 'z',
      in: 'k',
    });
  });

  it('refuses two nodes of one id', () => {
    expect(() => modelOf({ a: 1 }, { a: '1' })).toThrow('the id a');
  });

  it('takes names like those of object properties as ids', () => {
    const built = buildModel({
      inputs: [{ id: '__proto__', value: 2 }],
      formulas: [{ ...line('constructor', 'x^2'), bind: new Map([['x', '__proto__']]) }],
      functions: [],
    });
    expect(built.ok && built.model.outcome('constructor')).toEqual({ ok: true, value: 4 });
  });
});

describe('Model', () => {
  it('computes formulas that read formulas, functions and constants, in any order of declaration', () => {
    const model = modelOf(
      { a: 3, b: 4 },
      { z: 'y + sum', y: 'product^2 - 0.5', k: '7' },
      { functions: [sumAndProduct] },
    );
    // product = 12, y = 144 - 0.5 = 143.5, sum = 7, z = 150.5
    expect(valueOf(model, 'z')).toBe(150.5);
    expect(valueOf(model, 'k')).toBe(7);
    expect([...model.values(['z', 'a'])]).toEqual([150.5, 3]);
  });

  it('reports what changed, and nothing that came out the same', () => {
    const model = modelOf({ a: 3, b: -4 }, { square: 'b^2', root: 'sqrt(square)', total: 'a + root' });
    expect(model.set(new Map([['b', 4]]))).toEqual(['b']);
    expect(model.set(new Map([['b', 5]]))).toEqual(['b', 'square', 'root', 'total']);
    expect(model.set(new Map([['b', 5]]))).toEqual([]);
  });

  it('refuses to set what is computed or unknown, before anything is written', () => {
    const model = modelOf({ a: 1 }, { b: 'a' });
    expect(() =>
      model.set(
        new Map([
          ['a', 2],
          ['b', 2],
        ]),
      ),
    ).toThrow('b is computed');
    expect(() =>
      model.set(
        new Map([
          ['a', 2],
          ['c', 2],
        ]),
      ),
    ).toThrow('no node c');
    expect(valueOf(model, 'b')).toBe(1);
  });

  it('lists inputs upstream and nodes downstream', () => {
    const model = modelOf({ a: 1, b: 2, c: 3 }, { s: 'a + sum', u: 'c', v: 's + u' }, { functions: [sumAndProduct] });
    expect(model.inputsOf('product')).toEqual(['a', 'b']);
    expect(model.inputsOf('v')).toEqual(['a', 'b', 'c']);
    expect(model.inputsOf('a')).toEqual([]);
    expect([...model.dependantsOf('b')].sort()).toEqual(['product', 's', 'sum', 'v']);
    expect(model.dependantsOf('v')).toEqual([]);
    expect(model.has('v') && !model.has('w')).toBe(true);
  });

  it('undoes a what-if also when its reader throws, and refuses edits inside', () => {
    const model = modelOf({ a: 2 }, { b: '1 / a' });
    expect(() =>
      model.whatIf(new Map([['a', 0]]), () => {
        throw new Error('reader');
      }),
    ).toThrow('reader');
    expect(valueOf(model, 'b')).toBe(0.5);
    model.whatIf(new Map([['a', 4]]), () => {
      expect(() => model.set(new Map([['a', 1]]))).toThrow('what-if');
      expect(() => model.recompute()).toThrow('what-if');
    });
    expect(valueOf(model, 'b')).toBe(0.5);
  });

  it('nests what-ifs', () => {
    const model = modelOf({ a: 1, b: 1 }, { s: 'a + 10*b' });
    const seen = model.whatIf(new Map([['a', 2]]), () => [
      model.whatIf(new Map([['b', 3]]), (changed) => [valueOf(model, 's'), ...changed]),
      valueOf(model, 's'),
    ]);
    expect(seen).toEqual([[32, 'b', 's'], 12]);
    expect(valueOf(model, 's')).toBe(11);
  });
});

describe('failures', () => {
  const label = (id: string, value: number | null, text: string) => ({ id, value, label: text });

  it('carry the first culprit through everything that follows', () => {
    const built = buildModel({
      inputs: [label('p', null, 'panel puncture rate'), label('n', 4, 'panels')],
      formulas: [line('lost', 'n * p'), line('left', 'n - lost'), line('spare', 'n + 1')],
      functions: [{ id: 'f', inputs: ['left'], outputs: ['out'], compute: ([x = 0]) => ({ ok: true, values: [x] }) }],
    });
    if (!built.ok) throw new Error('refused');
    const failure = { code: 'missing', message: 'panel puncture rate has no value', origin: 'p' };
    for (const id of ['p', 'lost', 'left', 'out']) expect(built.model.outcome(id)).toEqual({ ok: false, failure });
    expect(built.model.outcome('spare')).toEqual({ ok: true, value: 5 });
    expect([...built.model.values(['left'])]).toEqual([NaN]);
  });

  it('say which line is out of its domain', () => {
    const built = buildModel({
      inputs: [label('x', -1, 'x')],
      formulas: [line('r', 'sqrt(x)', 'line 2 of Radiator sizing'), line('s', 'r + 1')],
      functions: [],
    });
    expect(built.ok && built.model.outcome('s')).toEqual({
      ok: false,
      failure: {
        code: 'domain',
        message: 'square root of a negative number in line 2 of Radiator sizing',
        origin: 'r',
      },
    });
  });

  it('change when their reason changes, though there was no value before and after', () => {
    const model = modelOf({ a: null, b: null }, { s: 'a + b', t: '2*s' });
    expect(model.outcome('t')).toMatchObject({ failure: { origin: 'a' } });
    expect(model.set(new Map([['a', 1]]))).toEqual(['a', 's', 't']);
    expect(model.outcome('t')).toMatchObject({ failure: { origin: 'b' } });
    expect(model.set(new Map([['b', 1]]))).toEqual(['b', 's', 't']);
    expect(valueOf(model, 't')).toBe(4);
    expect(model.whatIf(new Map([['b', null]]), () => model.outcome('t'))).toMatchObject({ failure: { origin: 'b' } });
    expect(valueOf(model, 't')).toBe(4);
  });

  it('of a function carry its words; a throwing or ill-behaved one fails, too', () => {
    const model = modelOf({ a: -1, b: 1 }, { z: 'sum + 1' }, { functions: [sumAndProduct] });
    expect(model.outcome('z')).toEqual({
      ok: false,
      failure: { code: 'refused', message: 'a must not be negative in Sum and product', origin: 'f' },
    });
    model.set(new Map([['a', 1]]));
    expect(valueOf(model, 'z')).toBe(3);
    const failing = (compute: FunctionSpec['compute']) =>
      modelOf({ a: 1 }, {}, { functions: [{ id: 'g', inputs: ['a'], outputs: ['o'], compute }] }).outcome('o');
    expect(
      failing(() => {
        throw new Error('no convergence');
      }),
    ).toMatchObject({ failure: { code: 'refused', message: 'no convergence in g' } });
    expect(failing(() => ({ ok: true, values: [Infinity] }))).toMatchObject({ failure: { code: 'overflow' } });
    expect(failing(() => ({ ok: true, values: [] }))).toMatchObject({ failure: { code: 'refused' } });
  });

  it('do not come from a branch that is not taken', () => {
    const model = modelOf({ x: -1, y: null }, { a: 'x > 0 ? log(x) : 5', b: 'x > 0 ? y : 6', c: 'x < 0 ? 1/0 : 7' });
    expect(valueOf(model, 'a')).toBe(5);
    expect(valueOf(model, 'b')).toBe(6);
    expect(model.outcome('c')).toMatchObject({ failure: { code: 'division-by-zero', origin: 'c' } });
  });

  it('treat an input that is no finite number as missing', () => {
    const model = modelOf({ x: Infinity }, { y: 'x' });
    expect(model.outcome('y')).toMatchObject({ failure: { code: 'missing', origin: 'x' } });
    model.set(new Map([['x', 1]]));
    model.set(new Map([['x', NaN]]));
    expect(model.outcome('y')).toMatchObject({ failure: { code: 'missing', origin: 'x' } });
  });
});

describe('threshold checks', () => {
  const model = modelOf(
    { x: 10 },
    { y: '2*x' },
    {
      checks: [
        { id: 'floor', node: 'y', relation: 'at-least', limit: 15 },
        { id: 'ceiling', node: 'y', relation: 'at-most', limit: 30 },
      ],
    },
  );

  it('keep margins and say which turned, in edits and what-ifs', () => {
    expect([model.margin('floor'), model.margin('ceiling')]).toEqual([
      { ok: true, value: 5 },
      { ok: true, value: 10 },
    ]);
    expect(model.whatIf(new Map([['x', 16]]), (_, turned) => [turned, model.margin('ceiling')])).toEqual([
      ['ceiling'],
      { ok: true, value: -2 },
    ]);
    expect(model.margin('ceiling')).toEqual({ ok: true, value: 10 });
    model.set(new Map([['x', 5]]));
    expect(model.turned()).toEqual(['floor']);
    expect(model.margin('floor')).toEqual({ ok: true, value: -5 });
    model.set(new Map([['x', null]]));
    expect(model.turned()).toEqual(['floor', 'ceiling']);
    expect(model.margin('floor')).toMatchObject({ ok: false, failure: { origin: 'x' } });
    expect(() => model.margin('y')).toThrow('no check y');
  });
});
