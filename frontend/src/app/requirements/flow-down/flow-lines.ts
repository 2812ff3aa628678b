import type { FlowRow } from '@shared/contract';

/** What narrows the flow-down; empty strings do not. */
export interface FlowFilter {
  readonly text: string;
  readonly verdict: string;
  /** A state, "change pending" or "to be resolved". */
  readonly state: string;
}

/** One line of the list on screen: a requirement, the budget unfolded below it, or the room that the budget takes. */
export type FlowLine =
  | {
      readonly kind: 'requirement';
      readonly id: string;
      readonly row: FlowRow;
      readonly isOpen: boolean;
      /** False for a parent that is shown only because something below it matches. */
      readonly matches: boolean;
    }
  | { readonly kind: 'budget'; readonly id: string; readonly row: FlowRow }
  | { readonly kind: 'room'; readonly id: string };

/** True when nothing is filtered. */
export function isWide(filter: FlowFilter): boolean {
  return filter.text === '' && filter.verdict === '' && filter.state === '';
}

/** The lines to show: matching rows with the parents that lead to them, without what is closed; a budget takes two lines. */
export function flowLines(
  rows: readonly FlowRow[],
  filter: FlowFilter,
  closed: ReadonlySet<string>,
  unfolded: string | null,
): readonly FlowLine[] {
  const matching = new Set(rows.filter((row) => matches(row, filter)).map((row) => row.path));
  const leading = new Set<string>();
  for (const path of matching) for (const above of pathsAbove(path)) leading.add(above);
  const lines: FlowLine[] = [];
  for (const row of rows) {
    const isMatch = matching.has(row.path);
    if (!isMatch && !leading.has(row.path)) continue;
    if (pathsAbove(row.path).some((above) => closed.has(above))) continue;
    lines.push({ kind: 'requirement', id: row.path, row, isOpen: !closed.has(row.path), matches: isMatch });
    if (row.path === unfolded && row.budget !== null) {
      lines.push({ kind: 'budget', id: `${row.path} budget`, row }, { kind: 'room', id: `${row.path} room` });
    }
  }
  return lines;
}

function matches(row: FlowRow, filter: FlowFilter): boolean {
  if (filter.verdict !== '' && row.verdict !== filter.verdict) return false;
  if (filter.state === 'change pending' && row.changePending.length === 0) return false;
  if (filter.state === 'to be resolved' && !row.toBeResolved) return false;
  if (['in preparation', 'in review', 'baselined'].includes(filter.state) && row.state !== filter.state) return false;
  const words = filter.text.toLowerCase().split(/\s+/).filter(Boolean);
  const searched = `${row.key} ${row.title} ${row.element?.key ?? ''} ${row.element?.name ?? ''}`.toLowerCase();
  return words.every((word) => searched.includes(word));
}

/** Paths of the rows above a row, nearest first. */
export function pathsAbove(path: string): readonly string[] {
  const parts = path.split('/');
  return parts.slice(0, -1).map((_, index) => parts.slice(0, parts.length - 1 - index).join('/'));
}

/** Where an arrow, Home or End leads from a line, as an index among the lines; the same index where there is nowhere to go. */
export function nextLine(lines: readonly FlowLine[], from: number, key: string): number {
  const isRequirement = (index: number): boolean => lines[index]?.kind === 'requirement';
  const step = (start: number, by: 1 | -1): number => {
    for (let index = start; index >= 0 && index < lines.length; index += by) if (isRequirement(index)) return index;
    return from;
  };
  switch (key) {
    case 'ArrowDown':
      return step(from + 1, 1);
    case 'ArrowUp':
      return step(from - 1, -1);
    case 'Home':
      return step(0, 1);
    case 'End':
      return step(lines.length - 1, -1);
    case 'PageDown':
      return step(Math.min(lines.length - 1, from + 12), -1);
    case 'PageUp':
      return step(Math.max(0, from - 12), 1);
    default:
      return from;
  }
}
