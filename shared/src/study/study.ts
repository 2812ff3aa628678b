import { ENTITY_KINDS } from '@shared/contract';
import type { EntityKind, EntityKinds, Patch, PatchEntry, StudySettings } from '@shared/contract';

/** Fields by which entities of a kind are looked up. */
const INDEXED = {
  study: [],
  policy: [],
  element: ['key', 'parentId'],
  requirement: ['key', 'elementId'],
  trace: ['parentId', 'childId'],
  quantity: ['key', 'elementId'],
  analysis: ['key'],
  verification: ['requirementId', 'analysisId'],
  assessment: ['requirementId'],
  departure: ['key', 'requirementId'],
  change: ['key'],
  baseline: ['key'],
} as const satisfies Record<EntityKind, readonly string[]>;

type Stored = EntityKinds[EntityKind];
type Table = Map<string, Stored | null>;

/**
 * The state of one study: entities by kind and identifier. A fork is an overlay that sees its base and keeps what
 * differs, so a draft, an impact preview and an edit on its way to the database are all the same type, and none of them
 * touches the base. The difference of a fork to its base is the patch.
 */
export class Study {
  private readonly tables = new Map<EntityKind, Table>();
  private readonly indexes = new Map<string, Map<unknown, Set<string>>>();

  constructor(private readonly base: Study | null = null) {
    for (const kind of ENTITY_KINDS) this.tables.set(kind, new Map());
  }

  /** An overlay on this study. */
  fork(): Study {
    return new Study(this);
  }

  /** A copy that no longer sees its base: what is there now, whatever the base becomes. */
  detached(): Study {
    const copy = new Study();
    for (const kind of ENTITY_KINDS) for (const entity of this.all(kind)) copy.put(kind, entity);
    return copy;
  }

  /** The entity, or undefined when there is none of that identifier. */
  get<K extends EntityKind>(kind: K, id: string): EntityKinds[K] | undefined {
    const own = this.table(kind).get(id);
    if (own !== undefined) return (own ?? undefined) as EntityKinds[K] | undefined;
    return this.base?.get(kind, id);
  }

  /** An entity that another one of the study refers to; such references hold in every state that was accepted. */
  held<K extends EntityKind>(kind: K, id: string): EntityKinds[K] {
    const entity = this.get(kind, id);
    if (!entity) throw new Error(`the study refers to ${kind} ${id}, which it does not hold`);
    return entity;
  }

  /** All entities of a kind, in order of identifier (which is the order of creation). */
  all<K extends EntityKind>(kind: K): EntityKinds[K][] {
    const own = this.table(kind);
    const list = [...own.values()].filter((entity) => entity !== null) as EntityKinds[K][];
    if (this.base) for (const entity of this.base.all(kind)) if (!own.has(entity.id)) list.push(entity);
    return list.sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  }

  /** Entities whose field has this value; only fields that are indexed. */
  find<K extends EntityKind>(
    kind: K,
    field: (typeof INDEXED)[K][number] & string,
    value: string | null,
  ): EntityKinds[K][] {
    const found: EntityKinds[K][] = [];
    const own = this.table(kind);
    for (const id of this.indexes.get(`${kind}.${field}`)?.get(value) ?? []) found.push(own.get(id) as EntityKinds[K]);
    if (this.base) for (const entity of this.base.find(kind, field, value)) if (!own.has(entity.id)) found.push(entity);
    return found.sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  }

  /** The one entity with this key. */
  byKey<K extends 'element' | 'requirement' | 'quantity' | 'analysis' | 'departure' | 'change' | 'baseline'>(
    kind: K,
    key: string,
  ): EntityKinds[K] | undefined {
    return this.find(kind, 'key', key)[0];
  }

  /** The settings; every loaded study has them. */
  get settings(): StudySettings {
    const [settings] = this.all('study');
    if (!settings) throw new Error('a study without settings was read');
    return settings;
  }

  /** Writes one entity into this study (a fork, or a study being loaded). */
  put<K extends EntityKind>(kind: K, entity: EntityKinds[K]): void {
    this.write(kind, entity.id, entity);
  }

  /** Removes one entity. */
  remove(kind: EntityKind, id: string): void {
    this.write(kind, id, null);
  }

  /** What differs from the base, in order of dependence. */
  patch(): Patch {
    const entries: PatchEntry[] = [];
    for (const kind of ENTITY_KINDS) {
      const ids = [...this.table(kind).keys()].sort();
      for (const id of ids) {
        const before = this.base?.get(kind, id) ?? null;
        const after = this.get(kind, id) ?? null;
        if (before !== after) entries.push({ kind, id, before, after } as PatchEntry);
      }
    }
    return entries;
  }

  /** Takes a patch in: each entity becomes its `after`. */
  absorb(patch: Patch): void {
    for (const entry of patch) this.write(entry.kind, entry.id, entry.after);
  }

  private table(kind: EntityKind): Table {
    const table = this.tables.get(kind);
    if (!table) throw new Error(`there is no table of kind ${kind}`);
    return table;
  }

  private write(kind: EntityKind, id: string, entity: Stored | null): void {
    const table = this.table(kind);
    this.reindex(kind, id, table.get(id) ?? null, entity);
    if (entity === null && !this.base) table.delete(id);
    else table.set(id, entity);
  }

  private reindex(kind: EntityKind, id: string, before: Stored | null, after: Stored | null): void {
    for (const field of INDEXED[kind]) {
      const name = `${kind}.${field}`;
      let index = this.indexes.get(name);
      if (!index) this.indexes.set(name, (index = new Map<unknown, Set<string>>()));
      const value = (entity: Stored): unknown => (entity as unknown as Record<string, unknown>)[field];
      if (before) index.get(value(before))?.delete(id);
      if (after) {
        const ids = index.get(value(after)) ?? new Set<string>();
        ids.add(id);
        index.set(value(after), ids);
      }
    }
  }
}

/** The inverse of a patch: before and after swapped, in reverse order. */
export function inversePatch(patch: Patch): Patch {
  return [...patch].reverse().map((entry) => ({ ...entry, before: entry.after, after: entry.before }) as PatchEntry);
}
