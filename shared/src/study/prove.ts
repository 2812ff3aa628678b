import type {
  Compliance,
  Finding,
  MarginView,
  Patch,
  Requirement,
  RequiredMargin,
  Verdict,
  Verification,
} from '@shared/contract';
import type { Model, Outcome } from '@shared/engine';
import { digestOf } from './digest';
import { isTemperature, knownDimension, methodInputs, methodOf } from './analysis-ports';
import { modelChange, modelOf, outputNode, sourceNode, uncertainInputs } from './model';
import { requiredMargin } from './required-margin';
import { standardsOf } from './standard-uncertainties';
import type { Study } from './study';
import { complianceOf, judge, lowers, marginView, worseVerdict } from './verdict';

/** What one verification says about its requirement. */
export interface Judgement {
  readonly verificationId: string;
  readonly verdict: Verdict;
  readonly value: number | null;
  readonly expanded: number | null;
  readonly margin: MarginView | null;
  readonly required: RequiredMargin | null;
  readonly reason: string;
  readonly warnings: readonly string[];
  readonly basis: 'predicted' | 'demonstrated' | null;
}

/** Derived state of one requirement. Only proving writes it; it is stored for queries and checked by the full re-proof. */
export interface Proven extends Omit<Judgement, 'verificationId'> {
  readonly requirementId: string;
  /** The verification that decides; null when none is linked. */
  readonly verificationId: string | null;
  readonly judgements: readonly Judgement[];
  readonly computedCompliance: Compliance;
  readonly compliance: Compliance;
  readonly closeOut: 'open' | 'closed' | 'reopened';
  /** What a close-out signature covers. */
  readonly digest: string;
}

/** A study with its compiled model and everything derived from it. */
export interface Proof {
  readonly study: Study;
  readonly model: Model;
  readonly proven: ReadonlyMap<string, Proven>;
  readonly uncertain: ReadonlyMap<string, number>;
}

/** Proves the whole study from scratch. */
export function proveAll(study: Study): Proof {
  const model = modelOf(study);
  const uncertain = uncertainInputs(study);
  const requirements = study.all('requirement');
  const standards = standardsBehind(
    study,
    model,
    uncertain,
    requirements.map((requirement) => requirement.id),
  );
  const proven = new Map<string, Proven>();
  for (const requirement of requirements)
    proven.set(requirement.id, proveRequirement(study, model, standards, requirement));
  return { study, model, proven, uncertain };
}

/** What re-proving after an edit found: the requirements whose derived state changed, and how to take it over. */
export interface Reproof {
  readonly changed: ReadonlyMap<string, Proven | null>;
  /** Output nodes whose outcome changed, with what they are now. */
  readonly outcomes: ReadonlyMap<string, Outcome | null>;
  /** Takes the result over into the proof of the base, once the edit is committed. */
  readonly publish: () => Proof;
}

/**
 * Re-proves what an edit affects. `fork` is the study with the edit applied, `patch` what differs from the proof's study.
 * The base proof is left bit-identical until `publish` is called.
 */
export function reprove(base: Proof, fork: Study, patch: Patch): Reproof {
  const change = modelChange(patch);
  const settingsMoved = patch.some(
    (entry) =>
      entry.kind === 'policy' ||
      (entry.kind === 'study' &&
        (entry.before?.k !== entry.after?.k || entry.before?.maturity !== entry.after?.maturity)),
  );
  if (change.rebuild) {
    const next = proveAll(fork);
    return {
      changed: differences(base.proven, next.proven),
      outcomes: allOutcomes(base, next),
      publish: () => ({ ...next, study: base.study }),
    };
  }
  const uncertain = change.touched.length > 0 ? uncertainInputs(fork) : base.uncertain;
  const { changed, outcomes } = base.model.whatIf(change.values, (moved) => {
    const affected = settingsMoved
      ? fork.all('requirement').map((requirement) => requirement.id)
      : [...affectedRequirements(base, fork, patch, change.touched)];
    const standards = standardsBehind(fork, base.model, uncertain, affected);
    const found = new Map<string, Proven | null>();
    for (const id of affected) {
      const requirement = fork.get('requirement', id);
      const after = requirement ? proveRequirement(fork, base.model, standards, requirement) : null;
      if (!sameProven(base.proven.get(id) ?? null, after)) found.set(id, after);
    }
    const now = new Map<string, Outcome | null>(
      moved.filter((id) => id.startsWith('a:')).map((id) => [id, base.model.outcome(id)]),
    );
    return { changed: found, outcomes: now };
  });
  return {
    changed,
    outcomes,
    publish: () => {
      base.model.set(change.values);
      const proven = base.proven as Map<string, Proven>;
      for (const [id, after] of changed) {
        if (after) proven.set(id, after);
        else proven.delete(id);
      }
      return { study: base.study, model: base.model, proven, uncertain };
    },
  };
}

