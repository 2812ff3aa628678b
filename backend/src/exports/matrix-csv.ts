import type { ComplianceView } from '@shared/contract';
import { stringify } from 'csv-stringify/sync';
import { countsInWords, MATRIX_COLUMNS, statement } from './matrix-table';

/**
 * The matrix as CSV after RFC 4180: one header record, CRLF, quotes doubled, every record with the same number of
 * fields, UTF-8. What the matrix is of stands in columns of its own, so that the file stays one table. Text that a
 * spreadsheet would take for a formula is escaped; numbers stay numbers.
 */
export function matrixCsv(view: ComplianceView): Buffer {
  const { header, rows } = view;
  const about: readonly (readonly [string, string | number])[] = [
    ['Study', header.study],
    ['Standpoint', header.standpoint],
    ['Revision', header.revision],
    ['Baseline in force', header.baseline],
    ['Baseline digest', header.digest],
    ['As of (UTC)', header.at],
    ['Statement', statement(header)],
    ['Compliance counts', countsInWords(header)],
    ['Decision rule', header.decisionRule],
    ['Caution', header.caution],
  ];
  const names = [...MATRIX_COLUMNS.map((column) => column.name), ...about.map(([name]) => name)];
  const records = rows.map((row) => [
    ...MATRIX_COLUMNS.map((column) => column.cell(row)),
    ...about.map(([, value]) => value),
  ]);
  const text = stringify([names, ...records], { record_delimiter: '\r\n', escape_formulas: true });
  return Buffer.from(text, 'utf8');
}
