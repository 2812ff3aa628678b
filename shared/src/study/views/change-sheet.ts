import type { ChangeRequest, ChangeSheet, Command, CommandType, Impact, StudyMember } from '@shared/contract';
import type { Study } from '../study';
import { changeRow, seesChange } from './changes-view';
import { editSummaries } from './edit-summary';
import { permitted } from './permitted';
import { isInConflict } from './proposed-edits';
import { personRef, type ViewContext } from './view-context';

/** What only the database knows about a change request. */
export interface ChangeFacts {
  /** Members of the study with their roles: who is on the board. */
  readonly members: readonly StudyMember[];
  /** Revision that disposed of it. */
  readonly disposedAt: number | null;
  /** The study just before its approval, for the old values of its edits. */
  readonly before: Study | null;
}
const UNKNOWN: ChangeFacts = { members: [], disposedAt: null, before: null };

/** Everything about one change request; null when there is none, or none that this person may see. */
export function changeSheet(
  context: ViewContext,
  key: string,
  impact: Impact,
  facts: ChangeFacts = UNKNOWN,
): ChangeSheet | null {
  const { study } = context.proof;
  const change = study.byKey('change', key);
  if (!change || !seesChange(context, change)) return null;
  const personName = (id: string): string => personRef(context, id).name;
  const { disposition } = change;
  return {
    ...changeRow(context, change),
    reason: change.reason,
    summaries: editSummaries(study, change, personName, facts.before),
    impact,
    board: board(context, change, facts.members),
    disposition: disposition && {
      ...disposition,
      person: personRef(context, disposition.personId),
      revision: facts.disposedAt,
    },
    may: stepsOpenTo(context, change),
  };
}

/** Everybody on the board with their vote, the chair first; whoever voted and left the board since is still shown. */
function board(context: ViewContext, change: ChangeRequest, members: readonly StudyMember[]): ChangeSheet['board'] {
  const seats = members
    .filter(({ roles }) => roles.includes('board-member') || roles.includes('board-chair'))
    .map(({ id, name, roles }) => ({ id, name, chair: roles.includes('board-chair') }));
  const gone = change.votes
    .filter(({ personId }) => !seats.some(({ id }) => id === personId))
    .map(({ personId }) => ({ ...personRef(context, personId), chair: false }));
  return [...seats, ...gone]
    .sort((a, b) => Number(b.chair) - Number(a.chair) || a.name.localeCompare(b.name, 'en'))
    .map((seat) => ({
      ...seat,
      vote: change.votes.find(({ personId }) => personId === seat.id) ?? null,
      author: seat.id === change.authorId,
    }));
}

/** Steps of procedure that this person could take now. */
function stepsOpenTo(context: ViewContext, change: ChangeRequest): CommandType[] {
  const { id, version } = change;
  const seen = { id, version };
  const trials: Command[] = [
    { type: 'change.revise', ...seen, changes: {} },
    { type: 'change.drop', ...seen, index: 0 },
    { type: 'change.rebase', ...seen },
    { type: 'change.submit', ...seen },
    { type: 'change.assess', ...seen },
    { type: 'change.refer', ...seen, due: null },
    { type: 'change.vote', ...seen, vote: 'for', remark: '' },
    { type: 'change.dispose', ...seen, decision: 'deferred', reason: 'tried' },
    { type: 'change.withdraw', ...seen, reason: 'tried' },
  ];
  const may = permitted(context, trials);
  const steps = isInConflict(context.proof.study, change) ? may : may.filter((type) => type !== 'change.rebase');
  // More edits can be proposed exactly where proposed ones can be dropped.
  const draftable = may.includes('change.drop');
  return draftable ? [...steps, 'change.amend'] : steps;
}
