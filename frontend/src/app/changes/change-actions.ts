import type { ChangeSheet } from '@shared/contract';

/** Something that can be done with a change request. */
export type ChangeStep =
  | 'withdraw'
  | 'edit'
  | 'look'
  | 'add'
  | 'submit'
  | 'assess'
  | 'refer'
  | 'defer'
  | 'reject'
  | 'approve'
  | 'against'
  | 'for';

/** A step as the title block offers it. */
export interface ChangeAction {
  readonly step: ChangeStep;
  readonly label: string;
  readonly main?: boolean;
  /** Why it cannot be done now; absent when it can. */
  readonly reason?: string;
}

/** What the page knows beside the sheet itself. */
export interface ActionSituation {
  readonly me: string | undefined;
  /** Whether the draft can be looked from, and whether one does so already. */
  readonly draft: 'closed' | 'open' | 'here';
}

/** The steps that this person may take now, in the order of the title block; the last is what most likely comes next. */
export function changeActions(sheet: ChangeSheet, situation: ActionSituation): readonly ChangeAction[] {
  const may = new Set(sheet.may);
  const actions: ChangeAction[] = [];
  if (may.has('change.withdraw')) actions.push({ step: 'withdraw', label: 'Withdraw' });
  if (may.has('change.revise')) actions.push({ step: 'edit', label: 'Edit' });
  if (situation.draft !== 'closed')
    actions.push({ step: 'look', label: situation.draft === 'here' ? 'Look from now' : 'Look from this draft' });
  if (may.has('change.amend')) actions.push({ step: 'add', label: 'Add an edit', main: sheet.summaries.length === 0 });
  if (may.has('change.submit') && sheet.summaries.length > 0)
    actions.push({ step: 'submit', label: 'Submit', main: true, ...because(submitProblem(sheet)) });
  if (may.has('change.assess')) actions.push({ step: 'assess', label: 'Take into assessment' });
  if (may.has('change.refer')) actions.push({ step: 'refer', label: 'Put before the board', main: true });
  const vote = may.has('change.vote');
  const hasVoted = sheet.board.some((seat) => seat.id === situation.me && seat.vote !== null);
  const votes: ChangeAction[] = vote
    ? [
        { step: 'against', label: 'Against' },
        { step: 'for', label: 'For', main: !(hasVoted && may.has('change.dispose')) },
      ]
    : [];
  const disposals: ChangeAction[] = may.has('change.dispose')
    ? [
        { step: 'defer', label: 'Defer' },
        { step: 'reject', label: 'Reject' },
        { step: 'approve', label: 'Approve', main: !vote || hasVoted, ...because(approvalProblem(sheet)) },
      ]
    : [];
  // A given vote can be changed, but is no longer what comes next.
  return hasVoted ? [...votes, ...actions, ...disposals] : [...actions, ...disposals, ...votes];
}

function because(reason: string): { readonly reason?: string } {
  return reason === '' ? {} : { reason };
}

function submitProblem(sheet: ChangeSheet): string {
  if (sheet.inConflict) return `${sheet.key} is in conflict. Take the current versions first.`;
  return sheet.reason.trim() === '' ? 'Say why the change is needed first: Edit, then the reason.' : '';
}

function approvalProblem(sheet: ChangeSheet): string {
  if (sheet.inConflict) return `${sheet.key} is in conflict; its author takes the current versions first.`;
  if (sheet.votesFor < sheet.quorum)
    return `${sheet.key} has ${sheet.votesFor} of the ${sheet.quorum} votes for it that approval needs.`;
  return sheet.impact.problem === null ? '' : sheet.impact.problem.message;
}
