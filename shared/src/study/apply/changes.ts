import type { ChangeRequest, ChangeState, Command, CommandOf } from '@shared/contract';
import { classOf, targetKind, withIds } from '../change-requests';
import { type Apply, type ApplyAll, type EditContext, freshId, given, nextKey, revised, target } from '../edit-context';
import { Refusal } from '../refusal';
import type { Study } from '../study';

function refuseUnlessAuthor(change: ChangeRequest, context: EditContext): void {
  if (change.authorId !== context.actorId) {
    throw new Refusal(
      'forbidden',
      `${change.key} was raised by ${context.personName(change.authorId)}; only its author edits it.`,
      { field: 'id', value: change.key, expected: 'a change request of your own' },
    );
  }
}

function refuseUnlessIn(change: ChangeRequest, states: readonly ChangeState[], what: string): void {
  if (!states.includes(change.state)) {
    throw new Refusal(
      'state',
      `${change.key} is ${change.state}; ${what} is possible while it is ${states.join(' or ')}.`,
      { field: 'id', value: change.key, expected: states.join(' or ') },
    );
  }
}

/** The change request commands; `applyAll` tries the proposed edits on a fork of the study. */
export function changeCommands(applyAll: ApplyAll) {
  /** Refuses edits that could not be approved as things stand. */
  const tryEdits = (study: Study, edits: readonly Command[], context: EditContext): void => {
    applyAll(study.fork(), edits, { ...context, authority: 'proposal' });
  };

  const write: Apply<'change.write'> = (study, command, context) => {
    const edits = withIds(command.edits, context.newId);
    tryEdits(study, edits, context);
    const change: ChangeRequest = {
      id: freshId(study, 'change', command, context),
      version: 1,
      key: nextKey(study, 'CR'),
      title: command.title,
      reason: command.reason,
      class: classOf(study, edits),
      authorId: context.actorId,
      due: command.due,
      state: 'draft',
      edits,
      votes: [],
      disposition: null,
    };
    study.put('change', change);
  };

  const amend: Apply<'change.amend'> = (study, command, context) => {
    const change = target(study, 'change', command);
    refuseUnlessAuthor(change, context);
    refuseUnlessIn(change, ['draft', 'deferred'], 'editing');
    const edits = [...change.edits, ...withIds(command.edits, context.newId)];
    tryEdits(study, edits, context);
    revised(study, 'change', change, { edits, class: classOf(study, edits) });
  };

  const drop: Apply<'change.drop'> = (study, command, context) => {
    const change = target(study, 'change', command);
    refuseUnlessAuthor(change, context);
    refuseUnlessIn(change, ['draft', 'deferred'], 'editing');
    if (!change.edits[command.index])
      throw new Refusal('invalid', `index: ${change.key} has no edit ${command.index + 1}.`, {
        field: 'index',
        value: String(command.index),
        expected: `0 to ${change.edits.length - 1}`,
      });
    const edits = withoutEdit(change.edits, command.index);
    revised(study, 'change', change, { edits, class: classOf(study, edits) });
  };

  const submit: Apply<'change.submit'> = (study, command, context) => {
    const change = target(study, 'change', command);
    refuseUnlessAuthor(change, context);
    refuseUnlessIn(change, ['draft', 'deferred'], 'submitting');
    if (!change.reason)
      throw new Refusal('invalid', 'reason: nothing was given; say why the change is needed before it is submitted.', {
        field: 'reason',
        value: '',
        expected: 'a reason',
      });
    if (change.edits.length === 0)
      throw new Refusal('invalid', `edits: ${change.key} proposes nothing yet; add at least one edit.`, {
        field: 'edits',
        value: '',
        expected: 'at least one edit',
      });
    orConflict(change, () => tryEdits(study, change.edits, context));
    revised(study, 'change', change, {
      state: change.state === 'deferred' ? 'in assessment' : 'submitted',
      votes: [],
      disposition: null,
    });
  };

  /** Proposed edits on the versions that their targets have now, each tried; edits whose target is gone are dropped. */
  const onCurrentVersions = (study: Study, edits: readonly Command[], context: EditContext): Command[] => {
    const fork = study.fork();
    return edits.flatMap((edit) => {
      const current = 'version' in edit ? fork.get(targetKind(edit), edit.id) : undefined;
      if ('version' in edit && !current) return [];
      const rebased = current ? ({ ...edit, version: current.version } as Command) : edit;
      applyAll(fork, [rebased], context);
      return [rebased];
    });
  };

  const rebase: Apply<'change.rebase'> = (study, command, context) => {
    const change = target(study, 'change', command);
    refuseUnlessAuthor(change, context);
    refuseUnlessIn(
      change,
      ['draft', 'submitted', 'in assessment', 'before the board', 'deferred'],
      'resolving a conflict',
    );
    const edits = onCurrentVersions(study, change.edits, { ...context, authority: 'proposal' });
    // What the board assessed was something else: it starts again.
    const state = change.state === 'draft' || change.state === 'deferred' ? change.state : 'submitted';
    revised(study, 'change', change, { edits, votes: [], state });
  };

  const dispose: Apply<'change.dispose'> = (study, command, context) => {
    const change = target(study, 'change', command);
    refuseUnlessIn(change, ['before the board'], 'a disposition');
    if (change.authorId === context.actorId)
      throw new Refusal('forbidden', `You raised ${change.key}; its author does not dispose of it.`, {
        field: 'id',
        value: change.key,
        expected: 'a change request raised by somebody else',
      });
    if (command.decision !== 'approved' && !command.reason) {
      const why = command.decision === 'rejected' ? 'say why it is rejected' : 'say what information is awaited';
      throw new Refusal('invalid', `reason: nothing was given; ${why}.`, {
        field: 'reason',
        value: '',
        expected: 'a reason',
      });
    }
    if (command.decision === 'approved') {
      const votesFor = change.votes.filter((vote) => vote.vote === 'for').length;
      const { quorum } = study.settings;
      if (votesFor < quorum) {
        throw new Refusal('state', `${change.key} has ${votesFor} of the ${quorum} votes for it that approval needs.`, {
          field: 'votes',
          value: String(votesFor),
          expected: `at least ${quorum} for`,
        });
      }
      // Versions are those the author saw: what has moved since makes the whole approval fail, and nothing is applied.
      orConflict(change, () =>
        applyAll(study, change.edits, { ...context, actorId: change.authorId, authority: 'board' }),
      );
    }
    revised(study, 'change', change, {
      state: command.decision,
      disposition: { decision: command.decision, personId: context.actorId, at: context.at, reason: command.reason },
    });
  };

  return { write, amend, drop, submit, rebase, dispose };
}

