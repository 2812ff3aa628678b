import type { EntityKinds, Patch, PatchEntry, RecordRow } from '@shared/contract';
import { applyCommands } from '../apply';
import { newId } from '../ids';
import { Refusal } from '../refusal';
import { entityNames, type EntityNames } from './entity-names';
import { fieldChanges, headline } from './field-changes';
import { personRef, type ViewContext } from './view-context';

/** What a ledger entry changed, field by field in words; what only the machine keeps, such as counters, is left out. */
export function recordChanges(patch: Patch, context: Pick<ViewContext, 'proof' | 'people'>): RecordRow['changes'] {
  const names = entityNames(context.proof.study, (id) => personRef(context, id).name, patch);
  return patch.flatMap((entry) => changesOf(entry, names));
}

function changesOf<K extends PatchEntry['kind']>(
  { kind, id, before, after }: PatchEntry & { readonly kind: K },
  names: EntityNames,
): RecordRow['changes'] {
  const key = names.entity(kind, id);
  const line = { kind, key };
  const was = before as EntityKinds[K] | null;
  const is = after as EntityKinds[K] | null;
  if (was && is) return fieldChanges(kind, was, is, names).map((change) => ({ ...line, ...change }));
  if (is) return [{ ...line, field: 'written', before: '', after: headline(kind, is, names) }];
  return was ? [{ ...line, field: 'removed', before: headline(kind, was, names), after: '' }] : [];
}

/** Whether this person could take a revision back now: their own direct edit, on which nothing was built since. */
export function isUndoable(context: ViewContext, revision: number, patch: Patch, actorId: string): boolean {
  if (actorId !== context.me.id || context.standpoint.text !== 'now') return false;
  try {
    applyCommands(
      context.proof.study.fork(),
      [{ type: 'edit.undo', revision }],
      {
        actorId,
        roles: context.roles,
        at: context.provedAt,
        newId: () => newId(),
        revision: context.revision + 1,
        authority: 'direct',
        patchOf: () => ({ patch, actorId }),
        personName: (id) => context.people.get(id) ?? 'a former member',
      },
      () => {
        throw new Error('taking back an edit asked for a row of the matrix');
      },
    );
    return true;
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    return false;
  }
}
