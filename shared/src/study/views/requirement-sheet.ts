import type { Requirement, RequirementLink, RequirementSheet, VerificationView } from '@shared/contract';
import { wordingFindings } from '../wording';
import { proofView } from './proof-view';
import { requirementMay } from './requirement-may';
import { childrenOf, flowRows, parentsOf } from './requirements-view';
import { turningPoints } from './turning-points';
import { byKey, judgementView, provenOf } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

/** What only the ledger knows: how the verdict moved, and the revision that last turned it away from the baseline. */
export interface RequirementHistory {
  readonly moves: RequirementSheet['moves'];
  readonly turnedBy: { readonly revision: number; readonly direct: boolean } | null;
}

/** Everything about one requirement, or null when the study has none of this key. */
export function requirementSheet(
  context: ViewContext,
  key: string,
  history: RequirementHistory,
): RequirementSheet | null {
  const { study } = context.proof;
  const requirement = study.byKey('requirement', key);
  if (!requirement) return null;
  const { id, text, rationale, parameter, elementId, openItem } = requirement;
  const { lowered = null, closed = null } = study.find('assessment', 'requirementId', id)[0] ?? {};
  return {
    ...flowRows(context)(requirement, { path: key, depth: 0, share: 'none' }),
    ...proofView(context, requirement),
    text,
    rationale,
    parameter,
    elementId,
    openItem,
    owner: personRef(context, requirement.ownerId),
    coOwners: requirement.coOwnerIds.map((personId) => personRef(context, personId)),
    baselinedIn: requirement.state === 'baselined' ? (context.baseline?.key ?? null) : null,
    verifications: verificationViews(context, requirement),
    turningPoints: turningPoints(context, requirement),
    flowDown: flowDownAround(context, requirement),
    departures: study.find('departure', 'requirementId', id),
    lowered: lowered && {
      to: lowered.to,
      reason: lowered.reason,
      person: personRef(context, lowered.personId),
      at: lowered.at,
    },
    closed: closed && { reason: closed.reason, person: personRef(context, closed.personId), at: closed.at },
    moves: history.moves,
    turnedBy: turnedSince(context, requirement, history.turnedBy),
    may: requirementMay(context, requirement),
    findings: wordingFindings(requirement),
  };
}

function turnedSince(
  context: ViewContext,
  requirement: Requirement,
  by: RequirementHistory['turnedBy'],
): RequirementSheet['turnedBy'] {
  const frozen = context.baseline?.verdicts.get(requirement.id);
  if (!by || !frozen || frozen === provenOf(context, requirement.id).verdict) return null;
  return { ...by, baselineVerdict: frozen };
}

function verificationViews(context: ViewContext, requirement: Requirement): VerificationView[] {
  const { study } = context.proof;
  return provenOf(context, requirement.id).judgements.flatMap((judgement) => {
    const verification = study.get('verification', judgement.verificationId);
    if (!verification) return [];
    const analysis = verification.analysisId ? study.get('analysis', verification.analysisId) : undefined;
    return {
      ...verification,
      verdict: judgementView(context, requirement, judgement),
      analysisKey: analysis?.key ?? null,
      analysisName: analysis?.name ?? null,
      person: verification.finding ? personRef(context, verification.finding.personId) : null,
    };
  });
}

/** Parents up to the top, the requirement, and its children; each a step deeper than what it serves. */
function flowDownAround(context: ViewContext, requirement: Requirement): RequirementLink[] {
  const above = new Map<string, { readonly requirement: Requirement; readonly steps: number }>();
  const climb = (from: Requirement, steps: number): void => {
    for (const { parent } of parentsOf(context, from.id)) {
      if ((above.get(parent.id)?.steps ?? 0) >= steps) continue;
      above.set(parent.id, { requirement: parent, steps });
      climb(parent, steps + 1);
    }
  };
  climb(requirement, 1);
  const direct = new Map(parentsOf(context, requirement.id).map(({ parent, trace }) => [parent.id, trace]));
  const height = Math.max(0, ...[...above.values()].map(({ steps }) => steps));
  const link = (
    other: Requirement,
    depth: number,
    trace?: { readonly id: string; readonly version: number; readonly share: RequirementLink['share'] },
  ): RequirementLink => ({
    id: other.id,
    key: other.key,
    title: other.title,
    depth,
    here: other.id === requirement.id,
    verdict: provenOf(context, other.id).verdict,
    traceId: trace?.id ?? null,
    traceVersion: trace?.version ?? 0,
    share: trace?.share ?? 'none',
  });
  return [
    ...[...above.values()]
      .sort((a, b) => b.steps - a.steps || byKey(a.requirement, b.requirement))
      .map(({ requirement: parent, steps }) => link(parent, height - steps, direct.get(parent.id))),
    link(requirement, height),
    ...childrenOf(context, requirement.id).map(({ child, trace }) => link(child, height + 1, trace)),
  ];
}
