import type { ChangeRequest, Command } from '@shared/contract';
import { applyCommands } from '../apply';
import { isOpen, targetKind } from '../change-requests';
import { labelOf, type EditContext } from '../edit-context';
import { newId } from '../ids';
import { Refusal } from '../refusal';
import type { Study } from '../study';

const noFacts = (): never => {
  throw new Error('an edit of a change request asked for a row of the matrix');
};

function proposalContext(change: ChangeRequest): EditContext {
  return {
    actorId: change.authorId,
    roles: [],
    at: '',
    newId: () => newId(),
    revision: 0,
    authority: 'proposal',
    patchOf: () => null,
    personName: (id) => id,
  };
}

/**
 * Goes through the edits of a change request in order, on an overlay: each is shown the study as the edits before it leave
 * it, with the sentence that says how its target has moved since it was written (empty when it has not).
 */
export function walkEdits(
  study: Study,
  change: ChangeRequest,
  visit: (fork: Study, edit: Command, index: number, conflict: string) => void,
): void {
  const fork = study.fork();
  const context = proposalContext(change);
  // By how much the target of an edit has moved on since it was written; later edits of it were written to follow on.
  const drift = new Map<string, number>();
  const unsure = new Set<string>();
  change.edits.forEach((edit, index) => {
    if (!('version' in edit) || unsure.has(edit.id)) {
      visit(fork, edit, index, '');
      applied(edit);
      return;
    }
    const kind = targetKind(edit);
    const current = fork.get(kind, edit.id);
    const expected = edit.version + (drift.get(edit.id) ?? 0);
    if (!current) {
      visit(fork, edit, index, `What this edits (${kind}) is no longer in the study.`);
      unsure.add(edit.id);
      return;
    }
    drift.set(edit.id, current.version - edit.version);
    visit(fork, edit, index, current.version === expected ? '' : moved(labelOf(fork, kind, current), edit, current));
    applied({ ...edit, version: current.version });
  });

  function applied(edit: Command): void {
    try {
      applyCommands(fork, [edit], context, noFacts);
    } catch (error) {
      if (!(error instanceof Refusal)) throw error;
      if ('id' in edit && edit.id) unsure.add(edit.id);
    }
  }
}

function moved(label: string, edit: { readonly version: number }, current: { readonly version: number }): string {
  return `${label} has been edited since this was written: it was at version ${edit.version} and is now at ${current.version}.`;
}

/** Whether an open change request proposes an edit of something that has moved since the edit was written. */
export function isInConflict(study: Study, change: ChangeRequest): boolean {
  if (!isOpen(change) || change.edits.length === 0) return false;
  try {
    applyCommands(study.fork(), change.edits, proposalContext(change), noFacts);
    return false;
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
  }
  let found = false;
  walkEdits(study, change, (_fork, _edit, _index, conflict) => {
    if (conflict) found = true;
  });
  return found;
}
