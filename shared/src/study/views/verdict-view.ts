import { VERDICTS, type Requirement, type Shown, type Verdict, type VerdictView } from '@shared/contract';
import { isTemperature, knownDimension } from '../analysis-ports';
import type { Judgement, Proof, Proven } from '../prove';
import { complianceOf } from '../verdict';

/** What verdicts are read from; any proof will do, so that a state before and one after an edit read alike. */
export interface ProofSource {
  readonly proof: Proof;
}

/** Requirements that are not withdrawn, sorted by key. */
export function requirementsInForce({ proof }: ProofSource): Requirement[] {
  return proof.study
    .all('requirement')
    .filter((requirement) => requirement.state !== 'withdrawn')
    .sort(byKey);
}

const KEYS = new Intl.Collator('en', { numeric: true });

/** Order of keys as people read them: VEH-2 before VEH-10. */
export function byKey(a: { readonly key: string }, b: { readonly key: string }): number {
  return KEYS.compare(a.key, b.key);
}

/** Derived state of a requirement; every requirement of a proved study has one. */
export function provenOf({ proof }: ProofSource, requirementId: string): Proven {
  const proven = proof.proven.get(requirementId);
  if (!proven) throw new Error(`requirement ${requirementId} was not proved`);
  return proven;
}

/** A value (SI) of a requirement's limit's dimension, shown in the limit's unit; SI when there is no limit. */
export function shownByLimit(requirement: Pick<Requirement, 'limit'>, si: number): Shown {
  const { limit } = requirement;
  if (!limit) return { si, unit: '' };
  const { unit } = limit.value;
  const difference = limit.temperature === 'difference' && isTemperature(knownDimension(unit));
  return difference ? { si, unit, difference } : { si, unit };
}

/** The computed answer for a requirement, in the unit of its limit. */
export function verdictView(source: ProofSource, requirement: Requirement): VerdictView {
  const proven = provenOf(source, requirement.id);
  const { compliance, computedCompliance, closeOut } = proven;
  return { ...answer(source, requirement, proven), compliance, computedCompliance, closeOut };
}

/** What one of several verifications says on its own. */
export function judgementView(source: ProofSource, requirement: Requirement, judgement: Judgement): VerdictView {
  const compliance = complianceOf(judgement.verdict);
  const { closeOut } = provenOf(source, requirement.id);
  return { ...answer(source, requirement, judgement), compliance, computedCompliance: compliance, closeOut };
}

function answer(
  { proof }: ProofSource,
  requirement: Requirement,
  judged: Omit<Judgement, 'verificationId'>,
): Omit<VerdictView, 'compliance' | 'computedCompliance' | 'closeOut'> {
  const { verdict, value, expanded, margin, required, reason, warnings, basis } = judged;
  const shown = value === null ? null : shownByLimit(requirement, value);
  return { verdict, value: shown, expanded, k: proof.study.settings.k, margin, required, reason, warnings, basis };
}

/** How many of some verdicts are of each word, zeros included. */
export function countVerdicts(verdicts: Iterable<Verdict>): Record<Verdict, number> {
  const counts = Object.fromEntries(VERDICTS.map((verdict) => [verdict, 0])) as Record<Verdict, number>;
  for (const verdict of verdicts) counts[verdict] += 1;
  return counts;
}

/** Verdicts of all requirements in force, counted by word. */
export function verdictCounts(source: ProofSource): Record<Verdict, number> {
  return countVerdicts(requirementsInForce(source).map(({ id }) => provenOf(source, id).verdict));
}
