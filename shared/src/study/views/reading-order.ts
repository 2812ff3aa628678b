import type { Verdict } from '@shared/contract';

/** Bad news first: what fails, then what is not known, then what is thin. */
export const READING_ORDER: readonly Verdict[] = [
  'non-compliant',
  'not computable',
  'no evidence',
  'indeterminate',
  'short margin',
  'compliant',
];

/** The verdict of the two that is read first. */
export function firstToRead(a: Verdict, b: Verdict): Verdict {
  return READING_ORDER.indexOf(a) <= READING_ORDER.indexOf(b) ? a : b;
}
