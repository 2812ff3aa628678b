import type { Verdict } from '@shared/contract';

/** The word of a verdict as it stands at the start of a line. */
export function verdictWord(verdict: Verdict): string {
  return verdict.charAt(0).toUpperCase() + verdict.slice(1);
}

/** Name of a verdict's colour tokens: `--<name>` for words, `--<name>-fill` for drawn marks. */
export function verdictTone(verdict: Verdict): string {
  switch (verdict) {
    case 'compliant':
      return 'compliant';
    case 'short margin':
      return 'short';
    case 'indeterminate':
      return 'indeterminate';
    case 'non-compliant':
      return 'non-compliant';
    case 'not computable':
    case 'no evidence':
      return 'unknown';
  }
}

/** Worst first: the order in which lists, counts and legends name verdicts. */
export const WORST_FIRST: readonly Verdict[] = [
  'non-compliant',
  'indeterminate',
  'short margin',
  'not computable',
  'no evidence',
  'compliant',
];
