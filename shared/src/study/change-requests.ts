import type { ChangeRequest, Command, EntityKind } from '@shared/contract';
import type { Study } from './study';

const OPEN: readonly ChangeRequest['state'][] = ['draft', 'submitted', 'in assessment', 'before the board', 'deferred'];

/** Whether a change request still waits for a disposition. */
export function isOpen(change: ChangeRequest): boolean {
  return OPEN.includes(change.state);
}

/**
 * Commands that create something, with the identifier they will create it under, so that a draft can be rebuilt
 * identically; traces that a new requirement brings along become edits of their own for the same reason.
 */
export function withIds(edits: readonly Command[], newId: () => string): Command[] {
  return edits.flatMap((edit) => {
    if ('version' in edit || edit.type === 'edit.undo') return [edit];
    const id = edit.id ?? newId();
    if (edit.type !== 'requirement.create') return [{ ...edit, id }];
    const traces = [...new Set(edit.parentIds)].map((parentId): Command => ({
      type: 'trace.link',
      id: newId(),
      parentId,
      childId: id,
    }));
    return [{ ...edit, id, parentIds: [] }, ...traces];
  });
}

/** Requirement that a proposed edit touches in its limit, trace or budget, if it does. */
function touchesBaselined(study: Study, edit: Command): boolean {
  const baselined = (id: string | undefined): boolean =>
    id !== undefined && study.get('requirement', id)?.state === 'baselined';
  switch (edit.type) {
    case 'requirement.revise':
      return edit.changes.limit !== undefined && baselined(edit.id);
    case 'requirement.withdraw':
    case 'budget.set':
      return baselined(edit.id);
    case 'trace.link':
      return baselined(edit.parentId) || baselined(edit.childId);
    case 'trace.unlink':
    case 'budget.adopt':
    case 'budget.propose': {
      const trace = study.get('trace', edit.id);
      return baselined(trace?.parentId) || baselined(trace?.childId);
    }
    default:
      return false;
  }
}

/** Class 1 when an edit touches a baselined limit, trace or budget; class 2 when none does. */
export function classOf(study: Study, edits: readonly Command[]): 1 | 2 {
  return edits.some((edit) => touchesBaselined(study, edit)) ? 1 : 2;
}

/** Keys of open change requests by the entity that they propose to edit. */
export function pendingChanges(study: Study): Map<string, string[]> {
  const pending = new Map<string, string[]>();
  for (const change of study.all('change')) {
    if (!isOpen(change)) continue;
    for (const id of new Set(change.edits.flatMap((edit) => ('version' in edit ? [edit.id] : [])))) {
      for (const target of targetsOf(study, id)) {
        const keys = pending.get(target) ?? [];
        if (!keys.includes(change.key)) keys.push(change.key);
        pending.set(target, keys);
      }
    }
  }
  return pending;
}

/** An edit of a trace pends on its parent, one of a verification on its requirement; others on themselves. */
function targetsOf(study: Study, id: string): string[] {
  const trace = study.get('trace', id);
  if (trace) return [trace.parentId];
  const verification = study.get('verification', id);
  return verification ? [verification.requirementId] : [id];
}

/** Kind of the entity that an edit of something existing targets. */
export function targetKind(edit: Command): EntityKind {
  if (edit.type === 'budget.set') return 'requirement';
  const [family] = edit.type.split('.');
  return family === 'budget' ? 'trace' : (family as EntityKind);
}
