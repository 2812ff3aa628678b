import type { Verdict } from '@shared/contract';

type Counts = Readonly<Record<Verdict, number>>;

/** How a study stands, in a few words: "closes", "does not close: 2 requirements miss their limit", "nothing to prove yet". */
export function standing(counts: Counts): string {
  const total = Object.values(counts).reduce((sum, count) => sum + count, 0);
  if (total === 0) return 'has no requirements yet';
  const missed = counts['non-compliant'];
  if (missed > 0) return `does not close: ${requirements(missed)} ${missed === 1 ? 'misses its' : 'miss their'} limit`;
  const open = total - counts.compliant;
  if (open > 0)
    return `not shown to close: ${requirements(open)} ${open === 1 ? 'is' : 'are'} short, indeterminate or without a result`;
  return `closes: all ${total} requirements hold with margin`;
}

function requirements(count: number): string {
  return count === 1 ? 'one requirement' : `${count} requirements`;
}
