import { parseFormula } from '@shared/formula';
import {
  buildModel,
  type FormulaSpec,
  type FunctionSpec,
  type InputSpec,
  type Model,
  type ModelSpec,
} from '@shared/engine';
import { constantById } from '@shared/constants';
import type { Analysis, BindingSource, Patch } from '@shared/contract';
import { methodInputs, methodOf } from './analysis-ports';
import { standardUncertainty } from './measures';
import type { Study } from './study';

/** Node of a quantity, of a constant, of an analysis output. */
export const quantityNode = (id: string): string => `q:${id}`;
const constantNode = (id: string): string => `c:${id}`;
export const outputNode = (analysisId: string, output: string): string => `a:${analysisId}.${output}`;

/** Node that a binding reads. */
export function sourceNode(from: BindingSource): string {
  if ('quantityId' in from) return quantityNode(from.quantityId);
  if ('analysisId' in from) return outputNode(from.analysisId, from.output);
  return constantNode(from.constant);
}

/** The whole study as nodes for the engine: quantities and external results are inputs, lines formulas, methods functions. */
export function modelSpec(study: Study): ModelSpec {
  const inputs: InputSpec[] = [];
  const formulas: FormulaSpec[] = [];
  const functions: FunctionSpec[] = [];
  const constants = new Set<string>();
  for (const quantity of study.all('quantity')) {
    inputs.push({
      id: quantityNode(quantity.id),
      value: quantity.value?.si ?? null,
      label: `${quantity.name} (${quantity.key})`,
    });
  }
  for (const analysis of study.all('analysis')) {
    for (const { from } of analysis.inputs) if ('constant' in from) constants.add(from.constant);
    if (analysis.kind === 'external') {
      for (const result of analysis.results) {
        inputs.push({
          id: outputNode(analysis.id, result.name),
          value: result.value.si,
          label: `${result.label || result.name} (${analysis.key})`,
        });
      }
    } else if (analysis.kind === 'formula') addLines(analysis, formulas);
    else addMethod(analysis, functions, inputs);
  }
  for (const id of constants) inputs.push({ id: constantNode(id), value: constantById(id)?.value ?? null, label: id });
  return { inputs, formulas, functions };
}

function addLines(analysis: Analysis, formulas: FormulaSpec[]): void {
  const bound = new Map(analysis.inputs.map((binding) => [binding.name, sourceNode(binding.from)]));
  analysis.lines.forEach((line, index) => {
    const parsed = parseFormula(line.expression);
    if (!parsed.ok) throw new Error(`stored formula of ${analysis.key} does not parse: ${parsed.error.message}`);
    const node = outputNode(analysis.id, line.name);
    const bind = new Map(parsed.formula.names.map((name) => [name, bound.get(name) ?? 'unbound']));
    formulas.push({ id: node, formula: parsed.formula, bind, label: `line ${index + 1} of ${analysis.key}` });
    bound.set(line.name, node);
  });
}

function addMethod(analysis: Analysis, functions: FunctionSpec[], inputs: InputSpec[]): void {
  const method = methodOf(analysis);
  if (!method) {
    // The version an analysis pins stays in the library as long as a baseline pins it; if it is gone the result says so.
    return;
  }
  const bound = new Map(analysis.inputs.map((binding) => [binding.name, sourceNode(binding.from)]));
  const ports = methodInputs(method, [...bound.keys()]);
  const nodes = ports.map((port) => {
    const node = bound.get(port.name);
    if (node) return node;
    const fallback = `d:${analysis.id}.${port.name}`;
    inputs.push({ id: fallback, value: port.default ?? null, label: `${port.label} of ${analysis.key}` });
    return fallback;
  });
  functions.push({
    id: `m:${analysis.id}`,
    inputs: nodes,
    outputs: method.outputs.map((port) => outputNode(analysis.id, port.name)),
    label: analysis.key,
    compute: (values) => {
      const result = method.compute(Object.fromEntries(ports.map((port, index) => [port.name, values[index] ?? NaN])));
      if (!result.ok) return { ok: false, message: `${analysis.key}, ${method.name}: ${result.message}` };
      return { ok: true, values: method.outputs.map((port) => result.outputs[port.name] ?? NaN) };
    },
  });
}

/** Builds the model; circles were refused when they were written, so one here is a defect. */
export function modelOf(study: Study): Model {
  const built = buildModel(modelSpec(study));
  if (built.ok) return built.model;
  throw new Error(
    'cycle' in built
      ? `the study holds a circle: ${built.cycle.join(' → ')}`
      : `the study binds “${built.unknown}” in ${built.in}, which is not there`,
  );
}

/** Input nodes with a stated uncertainty. */
export function uncertainInputs(study: Study): Map<string, number> {
  const uncertain = new Map<string, number>();
  for (const quantity of study.all('quantity')) {
    if (quantity.uncertainty && quantity.value)
      uncertain.set(quantityNode(quantity.id), standardUncertainty(quantity.uncertainty));
  }
  for (const analysis of study.all('analysis')) {
    for (const result of analysis.results) {
      if (result.uncertainty)
        uncertain.set(outputNode(analysis.id, result.name), standardUncertainty(result.uncertainty));
    }
  }
  return uncertain;
}

/** What a patch means for the model: a rebuild, or new values for some inputs; and the inputs whose cone must be looked at. */
export interface ModelChange {
  readonly rebuild: boolean;
  readonly values: ReadonlyMap<string, number | null>;
  readonly touched: readonly string[];
}

/** Reads from a patch what changes in the model. */
export function modelChange(patch: Patch): ModelChange {
  const values = new Map<string, number | null>();
  const touched: string[] = [];
  let rebuild = false;
  for (const entry of patch) {
    if (entry.kind === 'analysis') {
      const same = entry.before && entry.after && sameDefinition(entry.before, entry.after);
      if (!same) rebuild = true;
    }
    if (entry.kind !== 'quantity') continue;
    if (!entry.before || !entry.after) {
      rebuild = true;
      continue;
    }
    const node = quantityNode(entry.id);
    if (!Object.is(entry.before.value?.si, entry.after.value?.si)) values.set(node, entry.after.value?.si ?? null);
    if (entry.before.uncertainty !== entry.after.uncertainty || values.has(node)) touched.push(node);
    if (entry.before.name !== entry.after.name) rebuild = true;
  }
  return { rebuild, values, touched };
}

function sameDefinition(before: Analysis, after: Analysis): boolean {
  return (
    before.inputs === after.inputs &&
    before.lines === after.lines &&
    before.method === after.method &&
    before.results === after.results &&
    before.kind === after.kind
  );
}
