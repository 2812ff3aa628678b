import type { Analysis, BindingSource } from '@shared/contract';
import { constantById } from '@shared/constants';
import type { Outcome } from '@shared/engine';
import { parseFormula } from '@shared/formula';
import { outputsOf, type Port } from '../analysis-ports';
import { outputNode, sourceNode } from '../model';
import type { Proof } from '../prove';
import { PROOF_DIGITS, typedTex, valueTex, withUnitTex, wordsTex } from './number-tex';

/** Digits of a constant in a proof; they are known far better than what is computed with them. */
const CONSTANT_DIGITS = 6;

/** What stands for a number that is not there. */
export function gapTex(outcome: Outcome): string {
  return wordsTex(!outcome.ok && outcome.failure.code === 'missing' ? 'no value' : 'not computable');
}

/** Value of a binding as TeX in the unit its author uses: quantities as typed, results in the unit of their line. */
export function sourceTex(proof: Proof, from: BindingSource): string {
  const { study, model } = proof;
  const node = sourceNode(from);
  if (!model.has(node)) return wordsTex('not computable');
  const outcome = model.outcome(node);
  if (!outcome.ok) return gapTex(outcome);
  if ('constant' in from) return constantTex(from.constant);
  if ('quantityId' in from) {
    const quantity = study.get('quantity', from.quantityId);
    const typed = quantity?.value && typedTex(quantity.value.text);
    if (quantity?.value && typed) return withUnitTex(typed, quantity.value.unit);
    return valueTex(outcome.value, quantity?.value?.unit ?? quantity?.unit ?? '', {
      temperature: quantity?.temperature,
    });
  }
  const analysis = study.get('analysis', from.analysisId);
  const port = analysis && portOf(proof, analysis, from.output);
  return valueTex(outcome.value, port?.unit ?? '', { digits: PROOF_DIGITS, temperature: port?.temperature });
}

/** Value of a constant as TeX in SI. */
export function constantTex(id: string): string {
  const constant = constantById(id);
  return constant ? valueTex(constant.value, constant.unit, { digits: CONSTANT_DIGITS }) : '';
}

/** The output port of an analysis with this name. */
export function portOf({ study }: Proof, analysis: Analysis, output: string): Port | undefined {
  return outputsOf(study, analysis).find((port) => port.name === output);
}

/** Outcome of an output; a pinned method version that is gone reads as a refusal. */
export function outcomeOf({ model }: Proof, analysis: Analysis, output: string): Outcome {
  const node = outputNode(analysis.id, output);
  if (model.has(node)) return model.outcome(node);
  const message = `${analysis.key} pins a method version that this build does not have`;
  return { ok: false, failure: { code: 'refused', message, origin: node } };
}

/** Outputs wanted of one analysis. */
export interface Wanted {
  readonly analysis: Analysis;
  readonly outputs: ReadonlySet<string>;
}

/**
 * The analyses behind some outputs of one, with the outputs of each that they rest on; feeding analyses come first. What
 * a formula line does not read is left out; a method rests on all of its inputs.
 */
export function chainBehind({ study }: Proof, analysis: Analysis, outputs: readonly string[]): Wanted[] {
  const wanted = new Map<Analysis, Set<string>>();
  const collect = (step: Analysis, names: readonly string[]): void => {
    const known = wanted.get(step) ?? new Set<string>();
    const fresh = names.filter((name) => !known.has(name));
    wanted.set(step, known);
    if (fresh.length === 0) return;
    for (const name of fresh) known.add(name);
    const reads = inputsRead(step, fresh);
    for (const { name, from } of step.inputs) {
      const feeding = 'analysisId' in from && reads(name) ? study.get('analysis', from.analysisId) : undefined;
      if (feeding && 'analysisId' in from) collect(feeding, [from.output]);
    }
  };
  collect(analysis, outputs);

  const order = new Set<Analysis>();
  const place = (step: Analysis): void => {
    if (order.has(step)) return;
    for (const { from } of step.inputs) {
      const feeding = 'analysisId' in from ? study.get('analysis', from.analysisId) : undefined;
      if (feeding && wanted.has(feeding)) place(feeding);
    }
    order.add(step);
  };
  place(analysis);
  return [...order].map((step) => ({ analysis: step, outputs: wanted.get(step) ?? new Set() }));
}

/** Which inputs some outputs of an analysis read. */
function inputsRead(analysis: Analysis, outputs: readonly string[]): (name: string) => boolean {
  if (analysis.kind !== 'formula') return () => true;
  const names = new Set(linesBehind(analysis.lines, outputs).flatMap(({ expression }) => namesIn(expression)));
  return (name) => names.has(name);
}

/** Of the lines of a calculation, in order, those that some of them rest on. */
export function linesBehind<L extends { readonly name: string; readonly expression: string }>(
  lines: readonly L[],
  outputs: Iterable<string>,
): L[] {
  const needed = new Set(outputs);
  const kept = [...lines].reverse().filter(({ name, expression }) => {
    if (!needed.has(name)) return false;
    for (const read of namesIn(expression)) needed.add(read);
    return true;
  });
  return kept.reverse();
}

function namesIn(expression: string): readonly string[] {
  const parsed = parseFormula(expression);
  return parsed.ok ? parsed.formula.names : [];
}
