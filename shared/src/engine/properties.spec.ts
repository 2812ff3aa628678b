import fc from 'fast-check';
import { evaluateTree, type Failure } from '@shared/formula';
import { buildModel } from './build';
import type { CheckSpec, FormulaSpec, FunctionSpec, Model, ModelSpec } from './model';
import { formulaOf } from './testing-models';

/** Shapes of formulas over two or three names; some leave their domain, some choose a branch. */
const SHAPES = [
  'a + b',
  'a - b * c',
  'a * b',
  'a / b',
  'sqrt(a)',
  'a^2 - b',
  'a^b',
  'log(a) + b',
  'exp(a / 10)',
  'a > b ? a : c',
  'a < b <= c',
  'abs(a) - max(b, c, 1)',
  'min(a, b, a * c)',
  'hypot(a, b)',
  'round(a) * 0.5',
  'atan2(a, b)',
  'tanh(a / b)',
  'a > 0 ? log(a) : b',
  '1 / (a - b)',
  'sign(a) * b',
  '0 * a',
  'cbrt(a + b) + 1/3',
  '-a',
  'c',
  '2.5',
  'exp(log(a))',
  'a == b ? 1 : 2',
  'atan(1 / (a - c))',
].map(formulaOf);

const sumFunction: FunctionSpec['compute'] = ([a = NaN, b = NaN]) =>
  a + b > 50 ? { ok: false, message: 'too much' } : { ok: true, values: [a + b, a === 0 ? 0 : b] };

interface Plan {
  readonly inputs: readonly (number | null)[];
  readonly nodes: readonly { readonly shape: number; readonly picks: readonly number[]; readonly fn: boolean }[];
  readonly edits: readonly (readonly [number, number | null])[];
}

const value = fc.oneof(
  { weight: 6, arbitrary: fc.integer({ min: -3, max: 3 }) },
  { weight: 4, arbitrary: fc.double({ min: -100, max: 100, noNaN: true }) },
  { weight: 1, arbitrary: fc.constantFrom(-0, 1e200, -1e-200, 5e-324) },
  { weight: 1, arbitrary: fc.constant(null) },
);
const node = fc.record({
  shape: fc.nat({ max: SHAPES.length - 1 }),
  picks: fc.array(fc.nat({ max: 1000 }), { minLength: 3, maxLength: 3 }),
  fn: fc.boolean(),
});
const plan: fc.Arbitrary<Plan> = fc.record({
  inputs: fc.array(value, { minLength: 1, maxLength: 5 }),
  nodes: fc.array(node, { minLength: 1, maxLength: 40 }),
  edits: fc.array(fc.tuple(fc.nat({ max: 4 }), value), { minLength: 1, maxLength: 12 }),
});

/** A random acyclic model: each node reads what stands before it; every fifth at most is a function. */
function specOf({ inputs, nodes }: Plan): ModelSpec {
  const ids = inputs.map((_, i) => `x${i}`);
  const formulas: FormulaSpec[] = [];
  const functions: FunctionSpec[] = [];
  nodes.forEach(({ shape, picks, fn }, i) => {
    const pick = (k: number): string => ids[(picks[k] ?? 0) % ids.length] as string;
    if (fn && i % 5 === 4) {
      const outputs = [`f${i}_a`, `f${i}_b`];
      functions.push({ id: `f${i}`, inputs: [pick(0), pick(1)], outputs, compute: sumFunction });
      ids.push(...outputs);
      return;
    }
    const formula = SHAPES[shape];
    if (!formula) return;
    formulas.push({
      id: `n${i}`,
      formula,
      bind: new Map([
        ['a', pick(0)],
        ['b', pick(1)],
        ['c', pick(2)],
      ]),
    });
    ids.push(`n${i}`);
  });
  const checks: CheckSpec[] = ids.map((id, i) => ({
    id: `c${i}`,
    node: id,
    relation: i % 2 ? 'at-least' : 'at-most',
    limit: i % 3,
  }));
  // Declared last to first, so that the order is the engine's work.
  return {
    inputs: inputs.map((given, i) => ({ id: `x${i}`, value: given })),
    formulas: formulas.reverse(),
    functions,
    checks,
  };
}

function build(spec: ModelSpec): Model {
  const built = buildModel(spec);
  if (!built.ok) throw new Error(JSON.stringify(built));
  return built.model;
}

/** Everything a model shows, bit by bit (-0 apart from 0). */
function state(spec: ModelSpec, model: Model): unknown[] {
  const ids = [...spec.inputs, ...spec.formulas]
    .map(({ id }) => id)
    .concat(spec.functions.flatMap(({ outputs }) => [...outputs]));
  const bits = [...new BigUint64Array(model.values(ids).buffer)].map(String);
  return [bits, ids.map((id) => model.outcome(id)), (spec.checks ?? []).map(({ id }) => model.margin(id))];
}

const edit = (spec: ModelSpec, [input, to]: readonly [number, number | null]): ReadonlyMap<string, number | null> =>
  new Map([[`x${input % spec.inputs.length}`, to]]);

