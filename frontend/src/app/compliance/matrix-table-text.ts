import type { MatrixRow } from '@shared/contract';
import { fromSi, plainNumber, unitOf } from '@shared/units';

const HEADS = [
  'Identifier',
  'Title',
  'Relation',
  'Required value',
  'Assessed value',
  'U',
  'Unit',
  'Margin',
  'Margin, %',
  'Verdict',
  'Compliance',
  'Basis',
  'Method',
  'Close-out',
  'Allocated to',
  'Owner',
];

/** The rows for pasting into a spreadsheet: tab-separated, numbers bare in the unit of the limit, texts inert. */
export function matrixTableText(rows: readonly MatrixRow[]): string {
  return [HEADS, ...rows.map(cells)].map((line) => line.join('\t')).join('\n');
}

function cells(row: MatrixRow): string[] {
  const unit = row.limit?.value.unit ?? row.value?.unit ?? '';
  const isDifference = row.limit?.temperature === 'difference' || row.value?.difference === true;
  const inUnit = (si: number | null | undefined, difference: boolean): string =>
    si === null || si === undefined
      ? ''
      : plainNumber(fromSi(si, unitOf(unit), difference ? 'difference' : 'absolute'), 12);
  return [
    text(row.key),
    text(row.title),
    row.limit?.relation ?? '',
    inUnit(row.limit?.value.si, isDifference),
    inUnit(row.value?.si, isDifference),
    inUnit(row.expanded, true),
    unit,
    inUnit(row.margin?.absolute, true),
    percentText(row),
    row.verdict,
    row.compliance,
    row.basis ?? '',
    text(row.method),
    row.closeOut,
    text(row.element),
    text(row.owner),
  ];
}

function percentText({ margin }: MatrixRow): string {
  return margin === null || margin.percent === null ? '' : plainNumber(margin.percent, 12);
}

/** A text must not end its cell, and must not be taken for a formula. */
function text(value: string): string {
  const line = value.replace(/\s+/g, ' ');
  return /^[=+\-@]/.test(line) ? `'${line}` : line;
}