/** Says of an edit on something that has moved, or is gone, that the request is in conflict, and which edit it is. */
function orConflict(change: ChangeRequest, apply: () => void): void {
  try {
    apply();
  } catch (error) {
    if (!(error instanceof Refusal) || (error.code !== 'stale' && error.code !== 'not-found')) throw error;
    const edit = (error.command ?? 0) + 1;
    throw new Refusal(
      'conflict',
      `${change.key} is in conflict: what its edit ${edit} changes has moved since it was written. Its author resolves that first. ${error.message}`,
      { ...error.details, field: 'edits' },
    );
  }
}

/** The edits but for one; later edits of the same thing were written to follow on from it and step back by one version. */
function withoutEdit(edits: readonly Command[], dropped: number): Command[] {
  const gone = edits[dropped];
  return edits.flatMap((edit, index) => {
    if (index === dropped) return [];
    const follows = index > dropped && gone && 'version' in gone && 'version' in edit && edit.id === gone.id;
    return [follows ? { ...edit, version: Math.max(1, edit.version - 1) } : edit];
  });
}

/** Changes title, reason or due date of a change request that is not before the board yet. */
export const reviseChange: Apply<'change.revise'> = (study, command, context) => {
  const change = target(study, 'change', command);
  refuseUnlessAuthor(change, context);
  refuseUnlessIn(change, ['draft', 'submitted', 'deferred'], 'revising');
  revised(study, 'change', change, given(command.changes));
};

const step =
  (from: readonly ChangeState[], to: ChangeState, what: string) =>
  (study: Study, command: CommandOf<'change.assess'> | CommandOf<'change.refer'>): void => {
    const change = target(study, 'change', command);
    refuseUnlessIn(change, from, what);
    revised(study, 'change', change, { state: to, ...('due' in command && command.due ? { due: command.due } : {}) });
  };

/** Takes a submitted request into assessment. */
export const assessChange: Apply<'change.assess'> = step(['submitted'], 'in assessment', 'taking it into assessment');
/** Puts a request before the board. */
export const referChange: Apply<'change.refer'> = step(
  ['submitted', 'in assessment'],
  'before the board',
  'putting it before the board',
);

/** A member's vote; a later vote replaces the earlier one, and the author has none. */
export const voteOnChange: Apply<'change.vote'> = (study, command, context) => {
  const change = target(study, 'change', command);
  refuseUnlessIn(change, ['before the board'], 'voting');
  if (change.authorId === context.actorId)
    throw new Refusal('forbidden', `You raised ${change.key}; its author does not vote on it.`, {
      field: 'id',
      value: change.key,
      expected: 'a change request raised by somebody else',
    });
  if (command.vote === 'against' && !command.remark)
    throw new Refusal('invalid', 'remark: nothing was given; a vote against says why.', {
      field: 'remark',
      value: '',
      expected: 'a remark',
    });
  const others = change.votes.filter((vote) => vote.personId !== context.actorId);
  revised(study, 'change', change, {
    votes: [...others, { personId: context.actorId, vote: command.vote, remark: command.remark, at: context.at }],
  });
};

/** Takes a request back. */
export const withdrawChange: Apply<'change.withdraw'> = (study, command, context) => {
  const change = target(study, 'change', command);
  refuseUnlessAuthor(change, context);
  refuseUnlessIn(change, ['draft', 'submitted', 'in assessment', 'deferred'], 'withdrawing');
  revised(study, 'change', change, { state: 'withdrawn' });
};