/** The plain way to compute a model: no tape, no order, each formula's tree from what it reads. */
function byTrees(spec: ModelSpec): ReadonlyMap<string, number | Failure> {
  const done = new Map<string, number | Failure>();
  for (const { id, value: given } of spec.inputs) {
    done.set(id, given ?? { code: 'missing', message: `${id} has no value`, origin: id });
  }
  const resolve = (id: string): number | Failure => {
    const known = done.get(id);
    if (known !== undefined) return known;
    const formula = spec.formulas.find((candidate) => candidate.id === id);
    const fn = spec.functions.find(({ outputs }) => outputs.includes(id));
    let result: number | Failure = NaN;
    if (formula) {
      const read = (name: string): number | Failure => resolve(formula.bind.get(name) ?? '');
      result = evaluateTree(formula.formula.root, read, { origin: id, label: id });
    } else if (fn) {
      const inputs = fn.inputs.map(resolve);
      const failed = inputs.find((input) => typeof input !== 'number');
      const computed = fn.compute(inputs as number[]);
      if (failed !== undefined) result = failed;
      else if (!computed.ok) result = { code: 'refused', message: `${computed.message} in ${fn.id}`, origin: fn.id };
      else result = computed.values[fn.outputs.indexOf(id)] ?? NaN;
    }
    done.set(id, result);
    return result;
  };
  for (const { id } of spec.formulas) resolve(id);
  for (const { outputs } of spec.functions) outputs.forEach(resolve);
  return done;
}

describe('properties of the engine on random models', () => {
  const runs = { numRuns: 400 };

  it('the tape computes what the trees compute, failures included', () => {
    fc.assert(
      fc.property(plan, (drawn) => {
        const spec = specOf(drawn);
        const model = build(spec);
        for (const [id, expected] of byTrees(spec)) {
          const outcome = model.outcome(id);
          expect(outcome.ok ? outcome.value : outcome.failure).toEqual(expected);
        }
      }),
      runs,
    );
  });

  it('incremental equals full: after any edits, as if built afresh, and as recomputed', () => {
    fc.assert(
      fc.property(plan, (drawn) => {
        const spec = specOf(drawn);
        const model = build(spec);
        const inputs = new Map(spec.inputs.map(({ id, value: given }) => [id, given]));
        for (const change of drawn.edits) {
          const changes = edit(spec, change);
          const before = new Map(spec.formulas.map(({ id }) => [id, model.outcome(id)]));
          const changed = new Set(model.set(changes));
          for (const [id, to] of changes) inputs.set(id, to);
          const afresh = { ...spec, inputs: [...inputs].map(([id, given]) => ({ id, value: given })) };
          expect(state(spec, model)).toEqual(state(spec, build(afresh)));
          // Exactly the nodes reported as changed differ from before.
          for (const [id, outcome] of before)
            expect([id, changed.has(id)]).toEqual([id, !sameOutcome(outcome, model.outcome(id))]);
        }
        const incremental = state(spec, model);
        model.recompute();
        expect(state(spec, model)).toEqual(incremental);
      }),
      runs,
    );
  });

  it('undo of any edit restores every bit', () => {
    fc.assert(
      fc.property(plan, (drawn) => {
        const spec = specOf(drawn);
        const model = build(spec);
        const start = state(spec, model);
        const undo: ReadonlyMap<string, number | null>[] = [];
        for (const change of drawn.edits) {
          const changes = edit(spec, change);
          undo.unshift(
            new Map(
              [...changes.keys()].map((id) => {
                const o = model.outcome(id);
                return [id, o.ok ? o.value : null];
              }),
            ),
          );
          model.set(changes);
        }
        for (const changes of undo) model.set(changes);
        expect(state(spec, model)).toEqual(start);
      }),
      runs,
    );
  });

  it('a what-if sees what the edit would give and never touches the base', () => {
    fc.assert(
      fc.property(plan, (drawn) => {
        const spec = specOf(drawn);
        const model = build(spec);
        const edited = build(spec);
        for (const change of drawn.edits) {
          const before = state(spec, model);
          const changes = edit(spec, change);
          const seen = model.whatIf(changes, (changed, turned) => [state(spec, model), changed, turned]);
          expect(state(spec, model)).toEqual(before);
          const changed = edited.set(changes);
          expect(seen).toEqual([state(spec, edited), changed, edited.turned()]);
          model.set(changes);
        }
      }),
      runs,
    );
  });

  it('the order of edits to different inputs does not matter, nor whether they come at once', () => {
    fc.assert(
      fc.property(plan, fc.array(value, { minLength: 5, maxLength: 5 }), (drawn, targets) => {
        const spec = specOf(drawn);
        const edits = spec.inputs.map(({ id }, i) => [id, targets[i] ?? null] as const);
        const [forward, backward, together] = [build(spec), build(spec), build(spec)];
        for (const one of edits) forward.set(new Map([one]));
        for (const one of [...edits].reverse()) backward.set(new Map([one]));
        together.set(new Map(edits));
        expect(state(spec, backward)).toEqual(state(spec, forward));
        expect(state(spec, together)).toEqual(state(spec, forward));
      }),
      runs,
    );
  });
});

function sameOutcome(a: ReturnType<Model['outcome']>, b: ReturnType<Model['outcome']>): boolean {
  if (a.ok && b.ok) return Object.is(a.value, b.value);
  return !a.ok && !b.ok && JSON.stringify(a) === JSON.stringify(b);
}
