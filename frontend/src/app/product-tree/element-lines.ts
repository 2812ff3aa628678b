import type { ElementRow } from '@shared/contract';

/** One element as it stands in the tree on screen. */
export interface ElementLine {
  readonly row: ElementRow;
  readonly hasChildren: boolean;
  readonly isOpen: boolean;
}

/** The elements that are on screen: everything but what lies below a closed one. Rows come parents first. */
export function elementLines(rows: readonly ElementRow[], closed: ReadonlySet<string>): readonly ElementLine[] {
  const parents = new Set(rows.map(({ parentId }) => parentId));
  const hidden = new Set<string>();
  return rows.flatMap((row) => {
    const isHidden = row.parentId !== null && hidden.has(row.parentId);
    if (isHidden || closed.has(row.id)) hidden.add(row.id);
    if (isHidden) return [];
    return [{ row, hasChildren: parents.has(row.id), isOpen: !closed.has(row.id) }];
  });
}

/** An element and everything below it. */
export function branchOf(rows: readonly ElementRow[], id: string): readonly ElementRow[] {
  const inside = new Set([id]);
  for (const row of rows) if (row.parentId !== null && inside.has(row.parentId)) inside.add(row.id);
  return rows.filter((row) => inside.has(row.id));
}

/** The elements above one, the nearest first. */
export function above(rows: readonly ElementRow[], id: string): readonly ElementRow[] {
  const byId = new Map(rows.map((row) => [row.id, row]));
  const out: ElementRow[] = [];
  for (let row = byId.get(id); row?.parentId != null; row = byId.get(row.parentId)) {
    const parent = byId.get(row.parentId);
    if (parent !== undefined) out.push(parent);
  }
  return out;
}
