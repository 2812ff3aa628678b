import {
  COMPLIANCES,
  type Compliance,
  type ComplianceView,
  type Departure,
  type MatrixHeader,
  type MatrixRow,
  type Requirement,
  type Limit,
  type RequiredMargin,
  type Verification,
} from '@shared/contract';
import { methodOf } from '../analysis-ports';
import { definitionDigest } from '../apply/analyses';
import { requiredInWords } from './comparison';
import { READING_ORDER } from './reading-order';
import { parentsOf } from './requirements-view';
import { byKey, countVerdicts, provenOf, requirementsInForce, verdictView } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

export const CAUTION =
  'Concept-level estimate. It supports concept decisions and does not replace licensed engineering, range safety, radiation protection or local codes.';

/** The compliance matrix: one row for each requirement in force, the bad news first. */
export function complianceView(context: ViewContext): ComplianceView {
  const rows = requirementsInForce(context)
    .map((requirement) => matrixRow(context, requirement))
    .sort((a, b) => READING_ORDER.indexOf(a.verdict) - READING_ORDER.indexOf(b.verdict) || byKey(a, b));
  return { header: matrixHeader(context, rows), rows };
}

function matrixHeader(context: ViewContext, rows: readonly MatrixRow[]): MatrixHeader {
  const { study } = context.proof;
  const { settings } = study;
  const baseline = context.baseline ? study.byKey('baseline', context.baseline.key) : undefined;
  const counts = Object.fromEntries(COMPLIANCES.map((word) => [word, 0])) as Record<Compliance, number>;
  for (const row of rows) counts[row.compliance] += 1;
  const bases = new Set(rows.map(({ basis }) => basis));
  const keys = new Set(rows.map(({ id }) => id));
  return {
    study: settings.name,
    studyKey: settings.key,
    phase: settings.phase,
    standpoint: context.standpoint.label,
    baseline: baseline ? `${baseline.key} ${baseline.name}` : '',
    digest: baseline?.digest ?? '',
    revision: context.standpoint.revision,
    ledgerHead: context.ledgerHead,
    at: context.provedAt,
    basis: !bases.has('demonstrated')
      ? 'predicted'
      : bases.has('predicted')
        ? 'predicted and demonstrated'
        : 'demonstrated',
    counts,
    verdicts: countVerdicts(rows.map(({ verdict }) => verdict)),
    closedRows: rows.filter(({ closeOut }) => closeOut === 'closed').length,
    openItems: requirementsInForce(context).filter(({ openItem }) => openItem !== null).length,
    departuresInForce: study
      .all('departure')
      .filter((departure) => departure.state === 'in force' && keys.has(departure.requirementId)).length,
    decisionRule: decisionRule(settings.k),
    caution: CAUTION,
  };
}

/** The rule by which uncertainty enters a verdict, in a sentence. */
export function decisionRule(k: number): string {
  return `A value x with expanded uncertainty U (k = ${k}) is compliant when all of x ± U lies on the good side of the limit and the margin that policy requires is met, short of margin when only the latter is not; non-compliant when all of x ± U lies on the bad side; otherwise indeterminate. A value within 1 part in 10⁹ of the limit counts as at the limit, on the good side.`;
}

function matrixRow(context: ViewContext, requirement: Requirement): MatrixRow {
  const { study } = context.proof;
  const { id, version, key, title, text, limit, state } = requirement;
  const { verdict, value, expanded, k, margin, required, compliance, basis, closeOut } = verdictView(
    context,
    requirement,
  );
  const verifications = study.find('verification', 'requirementId', id);
  const decides = provenOf(context, id).verificationId;
  const deciding = verifications.find((verification) => verification.id === decides);
  const element = requirement.elementId ? study.get('element', requirement.elementId) : undefined;
  return {
    id,
    version,
    key,
    title,
    text,
    parents: parentsOf(context, id).map(({ parent }) => parent.key),
    limit,
    method: distinct(verifications.map(({ method }) => method)),
    level: distinct(verifications.map(({ level }) => level)) || requirement.level,
    stage: distinct(verifications.map(({ stage, gate }) => [stage, gate].filter(Boolean).join(', '))),
    criterion: deciding?.criterion ?? '',
    verdict,
    value,
    expanded,
    k,
    policy: policyInWords(limit, required),
    margin,
    required,
    compliance,
    basis,
    evidence: distinct(verifications.map((verification) => evidenceOf(context, verification))),
    placard: distinct(verifications.map((verification) => placardOf(context, verification))),
    departure: study
      .find('departure', 'requirementId', id)
      .filter(({ state: now }) => now === 'in force')
      .map(departureInWords)
      .join('; '),
    closeOut,
    reason: reasonOf(context, requirement),
    owner: personRef(context, requirement.ownerId).name,
    signature: signatureOf(context, requirement),
    element: element ? `${element.key} ${element.name}` : '',
    state,
  };
}

