import type { Analysis, AnalysisSheet, Binding, Command, CommandType, InputView, Uncertainty } from '@shared/contract';
import { nameTex } from '@shared/formula';
import { newestVersion } from '@shared/methods';
import { describeDimension } from '@shared/units';
import { isTemperature, knownDimension, methodInputs, methodOf, outputsOf, sourcePort } from '../analysis-ports';
import { pendingChanges } from '../change-requests';
import { outputNode, sourceNode } from '../model';
import { methodWarnings } from '../prove';
import { requiredMargin } from '../required-margin';
import { judge, marginView } from '../verdict';
import { analysisRow, isChecked, outputStandards, shownAt } from './analyses-view';
import { permitted } from './permitted';
import { ownProofLines } from './proof-lines';
import { byKey, provenOf, requirementsInForce } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

/** How many requirements that an output could verify are offered at most. */
const OFFERED = 50;

/** Everything about one analysis; null when there is none of that key. */
export function analysisSheet(context: ViewContext, key: string): AnalysisSheet | null {
  const { study, model } = context.proof;
  const analysis = study.byKey('analysis', key);
  if (!analysis) return null;
  const method = methodOf(analysis);
  const newest = analysis.method ? newestVersion(analysis.method.id) : undefined;
  const { check } = analysis;
  const standards = outputStandards(context.proof, [analysis]);
  return {
    ...analysisRow(context, analysis, standards),
    purpose: analysis.purpose,
    elementId: analysis.elementId,
    assumptions: analysis.assumptions,
    inputs: analysis.inputs.map((binding) => inputView(context, analysis, binding)),
    lines: analysis.lines,
    results: analysis.results,
    method: analysis.method,
    newerMethod: newest && newest !== analysis.method?.version ? newest : null,
    proof: ownProofLines(context.proof, analysis),
    warnings: methodWarnings(study, model, analysis.id),
    cautions: method?.cautions ?? [],
    validity: method?.validity ?? '',
    reference: method?.reference ?? '',
    check: check && {
      person: personRef(context, check.personId),
      at: check.at,
      remark: check.remark,
      digest: check.digest,
      valid: isChecked(analysis),
    },
    couldVerify: couldVerify(context, analysis, standards),
    changePending: pendingChanges(study).get(analysis.id) ?? [],
    may: stepsOpenTo(context, analysis),
  };
}

/** An input with where it comes from, its present value, and why it has none where it has none. */
function inputView({ proof }: ViewContext, analysis: Analysis, binding: Binding): InputView {
  const { study, model } = proof;
  const method = methodOf(analysis);
  const ports = method
    ? methodInputs(
        method,
        analysis.inputs.map(({ name }) => name),
      )
    : [];
  const port = ports.find(({ name }) => name === binding.name);
  const source = sourcePort(study, binding.from);
  const tex = port?.tex ?? nameTex(binding.name);
  if (!source) {
    const failure = 'what it was bound to is no longer in the study';
    return {
      ...binding,
      tex,
      label: binding.name,
      sourceKey: '',
      dimension: '',
      shown: null,
      uncertainty: null,
      failure,
    };
  }
  const node = sourceNode(binding.from);
  const outcome = model.has(node) ? model.outcome(node) : null;
  return {
    ...binding,
    tex,
    label: port?.label ?? source.label,
    sourceKey: source.key,
    dimension: describeDimension(source.dimension),
    shown: outcome?.ok ? shownAt(source, outcome.value) : null,
    uncertainty: statedUncertainty(proof.study, binding),
    failure: outcome ? (outcome.ok ? '' : outcome.failure.message) : `${source.key} is not computed in this build`,
  };
}

function statedUncertainty(study: ViewContext['proof']['study'], { from }: Binding): Uncertainty | null {
  if ('quantityId' in from) return study.get('quantity', from.quantityId)?.uncertainty ?? null;
  if (!('analysisId' in from)) return null;
  const results = study.get('analysis', from.analysisId)?.results ?? [];
  return results.find(({ name }) => name === from.output)?.uncertainty ?? null;
}

/** Requirements that an output could be linked to, with the verdict it would give alone; those without evidence first. */
function couldVerify(
  context: ViewContext,
  analysis: Analysis,
  standards: ReadonlyMap<string, number | null>,
): AnalysisSheet['couldVerify'] {
  const { study } = context.proof;
  const outputs = outputsOf(study, analysis);
  const linked = new Set(
    study
      .find('verification', 'analysisId', analysis.id)
      .map(({ requirementId, output }) => `${requirementId} ${output}`),
  );
  const offers: (AnalysisSheet['couldVerify'][number] & { readonly bare: boolean })[] = [];
  for (const requirement of requirementsInForce(context)) {
    const { id, version, key, title, limit } = requirement;
    if (!limit) continue;
    const dimension = knownDimension(limit.value.unit);
    const bare = provenOf(context, id).verdict === 'no evidence';
    for (const port of outputs) {
      if (port.dimension !== dimension || linked.has(`${id} ${port.name}`)) continue;
      const known = analysis.kind !== 'external' && isTemperature(dimension);
      if (known && port.temperature !== limit.temperature) continue;
      const node = outputNode(analysis.id, port.name);
      const { verdict, percent } = wouldGive(context, node, standards.get(node) ?? 0, requirement, limit);
      offers.push({ id, version, key, title, output: port.name, verdict, percent, bare });
    }
  }
  return offers
    .sort((a, b) => Number(b.bare) - Number(a.bare) || byKey(a, b))
    .slice(0, OFFERED)
    .map(({ bare: _bare, ...offer }) => offer);
}

/** The verdict and margin that the value of a node with its standard uncertainty (SI) would give a requirement alone. */
function wouldGive(
  { proof }: ViewContext,
  node: string,
  standard: number,
  requirement: Parameters<typeof requiredMargin>[1],
  limit: Parameters<typeof judge>[0],
): Pick<AnalysisSheet['couldVerify'][number], 'verdict' | 'percent'> {
  const { study, model } = proof;
  const outcome = model.has(node) ? model.outcome(node) : null;
  if (!outcome?.ok) return { verdict: 'not computable', percent: null };
  const verdict = judge(limit, outcome.value, standard * study.settings.k, requiredMargin(study, requirement, limit));
  return {
    verdict,
    percent: marginView(limit, outcome.value, isTemperature(knownDimension(limit.value.unit))).percent,
  };
}

function stepsOpenTo(context: ViewContext, { id, version }: Analysis): CommandType[] {
  const trials: Command[] = [
    { type: 'analysis.revise', id, version, changes: {} },
    { type: 'analysis.remove', id, version },
    { type: 'analysis.check', id, version, remark: '' },
  ];
  return permitted(context, trials);
}
