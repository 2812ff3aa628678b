import type { MarginView, RequiredMargin, Verdict } from '@shared/contract';

/** The part of a VerdictView that a gauge draws. */
export interface GaugeSource {
  readonly verdict: Verdict;
  readonly margin: MarginView | null;
  readonly required: RequiredMargin | null;
  readonly expanded: number | null;
  readonly value: { readonly si: number } | null;
}

/** What a gauge shows, everything in per cent of the limit (or of what `MarginView.percentOf` says). */
export interface GaugeReading {
  readonly verdict: Verdict;
  readonly margin: number;
  readonly required: number | null;
  readonly uncertainty: number | null;
}

/**
 * Brings margin, required margin and uncertainty of a verdict to one scale in per cent; null when there is no margin.
 * Where the limit is zero there is no per cent: then the required margin, or else the uncertainty, counts as 10.
 */
export function gaugeReading(source: GaugeSource): GaugeReading | null {
  const { margin, required, expanded, verdict } = source;
  if (margin === null) return null;
  const perSi = percentPerSi(source);
  return {
    verdict,
    margin: margin.percent ?? margin.absolute * perSi,
    required: required === null ? null : required.absolute * perSi,
    uncertainty: expanded === null ? null : expanded * perSi,
  };
}

function percentPerSi({ margin, required, expanded, value }: GaugeSource): number {
  if (margin === null) return 0;
  if (margin.percent !== null) {
    if (margin.absolute !== 0) return margin.percent / margin.absolute;
    // At the limit exactly: its size is the value's own.
    if (value !== null && value.si !== 0) return 100 / Math.abs(value.si);
  }
  const measure = required?.absolute || expanded || Math.abs(margin.absolute);
  return measure ? 10 / measure : 0;
}
