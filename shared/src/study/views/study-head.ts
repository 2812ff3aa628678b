import type { Baseline, StudyHead, StudyMember } from '@shared/contract';
import { isOpen } from '../change-requests';
import { isOnBoard } from './changes-view';
import { byKey, requirementsInForce } from './verdict-view';
import type { ViewContext } from './view-context';

/**
 * What the title block needs at a standpoint. `baselines` are those that can be looked at from here, which at an earlier
 * standpoint are more than the study then held; without them, those that it holds.
 */
export function studyHead(
  context: ViewContext,
  members: readonly StudyMember[],
  baselines: readonly Baseline[] = context.proof.study.all('baseline'),
): StudyHead {
  const { study } = context.proof;
  const inForce = baselines.find(({ key }) => key === context.baseline?.key);
  return {
    study: study.settings,
    standpoint: context.standpoint,
    revision: context.revision,
    baselineInForce: inForce ? { key: inForce.key, name: inForce.name, review: inForce.review } : null,
    baselines: [...baselines].sort(byKey).map(({ key, name, review, revision }) => ({ key, name, review, revision })),
    drafts: study
      .all('change')
      .filter((change) => isOpen(change) && (change.authorId === context.me.id || isOnBoard(context)))
      .sort(byKey)
      .map(({ key, title, state, authorId }) => ({ key, title, state, mine: authorId === context.me.id })),
    provedAt: context.provedAt,
    verdicts: requirementsInForce(context).length,
    roles: context.roles,
    me: context.me,
    members: members.map(({ id, name, roles }) => ({ id, name, roles })),
    policies: study.all('policy'),
  };
}
