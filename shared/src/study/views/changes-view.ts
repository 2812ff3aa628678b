import type { ChangeRequest, ChangeRow, ChangesView } from '@shared/contract';
import { isOpen } from '../change-requests';
import { byKey } from './verdict-view';
import { isInConflict } from './proposed-edits';
import { personRef, type ViewContext } from './view-context';

/** Change requests: what waits for a disposition first, then the rest, newest first within each. */
export function changesView(context: ViewContext): ChangesView {
  const changes = context.proof.study.all('change').filter((change) => seesChange(context, change));
  changes.sort((a, b) => Number(isOpen(b)) - Number(isOpen(a)) || byKey(b, a));
  return { rows: changes.map((change) => changeRow(context, change)) };
}

/** A draft is its author's until it is submitted; from then on everybody in the study sees it. */
export function seesChange(context: ViewContext, change: ChangeRequest): boolean {
  return change.state !== 'draft' || change.authorId === context.me.id || isOnBoard(context);
}

/** Whether the person acts on the configuration board of this study. */
export function isOnBoard({ roles }: Pick<ViewContext, 'roles'>): boolean {
  return roles.includes('board-member') || roles.includes('board-chair');
}

/** One change request as a line of the list. */
export function changeRow(context: ViewContext, change: ChangeRequest): ChangeRow {
  const { study } = context.proof;
  const { id, version, key, title, state, due, edits, votes } = change;
  return {
    id,
    version,
    key,
    title,
    class: change.class,
    state,
    inConflict: isInConflict(study, change),
    author: personRef(context, change.authorId),
    due,
    edits: edits.length,
    votesFor: votes.filter(({ vote }) => vote === 'for').length,
    votesAgainst: votes.filter(({ vote }) => vote === 'against').length,
    quorum: study.settings.quorum,
  };
}
