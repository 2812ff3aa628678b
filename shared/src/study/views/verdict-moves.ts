import type { Verdict } from '@shared/contract';
import type { Proven } from '../prove';

/** Verdicts that an edit turned, and requirements whose margin alone it moved; keys in order. */
export interface VerdictMoves {
  readonly turned: readonly { readonly key: string; readonly from: Verdict | null; readonly to: Verdict | null }[];
  readonly moved: readonly string[];
}

/** How one derived state differs from an earlier one: the word turned, only the numbers moved, or neither. */
export function moveOf(before: Proven | null, after: Proven | null): 'turned' | 'moved' | null {
  if (before === null && after === null) return null;
  if (before?.verdict !== after?.verdict) return 'turned';
  const same =
    Object.is(before?.value, after?.value) &&
    Object.is(before?.margin?.absolute, after?.margin?.absolute) &&
    Object.is(before?.margin?.percent, after?.margin?.percent);
  return same ? null : 'moved';
}

/**
 * What re-proving changed, in verdicts: `changed` is that of a Reproof, `before` the derived state it started from. To be
 * read before the re-proof is published, which takes the new state over into `before`. A requirement that was written or
 * taken back has null on the other side.
 */
export function verdictMoves(
  before: ReadonlyMap<string, Proven>,
  changed: ReadonlyMap<string, Proven | null>,
  keyOf: (requirementId: string) => string,
): VerdictMoves {
  const turned: { key: string; from: Verdict | null; to: Verdict | null }[] = [];
  const moved: string[] = [];
  for (const [id, after] of changed) {
    const was = before.get(id) ?? null;
    const move = moveOf(was, after);
    if (move === 'turned') turned.push({ key: keyOf(id), from: was?.verdict ?? null, to: after?.verdict ?? null });
    if (move === 'moved') moved.push(keyOf(id));
  }
  turned.sort((a, b) => a.key.localeCompare(b.key, 'en', { numeric: true }));
  moved.sort((a, b) => a.localeCompare(b, 'en', { numeric: true }));
  return { turned, moved };
}
