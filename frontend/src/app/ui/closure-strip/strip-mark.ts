import type { Verdict } from '@shared/contract';

/** One requirement on the strip. Without a margin in per cent it stands in the lane at the left. */
export interface StripMark {
  readonly key: string;
  readonly title: string;
  readonly verdict: Verdict;
  readonly percent: number | null;
}
