import type { Budget, Limit, LimitInput, MeasureInput, Uncertainty, UncertaintyInput } from '@shared/contract';
import { prettyUnit } from '@shared/units';

const THIN_SPACE = '\u2009';
const MINUS = '\u2212';

/** Digits as typed, for reading: whole digits in groups of three and a true minus sign; other notations stay as typed. */
function digitsInWords(text: string): string {
  const plain = /^([-+\u2212]?)(\d+)(\.\d+)?$/.exec(text.trim());
  if (!plain) return text.trim();
  const [, sign = '', whole = '', fraction = ''] = plain;
  return (sign === '-' ? MINUS : sign) + whole.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE) + fraction;
}

/** A typed number with its unit: "6 500 s". Digits stay those that the person typed. */
export function measureInWords(measure: MeasureInput | null | undefined): string {
  if (!measure) return 'no value';
  return `${digitsInWords(measure.text)} ${prettyUnit(measure.unit)}`.trim();
}

/** A stated uncertainty: "± 100 s (normal, k = 2)". */
export function uncertaintyInWords(uncertainty: Uncertainty | UncertaintyInput | null | undefined): string {
  if (!uncertainty) return 'none stated';
  const { distribution, halfWidth, k } = uncertainty;
  return `± ${measureInWords(halfWidth)} (${distribution}${distribution === 'normal' ? `, k = ${k}` : ''})`;
}

/** A limit: "≤ 850 K", "1 m to 2 m", "5 m ± 0.1 m", with its condition after a comma. */
export function limitInWords(limit: Limit | LimitInput | null | undefined): string {
  if (!limit) return 'no limit';
  const value = measureInWords(limit.value);
  const condition = limit.condition ? `, ${limit.condition}` : '';
  switch (limit.relation) {
    case 'at least':
      return `≥ ${value}${condition}`;
    case 'at most':
      return `≤ ${value}${condition}`;
    case 'between':
      return `${value} to ${measureInWords(limit.upper)}${condition}`;
    case 'equal within':
      return `${value} ± ${measureInWords(limit.tolerance)}${condition}`;
  }
}

/** What a row of the margin policy asks for: "5 %", "5 K", or "5 K, else 5 %" where limits of other dimensions get a per cent. */
export function askedMarginInWords({ percent, absolute }: AskedMargin): string {
  if (!absolute) return `${percent} %`;
  return percent > 0 ? `${measureInWords(absolute)}, else ${percent} %` : measureInWords(absolute);
}
interface AskedMargin {
  readonly percent: number;
  readonly absolute?: MeasureInput | null;
}

/** A budget: "sum of demands". */
export function budgetInWords(budget: Budget | null | undefined): string {
  return budget ? `${budget.rule} of ${budget.sense}` : 'no budget';
}

/** First letter as a capital; symbols and keys stay. */
export function capitalised(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
