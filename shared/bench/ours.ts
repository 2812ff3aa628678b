import { buildModel, type Model, type ModelSpec } from '@shared/engine';
import { checkFormula, parseFormula, type Typed } from '@shared/formula';
import { DIMENSIONLESS } from '@shared/units';
import { FORMULA_DIALECT, nameOf, startValue, type Study } from './study';

/** Reads and checks every formula of the study, as the product does when they are written. */
export function specOf(study: Study): ModelSpec {
  const plain: Typed = { dimension: DIMENSIONLESS };
  const formulas = study.formulas.map(({ node, reads, text }) => {
    const parsed = parseFormula(text(FORMULA_DIALECT));
    if (!parsed.ok) throw new Error(parsed.error.message);
    const names = reads.map(nameOf);
    const checked = checkFormula(parsed.formula, new Map(names.map((name) => [name, plain])));
    if (!checked.ok) throw new Error(checked.error.message);
    return { id: nameOf(node), formula: parsed.formula, bind: new Map(names.map((name) => [name, name])) };
  });
  return {
    inputs: study.inputs.map((node) => ({ id: nameOf(node), value: startValue(node) })),
    formulas,
    functions: [],
    checks: study.checks.map((check, i) => ({ id: `c${i}`, ...check, node: nameOf(check.node) })),
  };
}

/** Builds the model; throws when a formula has no value, which would make the figures worthless. */
export function modelOf(spec: ModelSpec): Model {
  const built = buildModel(spec);
  if (!built.ok) throw new Error(JSON.stringify(built));
  for (const { id } of spec.formulas) {
    const outcome = built.model.outcome(id);
    if (!outcome.ok) throw new Error(`${id}: ${outcome.failure.message}`);
  }
  return built.model;
}

/** The input among those given whose cone has the size nearest to the one wanted. */
export function inputWithCone(
  model: Model,
  inputs: readonly number[],
  size: number,
): { input: number; cone: number[] } {
  let best = { input: -1, cone: [] as number[] };
  for (const input of inputs) {
    const cone = model.dependantsOf(nameOf(input)).map((id) => Number(id.slice(1)));
    if (best.input < 0 || Math.abs(cone.length - size) < Math.abs(best.cone.length - size)) best = { input, cone };
  }
  return best;
}
