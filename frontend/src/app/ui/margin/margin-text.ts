import type { MarginView } from '@shared/contract';

const MINUS = '\u2212';

/** A margin in per cent with its sign: "+2.8 %", "−3.4 %", "0.0 %", "−7 800 %". Three digits at most, thin-spaced thousands. */
export function percentText(percent: number): string {
  if (!Number.isFinite(percent)) return '—';
  const size = Math.abs(percent);
  const digits =
    size < 100
      ? size.toFixed(1)
      : Math.round(size)
          .toString()
          .replace(/\B(?=(\d{3})+$)/g, '\u2009');
  const isZero = Number(size.toFixed(1)) === 0;
  const sign = isZero ? '' : percent > 0 ? '+' : MINUS;
  return `${sign}${isZero ? '0.0' : digits}\u00a0%`;
}

/** A margin as a cell shows it: per cent where there is one, else the absolute margin by `show`, else nothing. */
export function marginText(margin: MarginView | null, show: (absolute: number) => string): string {
  if (margin === null) return '';
  if (margin.percent !== null) return percentText(margin.percent);
  const text = show(margin.absolute);
  return margin.absolute > 0 ? `+${text}` : text;
}
