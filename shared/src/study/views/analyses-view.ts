import type { AnalysesView, Analysis, AnalysisRow, OutputView, Shown } from '@shared/contract';
import { describeDimension } from '@shared/units';
import { methodOf, outputsOf, type Port } from '../analysis-ports';
import { definitionDigest, isControlled } from '../apply/analyses';
import { outputNode } from '../model';
import type { Proof } from '../prove';
import { standardsOf } from '../standard-uncertainties';
import { byKey, provenOf } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

/** All analyses, by key, with what each verifies and what it gives now. */
export function analysesView(context: ViewContext): AnalysesView {
  const analyses = context.proof.study.all('analysis').sort(byKey);
  const standards = outputStandards(context.proof, analyses);
  return { rows: analyses.map((analysis) => analysisRow(context, analysis, standards)) };
}

/** Standard uncertainties in SI of the outputs of analyses, by node: all of them in one sweep of the model an input. */
export function outputStandards(
  { study, model, uncertain }: Proof,
  analyses: readonly Analysis[],
): ReadonlyMap<string, number | null> {
  const nodes = analyses.flatMap((analysis) =>
    outputsOf(study, analysis)
      .map(({ name }) => outputNode(analysis.id, name))
      .filter((node) => model.has(node) && model.outcome(node).ok),
  );
  return standardsOf(model, uncertain, nodes);
}

/** One analysis as a line of the list; `standards` are the standard uncertainties of its outputs. */
export function analysisRow(
  context: ViewContext,
  analysis: Analysis,
  standards: ReadonlyMap<string, number | null>,
): AnalysisRow {
  const { study } = context.proof;
  const { id, version, key, name, kind } = analysis;
  return {
    id,
    version,
    key,
    name,
    kind,
    methodName: methodOf(analysis)?.name ?? analysis.method?.id ?? '',
    element: (analysis.elementId && study.get('element', analysis.elementId)?.key) ?? '',
    author: personRef(context, analysis.authorId),
    state: isChecked(analysis) ? 'checked' : 'draft',
    controlled: isControlled(study, analysis),
    verifies: verifies(context, analysis),
    outputs: outputsOf(study, analysis).map((port) => outputView(context, analysis, port, standards)),
  };
}

/** Whether the check signature stands: it covers the definition as it is, not one that it was. */
export function isChecked(analysis: Analysis): boolean {
  return analysis.check !== null && analysis.check.digest === definitionDigest(analysis);
}

function verifies(context: ViewContext, analysis: Analysis): AnalysisRow['verifies'] {
  const { study } = context.proof;
  const ids = new Set(study.find('verification', 'analysisId', analysis.id).map(({ requirementId }) => requirementId));
  return [...ids]
    .flatMap((id) => study.get('requirement', id) ?? [])
    .filter(({ state }) => state !== 'withdrawn')
    .sort(byKey)
    .map(({ id, key, title }) => ({ key, title, verdict: provenOf(context, id).verdict }));
}

/** A value at a port, in SI with the port's unit. */
export function shownAt(port: Pick<Port, 'unit' | 'temperature'>, si: number): Shown {
  return port.temperature === 'difference' ? { si, unit: port.unit, difference: true } : { si, unit: port.unit };
}

/** An output with its value and standard uncertainty (SI, first order), or why it has none. */
function outputView(
  { proof }: ViewContext,
  analysis: Analysis,
  port: Port,
  standards: ReadonlyMap<string, number | null>,
): OutputView {
  const { name, tex, label } = port;
  const plain = { name, tex, label, dimension: describeDimension(port.dimension) };
  const node = outputNode(analysis.id, name);
  if (!proof.model.has(node))
    return { ...plain, shown: null, standard: null, failure: 'this build does not have the method version it pins' };
  const outcome = proof.model.outcome(node);
  if (!outcome.ok) return { ...plain, shown: null, standard: null, failure: outcome.failure.message };
  return { ...plain, shown: shownAt(port, outcome.value), standard: standards.get(node) ?? null, failure: '' };
}
