import type { MatrixRow } from '@shared/contract';
import { limitInWords, percentInWords } from '@shared/study';
import { formatSi } from '@shared/units';

const unitOfRow = (row: MatrixRow): string => row.limit?.value.unit ?? row.value?.unit ?? '';

/** "≥ 38.0 km/s at a delivered cargo of 20.0 t". */
export function requiredInWords(row: MatrixRow): string {
  return row.limit ? limitInWords(row.limit) : 'no limit';
}

/** "39.08 km/s ± 0.9 km/s (k = 2)", or that no uncertainty is stated, or that there is no value. */
export function assessedInWords(row: MatrixRow): string {
  if (!row.value) return row.verdict === 'not computable' ? 'not computable' : '';
  const unit = unitOfRow(row);
  const value = formatSi(row.value.si, unit, {
    digits: 4,
    temperature: row.value.difference ? 'difference' : 'absolute',
  });
  if (row.expanded === null) return `${value}, no uncertainty stated`;
  return `${value} ± ${formatSi(row.expanded, unit, { digits: 2, temperature: 'difference' })} (k = ${row.k})`;
}

/** "+1.08 km/s, +2.8 % of the limit; required 1.9 km/s". */
export function marginInWords(row: MatrixRow): string {
  if (!row.margin) return '';
  const unit = unitOfRow(row);
  const amount = (si: number, digits: number): string => formatSi(si, unit, { digits, temperature: 'difference' });
  const sign = row.margin.absolute > 0 ? '+' : '';
  const percent = row.margin.percent === null ? '' : `, ${percentInWords(row.margin.percent)} ${row.margin.percentOf}`;
  const required = row.required ? `; required ${amount(row.required.absolute, 3)}` : '';
  return `${sign}${amount(row.margin.absolute, 3)}${percent}${required}`;
}
