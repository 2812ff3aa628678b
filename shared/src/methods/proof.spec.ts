import { checkFormula, evaluateFormula, isFormulaName, parseFormula, type Typed } from '@shared/formula';
import { constantById } from '@shared/constants';
import { parseUnit } from '@shared/units';
import { METHODS, type Method, type MethodPort } from '.';
import { EXAMPLES } from './testing/examples';

function typed(unitText: string, temperature?: MethodPort['temperature']): Typed {
  const unit = parseUnit(unitText);
  if (!unit.ok) throw new Error(`${unitText}: ${unit.message}`);
  return temperature ? { dimension: unit.unit.dimension, temperature } : { dimension: unit.unit.dimension };
}

/** Inputs of one example with the optional ones filled in, and the number of repeated items in it. */
function bound(
  method: Method,
  example: Readonly<Record<string, number>>,
): { values: Map<string, number>; items: number } {
  const values = new Map(Object.entries(example));
  for (const port of method.inputs) {
    if (!values.has(port.name) && port.default !== undefined) values.set(port.name, port.default);
  }
  const first = method.group?.ports[0]?.name ?? '';
  let items = 0;
  while (method.group && values.has(`${first}_${items + 1}`)) items += 1;
  return { values, items };
}

const cases = METHODS.flatMap((method) =>
  (EXAMPLES[method.id] ?? []).map((example, index) => [method.id, index, method, example] as const),
);

describe('proof lines', () => {
  it('are backed by an example for every method', () => {
    expect(METHODS.filter((method) => !EXAMPLES[method.id]?.length).map((method) => method.id)).toEqual([]);
  });

  it.each(cases)('of %s reproduce its results (example %i)', (_id, _index, method, example) => {
    const { values, items } = bound(method, example);
    const result = method.compute(example);
    if (!result.ok) throw new Error(result.message);
    const lines = method.proofFor?.(items) ?? method.proof;
    if (!lines) return;
    const scope = new Map<string, Typed>();
    for (const port of method.inputs) scope.set(port.name, typed(port.unit, port.temperature));
    for (const port of method.group?.ports ?? []) {
      for (let item = 1; item <= items; item += 1)
        scope.set(`${port.name}_${item}`, typed(port.unit, port.temperature));
    }
    for (const id of method.constants ?? []) {
      const constant = constantById(id);
      if (!constant) throw new Error(`no constant ${id}`);
      expect(scope.has(constant.symbol)).toBe(false);
      scope.set(constant.symbol, typed(constant.unit));
      values.set(constant.symbol, constant.value);
    }
    for (const line of lines) {
      const parsed = parseFormula(line.expression);
      if (!parsed.ok) throw new Error(`${line.expression}: ${parsed.error.message}`);
      const checked = checkFormula(parsed.formula, scope);
      if (!checked.ok) throw new Error(`${line.expression}: ${checked.error.message}`);
      expect([line.name, checked.type.dimension.key]).toEqual([line.name, typed(line.unit).dimension.key]);
      const outcome = evaluateFormula(parsed.formula, values);
      if (!outcome.ok) throw new Error(`${line.expression}: ${outcome.failure.message}`);
      scope.set(line.name, checked.type);
      values.set(line.name, outcome.value);
      const computed = result.outputs[line.name];
      if (computed !== undefined) {
        expect(Math.abs(outcome.value - computed)).toBeLessThanOrEqual(1e-12 * Math.abs(computed));
      }
    }
    const written = new Set(lines.map((line) => line.name));
    expect(method.outputs.filter((port) => !written.has(port.name)).map((port) => port.name)).toEqual([]);
  });

  it.each(METHODS.map((method) => [method.id, method] as const))(
    '%s declares readable ports in known units',
    (_id, method) => {
      const ports = [...method.inputs, ...method.outputs, ...(method.group?.ports ?? [])];
      for (const port of ports) {
        expect([port.name, isFormulaName(port.name)]).toEqual([port.name, true]);
        expect([port.name, parseUnit(port.unit).ok]).toEqual([port.name, true]);
      }
    },
  );
});