function distinct(words: readonly string[]): string {
  return [...new Set(words.filter(Boolean))].join('; ');
}

function policyInWords(limit: Limit | null, required: RequiredMargin | null): string {
  if (!limit || !required) return '';
  const source = required.source ? ` (${required.source})` : '';
  return `${requiredInWords(limit, required)}, ${required.definition}${source}`;
}

/** "deviation DEV-001 in force until 2027-01-31 for items 1 to 3". */
export function departureInWords(departure: Departure): string {
  const until = departure.expires ? ` until ${departure.expires}` : '';
  const items = departure.effectivity ? ` for ${departure.effectivity}` : '';
  return `${departure.kind} ${departure.key} ${departure.state}${until}${items}`;
}

function evidenceOf({ proof: { study } }: ViewContext, { finding, analysisId }: Verification): string {
  if (finding) return finding.issue ? `${finding.document} issue ${finding.issue}` : finding.document;
  const analysis = analysisId ? study.get('analysis', analysisId) : undefined;
  return analysis ? `${analysis.key} version ${analysis.version}` : '';
}

/** What a reader must know before relying on the evidence: an unsigned analysis, warnings of its method, missing uncertainty. */
function placardOf(context: ViewContext, verification: Verification): string {
  const { study } = context.proof;
  if (verification.finding || !verification.analysisId) return '';
  const analysis = study.get('analysis', verification.analysisId);
  if (!analysis) return '';
  const said: string[] = [];
  if (!analysis.check) said.push(`${analysis.key} not checked`);
  else if (analysis.check.digest !== definitionDigest(analysis)) said.push(`check of ${analysis.key} void`);
  const judgement = provenOf(context, verification.requirementId).judgements.find(
    ({ verificationId }) => verificationId === verification.id,
  );
  said.push(...(judgement?.warnings ?? []));
  const cautions = methodOf(analysis)?.cautions.length ?? 0;
  if (cautions > 0) said.push(`method cautions apply (${analysis.key})`);
  return said.join('; ');
}

function reasonOf(context: ViewContext, requirement: Requirement): string {
  const { reason, closeOut } = provenOf(context, requirement.id);
  const assessment = context.proof.study.find('assessment', 'requirementId', requirement.id)[0];
  const said = [reason];
  if (assessment?.lowered) said.push(`lowered to ${assessment.lowered.to}: ${assessment.lowered.reason}`);
  if (assessment?.closed)
    said.push(
      closeOut === 'reopened'
        ? 'reopened: what its close-out signed has changed'
        : `closed: ${assessment.closed.reason}`,
    );
  return said.filter(Boolean).join('; ');
}

/** "Lena Brandt, 2026-03-02, closed": name, day and meaning of each signature on the row. */
function signatureOf(context: ViewContext, requirement: Requirement): string {
  const { study } = context.proof;
  const signed = (personId: string, at: string, meaning: string): string =>
    `${personRef(context, personId).name}, ${at.slice(0, 10)}, ${meaning}`;
  const said: string[] = [];
  for (const { finding, analysisId } of study.find('verification', 'requirementId', requirement.id)) {
    if (finding) said.push(signed(finding.personId, finding.at, 'found'));
    const analysis = analysisId ? study.get('analysis', analysisId) : undefined;
    if (analysis?.check) said.push(signed(analysis.check.personId, analysis.check.at, `checked ${analysis.key}`));
  }
  const closed = study.find('assessment', 'requirementId', requirement.id)[0]?.closed;
  if (closed && provenOf(context, requirement.id).closeOut === 'closed')
    said.push(signed(closed.personId, closed.at, 'closed'));
  return distinct(said);
}
