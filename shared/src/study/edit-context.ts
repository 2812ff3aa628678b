import type { Command, CommandOf, CommandType, EntityKind, EntityKinds, Patch, Role } from '@shared/contract';
import { Refusal } from './refusal';
import type { Study } from './study';

/**
 * With what authority commands are applied: by a person at once, as a proposal inside a change request, by the board
 * that approved it, or by the system. Proposals and approvals may touch what is baselined or controlled.
 */
export type Authority = 'direct' | 'proposal' | 'board' | 'system';

/** Who acts, when, with which roles; the core has no clock and no users of its own. */
export interface EditContext {
  readonly actorId: string;
  readonly roles: readonly Role[];
  readonly at: string;
  readonly newId: () => string;
  /** Revision that this edit will make. */
  readonly revision: number;
  readonly authority: Authority;
  /** Patch of an earlier revision, for undo; null when it is not there or not the actor's own. */
  readonly patchOf: (revision: number) => { readonly patch: Patch; readonly actorId: string } | null;
  /** Names of people, for sentences. */
  readonly personName: (id: string) => string;
}

/** One command's effect on a fork of the study. */
export type Apply<T extends CommandType> = (study: Study, command: CommandOf<T>, context: EditContext) => void;

/** Applies a nested list of commands, as change requests do. */
export type ApplyAll = (study: Study, commands: readonly Command[], context: EditContext) => void;

const KIND_NAMES: Readonly<Record<EntityKind, string>> = {
  study: 'study',
  policy: 'margin policy',
  element: 'element',
  requirement: 'requirement',
  trace: 'trace',
  quantity: 'quantity',
  analysis: 'analysis',
  verification: 'verification',
  assessment: 'assessment',
  departure: 'departure',
  change: 'change request',
  baseline: 'baseline',
};

/** The entity a command targets, in the version that the person saw; refuses what is gone and what has moved. */
export function target<K extends EntityKind>(
  study: Study,
  kind: K,
  command: { readonly id: string; readonly version: number },
): EntityKinds[K] {
  const entity = study.get(kind, command.id);
  if (!entity) {
    throw new Refusal('not-found', `There is no such ${KIND_NAMES[kind]} in this study.`, {
      field: 'id',
      value: command.id,
    });
  }
  if (entity.version !== command.version) {
    throw new Refusal(
      'stale',
      `${labelOf(study, kind, entity)} has changed since you opened it (you saw version ${command.version}, it is now at ${entity.version}). Nothing was applied.`,
      {
        field: 'version',
        value: String(command.version),
        expected: String(entity.version),
        current: entity,
      },
    );
  }
  return entity;
}

/** An entity that a command names beside its target. */
export function referred<K extends EntityKind>(study: Study, kind: K, field: string, id: string): EntityKinds[K] {
  const entity = study.get(kind, id);
  if (!entity)
    throw new Refusal('invalid', `${field}: there is no such ${KIND_NAMES[kind]} in this study.`, {
      field,
      value: id,
      expected: `a ${KIND_NAMES[kind]} of this study`,
    });
  return entity;
}

/** Identifier of what a command creates: the one it brings, if nothing has it yet, or a new one. */
export function freshId(
  study: Study,
  kind: EntityKind,
  command: { readonly id?: string | undefined },
  context: EditContext,
): string {
  if (command.id === undefined) return context.newId();
  if (study.get(kind, command.id))
    throw new Refusal('invalid', `id: there is already a ${KIND_NAMES[kind]} with this identifier.`, {
      field: 'id',
      value: command.id,
      expected: 'an identifier that is not used yet, or none',
    });
  return command.id;
}

/** Key or name by which an entity is called in sentences. */
export function labelOf<K extends EntityKind>(study: Study, kind: K, entity: EntityKinds[K]): string {
  if ('key' in entity && typeof entity.key === 'string') return entity.key;
  if (kind === 'trace') {
    const trace = entity as EntityKinds['trace'];
    return `${study.get('requirement', trace.parentId)?.key ?? '?'} → ${study.get('requirement', trace.childId)?.key ?? '?'}`;
  }
  if (kind === 'verification' || kind === 'assessment') {
    const { requirementId } = entity as EntityKinds['verification'];
    return `${KIND_NAMES[kind]} of ${study.get('requirement', requirementId)?.key ?? '?'}`;
  }
  if (kind === 'policy') return `margin policy for ${(entity as EntityKinds['policy']).parameter}`;
  return KIND_NAMES[kind];
}

/** The next key with a prefix; numbers are counted up in the settings and never used again. */
export function nextKey(study: Study, prefix: string): string {
  const settings = study.settings;
  const number = (settings.counters[prefix] ?? 0) + 1;
  study.put('study', { ...settings, counters: { ...settings.counters, [prefix]: number } });
  return prefix === 'B' ? `B${number}` : `${prefix}-${String(number).padStart(3, '0')}`;
}

/** Refuses a direct edit of something under control, naming what to do instead. */
export function refuseControlled(context: EditContext, key: string, why: string): void {
  if (context.authority === 'direct') {
    throw new Refusal('controlled', `${key} ${why}. Raise a change request to propose this edit.`, {
      field: 'id',
      value: key,
      expected: 'an approved change request',
    });
  }
}

/** Raises the version of an entity and writes it. */
export function revised<K extends EntityKind>(
  study: Study,
  kind: K,
  entity: EntityKinds[K],
  changes: Partial<EntityKinds[K]>,
): void {
  study.put(kind, { ...entity, ...changes, version: entity.version + 1 });
}

/** Drops undefined fields: only what a command gives is revised. */
export function given<T extends object>(changes: T): Partial<T> {
  return Object.fromEntries(Object.entries(changes).filter(([, value]) => value !== undefined)) as Partial<T>;
}
