import type { BudgetShare, BudgetView } from '@shared/contract';

export type SegmentKind = 'adopted' | 'proposed' | 'reserve' | 'overrun' | 'shortfall';

/** One piece of the ribbon; place and length as shares of its whole width, 0 to 1. */
export interface Segment {
  readonly kind: SegmentKind;
  readonly share: BudgetShare | null;
  readonly start: number;
  readonly length: number;
  /** What it stands for, in SI of the limit. */
  readonly value: number;
}

export interface Ribbon {
  readonly segments: readonly Segment[];
  /** Where the limit stands, 0 to 1. */
  readonly limit: number;
}

/**
 * Divides a budget into segments, adopted shares first. Only sums and root-sum-squares can be drawn as lengths (the
 * latter by their squares); null for the other rules and where a share has no number.
 */
export function ribbonOf(budget: BudgetView): Ribbon | null {
  const weight = weightOf(budget.rule);
  const limit = weight === null ? 0 : weight(budget.limit);
  if (weight === null || !(limit > 0) || budget.shares.some((share) => share.value === null || share.value < 0))
    return null;
  const ordered = [...budget.shares].sort((a, b) => Number(a.status === 'proposed') - Number(b.status === 'proposed'));
  const total = ordered.reduce((sum, share) => sum + weight(share.value ?? 0), 0);
  const whole = Math.max(limit, total);
  const isSupply = budget.sense === 'contributions';

  const segments: Segment[] = [];
  let at = 0;
  for (const share of ordered) {
    const length = weight(share.value ?? 0);
    const kind = share.status === 'proposed' ? 'proposed' : 'adopted';
    // What a share takes past the limit of a drawn-on budget is drawn apart, in red.
    const inside = isSupply ? length : Math.max(0, Math.min(length, limit - at));
    if (inside > 0) segments.push({ kind, share, start: at / whole, length: inside / whole, value: share.value ?? 0 });
    if (inside < length) {
      segments.push({
        kind: 'overrun',
        share,
        start: (at + inside) / whole,
        length: (length - inside) / whole,
        value: budget.rule === 'sum' ? length - inside : (share.value ?? 0),
      });
    }
    at += length;
  }
  if (total < limit) {
    const left = budget.reserve ?? 0;
    segments.push({
      kind: isSupply ? 'shortfall' : 'reserve',
      share: null,
      start: total / whole,
      length: (limit - total) / whole,
      value: left,
    });
  }
  return { segments, limit: limit / whole };
}

function weightOf(rule: string): ((value: number) => number) | null {
  if (rule === 'sum') return (value) => value;
  if (rule === 'root-sum-square') return (value) => value * value;
  return null;
}