/** The derived state of a fork, for drafts and earlier standpoints: the base with the differences laid over it. */
export function proveFork(base: Proof, fork: Study): Proof {
  const patch = fork.patch();
  if (modelChange(patch).rebuild || modelChange(patch).values.size > 0) return proveAll(fork);
  const { changed } = reprove(base, fork, patch);
  const proven = new Map(base.proven);
  for (const [id, after] of changed) {
    if (after) proven.set(id, after);
    else proven.delete(id);
  }
  return {
    study: fork,
    model: base.model,
    proven,
    uncertain: modelChange(patch).touched.length > 0 ? uncertainInputs(fork) : base.uncertain,
  };
}

function affectedRequirements(base: Proof, fork: Study, patch: Patch, touched: readonly string[]): Set<string> {
  const ids = new Set<string>();
  for (const entry of patch) {
    if (entry.kind === 'requirement') ids.add(entry.id);
    if (entry.kind === 'verification' || entry.kind === 'assessment' || entry.kind === 'departure') {
      if (entry.before) ids.add(entry.before.requirementId);
      if (entry.after) ids.add(entry.after.requirementId);
    }
  }
  const analyses = new Set<string>();
  for (const node of touched) {
    for (const below of base.model.dependantsOf(node))
      if (below.startsWith('a:')) analyses.add(below.slice(2, below.indexOf('.')));
  }
  for (const id of analyses)
    for (const verification of fork.find('verification', 'analysisId', id)) ids.add(verification.requirementId);
  return ids;
}

function differences(
  before: ReadonlyMap<string, Proven>,
  after: ReadonlyMap<string, Proven>,
): Map<string, Proven | null> {
  const changed = new Map<string, Proven | null>();
  for (const [id, proven] of after) if (!sameProven(before.get(id) ?? null, proven)) changed.set(id, proven);
  for (const id of before.keys()) if (!after.has(id)) changed.set(id, null);
  return changed;
}

function allOutcomes(base: Proof, next: Proof): Map<string, Outcome | null> {
  const outcomes = new Map<string, Outcome | null>();
  for (const node of outputNodes(next.study)) {
    const now = next.model.outcome(node);
    if (!base.model.has(node) || !sameOutcome(base.model.outcome(node), now)) outcomes.set(node, now);
  }
  for (const node of outputNodes(base.study)) if (!next.model.has(node)) outcomes.set(node, null);
  return outcomes;
}

/** Nodes of all analysis outputs of a study. */
export function outputNodes(study: Study): string[] {
  return study.all('analysis').flatMap((analysis) => {
    if (analysis.kind === 'formula') return analysis.lines.map((line) => outputNode(analysis.id, line.name));
    if (analysis.kind === 'external') return analysis.results.map((result) => outputNode(analysis.id, result.name));
    return (methodOf(analysis)?.outputs ?? []).map((port) => outputNode(analysis.id, port.name));
  });
}

function sameOutcome(a: Outcome, b: Outcome): boolean {
  if (a.ok && b.ok) return Object.is(a.value, b.value);
  return !a.ok && !b.ok && a.failure.message === b.failure.message;
}

/** Whether two derived states are the same to the bit; plain data, so the text says it. */
export function sameProven(a: Proven | null, b: Proven | null): boolean {
  return a === b || JSON.stringify(a) === JSON.stringify(b);
}

/** Standard uncertainties of everything that verifies the given requirements. */
function standardsBehind(
  study: Study,
  model: Model,
  uncertain: ReadonlyMap<string, number>,
  requirementIds: Iterable<string>,
): Map<string, number | null> {
  const nodes = new Set<string>();
  for (const id of requirementIds) {
    for (const { analysisId, output } of study.find('verification', 'requirementId', id)) {
      const node = analysisId && output ? outputNode(analysisId, output) : null;
      if (node && model.has(node) && model.outcome(node).ok) nodes.add(node);
    }
  }
  return standardsOf(model, uncertain, [...nodes]);
}

