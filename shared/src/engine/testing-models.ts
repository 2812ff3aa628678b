import { parseFormula, type Formula } from '@shared/formula';
import { buildModel } from './build';
import type { FormulaSpec, Model, ModelSpec } from './model';

/** A parsed formula; throws with the refusal. For tests of this folder. */
export function formulaOf(text: string): Formula {
  const result = parseFormula(text);
  if (!result.ok) throw new Error(`${text}: ${result.error.message}`);
  return result.formula;
}

/** A formula node whose names are the ids of other nodes. */
export function line(id: string, text: string, label?: string): FormulaSpec {
  const formula = formulaOf(text);
  return { id, formula, bind: new Map(formula.names.map((name) => [name, name])), label };
}

/** A model from inputs by name and lines of text by id. */
export function modelOf(
  inputs: Readonly<Record<string, number | null>>,
  lines: Readonly<Record<string, string>>,
  more: Partial<ModelSpec> = {},
): Model {
  const built = buildModel({
    inputs: Object.entries(inputs).map(([id, value]) => ({ id, value })),
    formulas: Object.entries(lines).map(([id, text]) => line(id, text)),
    functions: [],
    ...more,
  });
  if (!built.ok) throw new Error(JSON.stringify(built));
  return built.model;
}

/** The value of a node; throws with the failure. */
export function valueOf(model: Model, id: string): number {
  const outcome = model.outcome(id);
  if (!outcome.ok) throw new Error(outcome.failure.message);
  return outcome.value;
}
