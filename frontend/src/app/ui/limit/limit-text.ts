import type { Limit, Measure } from '@shared/contract';
import { formatSi, prettyUnit } from '@shared/units';
import type { ShowNumber } from '../measure/show-number';

/** A limit in signs: "≥ 38 km/s", "≤ 900 K", "10 … 12 km/s", "0.5 ± 0.1 s"; nothing for a requirement without one. */
export function limitText(limit: Limit | null, show: ShowNumber = formatSi): string {
  if (limit === null) return '';
  const said = (measure: Measure, temperature = limit.temperature) =>
    asTyped(measure, show(measure.si, measure.unit, { temperature }));
  switch (limit.relation) {
    case 'at least':
      return `≥\u00a0${said(limit.value)}`;
    case 'at most':
      return `≤\u00a0${said(limit.value)}`;
    case 'between':
      return `${said(limit.value)} … ${limit.upper === null ? '' : said(limit.upper)}`;
    case 'equal within':
      return `${said(limit.value)} ± ${limit.tolerance === null ? '' : said(limit.tolerance, 'difference')}`;
  }
}

/** In the unit in which a limit was typed it keeps its digits: "38.0 km/s" says more than "38 km/s". */
function asTyped({ text, unit }: Measure, shown: string): string {
  const symbol = prettyUnit(unit);
  const inTypedUnit = symbol !== '' && shown.endsWith(` ${symbol}`);
  return inTypedUnit && /^\d+\.?\d*$/.test(text) ? `${text} ${symbol}` : shown;
}