function proveRequirement(
  study: Study,
  model: Model,
  standards: ReadonlyMap<string, number | null>,
  requirement: Requirement,
): Proven {
  const verifications = study.find('verification', 'requirementId', requirement.id);
  const judgements = verifications.map((verification) =>
    judgeVerification(study, model, standards, requirement, verification),
  );
  const marked = verifications.find((verification) => verification.deciding);
  const deciding = judgements.find((judgement) => judgement.verificationId === marked?.id) ?? worst(judgements);
  const nothing = {
    verificationId: null,
    verdict: 'no evidence' as const,
    value: null,
    expanded: null,
    margin: null,
    required: null,
    reason: 'nothing is linked that verifies it',
    warnings: [],
    basis: null,
  };
  const decided = deciding ?? nothing;
  const computedCompliance = complianceOf(decided.verdict);
  const assessment = study.find('assessment', 'requirementId', requirement.id)[0];
  const lowered = assessment?.lowered?.to;
  const compliance = lowered && lowers(computedCompliance, lowered) ? lowered : computedCompliance;
  const departures = study
    .find('departure', 'requirementId', requirement.id)
    .filter((departure) => departure.state === 'in force');
  const digest = digestOf({
    version: requirement.version,
    verdict: decided.verdict,
    value: decided.value === null ? null : decided.value.toPrecision(12),
    compliance,
    departures: departures.map((departure) => departure.id),
  });
  const closeOut = !assessment?.closed ? 'open' : assessment.closed.digest === digest ? 'closed' : 'reopened';
  return { ...decided, requirementId: requirement.id, judgements, computedCompliance, compliance, closeOut, digest };
}

function worst(judgements: readonly Judgement[]): Judgement | undefined {
  let found: Judgement | undefined;
  for (const judgement of judgements)
    if (
      !found ||
      (judgement.verdict !== found.verdict && worseVerdict(judgement.verdict, found.verdict) === judgement.verdict)
    )
      found = judgement;
  return found;
}

function judgeVerification(
  study: Study,
  model: Model,
  standards: ReadonlyMap<string, number | null>,
  requirement: Requirement,
  verification: Verification,
): Judgement {
  const empty = {
    verificationId: verification.id,
    value: null,
    expanded: null,
    margin: null,
    required: null,
    warnings: [],
    basis: null,
  };
  if (verification.finding) return { ...empty, ...judgeFinding(verification.finding, verification.method) };
  const analysis = verification.analysisId ? study.get('analysis', verification.analysisId) : undefined;
  if (!analysis || !verification.output) {
    return {
      ...empty,
      verdict: 'no evidence',
      reason:
        verification.method === 'analysis' ? 'no analysis is linked' : `the ${verification.method} has no finding yet`,
    };
  }
  if (!requirement.limit) return { ...empty, verdict: 'no evidence', reason: 'there is no limit to compare with' };
  const node = outputNode(analysis.id, verification.output);
  if (!model.has(node))
    return {
      ...empty,
      verdict: 'not computable',
      reason: `${analysis.key} pins a method version that this build does not have`,
    };
  const outcome = model.outcome(node);
  if (!outcome.ok) return { ...empty, verdict: 'not computable', reason: outcome.failure.message, basis: 'predicted' };
  const standard = standards.get(node) ?? null;
  const expanded = standard === null ? null : standard * study.settings.k;
  const required = requiredMargin(study, requirement, requirement.limit);
  const warnings = methodWarnings(study, model, analysis.id);
  if (expanded === null) warnings.push('no uncertainty stated');
  const verdict = judge(requirement.limit, outcome.value, expanded ?? 0, required);
  const margin = marginView(
    requirement.limit,
    outcome.value,
    isTemperature(knownDimension(requirement.limit.value.unit)),
  );
  return {
    ...empty,
    verdict,
    value: outcome.value,
    expanded,
    margin,
    required,
    reason: '',
    warnings,
    basis: 'predicted',
  };
}

function judgeFinding(finding: Finding, method: string): Pick<Judgement, 'verdict' | 'reason' | 'basis'> {
  return {
    verdict: finding.met ? 'compliant' : 'non-compliant',
    reason: `found ${finding.met ? 'met' : 'not met'} by ${method}, ${finding.document}${finding.issue ? ` issue ${finding.issue}` : ''}`,
    basis: 'demonstrated',
  };
}

/** Warnings of the method behind an analysis at its present inputs. */
export function methodWarnings(study: Study, model: Model, analysisId: string): string[] {
  const analysis = study.get('analysis', analysisId);
  const method = analysis && methodOf(analysis);
  if (!analysis || !method) return [];
  const values = methodValues(study, model, analysisId);
  const result = values && method.compute(values);
  return result?.ok ? [...result.warnings] : [];
}

/** Present input values of a method analysis by port, or null when one cannot be computed. */
export function methodValues(study: Study, model: Model, analysisId: string): Record<string, number> | null {
  const analysis = study.get('analysis', analysisId);
  const method = analysis && methodOf(analysis);
  if (!analysis || !method) return null;
  const values: Record<string, number> = {};
  const bound = new Map(analysis.inputs.map((binding) => [binding.name, sourceNode(binding.from)]));
  for (const port of methodInputs(method, [...bound.keys()])) {
    const node = bound.get(port.name);
    const outcome: Outcome | null = node ? model.outcome(node) : null;
    if (outcome && !outcome.ok) return null;
    const value = outcome ? outcome.value : port.default;
    if (value === undefined) return null;
    values[port.name] = value;
  }
  return values;
}
