import type { EntityKind, EntityKinds, Patch } from '@shared/contract';
import type { Study } from '../study';

/** How entities and people are called in sentences. */
export interface EntityNames {
  /** Key or name of an entity by its identifier; says so when it is gone. */
  readonly entity: (kind: EntityKind, id: string) => string;
  readonly person: (id: string) => string;
}

/** Names from a study, and from a patch for what is no longer or not yet in it. */
export function entityNames(study: Study, personName: (id: string) => string, patch: Patch = []): EntityNames {
  const patched = new Map(patch.map((entry) => [`${entry.kind} ${entry.id}`, entry.after ?? entry.before]));
  const find = <K extends EntityKind>(kind: K, id: string): EntityKinds[K] | undefined =>
    (patched.get(`${kind} ${id}`) as EntityKinds[K] | null | undefined) ?? study.get(kind, id);
  const entity = (kind: EntityKind, id: string): string => {
    const found = find(kind, id);
    if (!found) return `a removed ${kind}`;
    return keyOf(kind, found, entity);
  };
  return { entity, person: personName };
}

/** Key of an entity, or for kinds without one the key of what it belongs to. */
export function keyOf<K extends EntityKind>(kind: K, found: EntityKinds[K], entity: EntityNames['entity']): string {
  switch (kind) {
    case 'trace': {
      const { parentId, childId } = found as EntityKinds['trace'];
      return `${entity('requirement', parentId)} → ${entity('requirement', childId)}`;
    }
    case 'verification':
    case 'assessment':
      return entity('requirement', (found as EntityKinds['verification'] | EntityKinds['assessment']).requirementId);
    case 'policy': {
      const { parameter, maturity } = found as EntityKinds['policy'];
      return `${parameter}, ${maturity}`;
    }
    default:
      return (found as { readonly key: string }).key;
  }
}
