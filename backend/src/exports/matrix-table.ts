import type { ComplianceView, Limit, MatrixHeader, MatrixRow, Measure, Shown } from '@shared/contract';
import { fromSi, unitOf } from '@shared/units';

/** A cell: text, a number that stays a number, or nothing. */
export type Cell = string | number | null;

export interface MatrixColumn {
  readonly name: string;
  /** Width in characters, for formats that have one. */
  readonly width: number;
  readonly cell: (row: MatrixRow) => Cell;
}

/** Significant digits kept in exported numbers: enough to check a verdict, free of the noise of conversion. */
const DIGITS = 12;

/** A value in the unit shown beside it; a difference is converted without the offset of the unit. */
function inUnit(si: number, unit: string, difference: boolean): number {
  return Number(fromSi(si, unitOf(unit), difference ? 'difference' : 'absolute').toPrecision(DIGITS));
}

const unitOfRow = (row: MatrixRow): string => row.limit?.value.unit ?? row.value?.unit ?? '';
/** A number of the limit in the unit of its value, all numbers of a row standing in one unit. */
function typed(limit: Limit | null, measure: Measure | null | undefined, isDifference = false): number | null {
  if (!limit || !measure) return null;
  return inUnit(measure.si, limit.value.unit, isDifference || limit.temperature === 'difference');
}
const shown = (value: Shown | null, row: MatrixRow): number | null =>
  value ? inUnit(value.si, unitOfRow(row), value.difference === true) : null;
const difference = (si: number | null | undefined, row: MatrixRow): number | null =>
  si === null || si === undefined ? null : inUnit(si, unitOfRow(row), true);

/** The columns of the compliance matrix, in the order of the rows of our standards page; composite ones are split so that numbers stay numbers. */
export const MATRIX_COLUMNS: readonly MatrixColumn[] = [
  { name: 'Identifier', width: 12, cell: (row) => row.key },
  { name: 'Version', width: 8, cell: (row) => row.version },
  { name: 'Title', width: 30, cell: (row) => row.title },
  { name: 'Text', width: 60, cell: (row) => row.text },
  { name: 'Parents', width: 16, cell: (row) => row.parents.join(', ') },
  { name: 'Relation', width: 12, cell: (row) => row.limit?.relation ?? '' },
  { name: 'Required value', width: 12, cell: (row) => typed(row.limit, row.limit?.value) },
  { name: 'Upper value', width: 12, cell: (row) => typed(row.limit, row.limit?.upper) },
  { name: 'Tolerance', width: 12, cell: (row) => typed(row.limit, row.limit?.tolerance, true) },
  { name: 'Unit', width: 10, cell: unitOfRow },
  { name: 'Condition', width: 24, cell: (row) => row.limit?.condition ?? '' },
  { name: 'Method', width: 14, cell: (row) => row.method },
  { name: 'Level', width: 12, cell: (row) => row.level },
  { name: 'Stage', width: 14, cell: (row) => row.stage },
  { name: 'Success criterion', width: 30, cell: (row) => row.criterion },
  { name: 'Verdict', width: 16, cell: (row) => row.verdict },
  { name: 'Assessed value', width: 14, cell: (row) => shown(row.value, row) },
  { name: 'Expanded uncertainty U', width: 14, cell: (row) => difference(row.expanded, row) },
  { name: 'Coverage factor k', width: 9, cell: (row) => (row.expanded === null ? null : row.k) },
  { name: 'Margin policy applied', width: 30, cell: (row) => row.policy },
  { name: 'Required margin', width: 12, cell: (row) => difference(row.required?.absolute, row) },
  { name: 'Remaining margin', width: 12, cell: (row) => difference(row.margin?.absolute, row) },
  {
    name: 'Remaining margin, %',
    width: 12,
    cell: (row) => (row.margin?.percent == null ? null : Number(row.margin.percent.toPrecision(DIGITS))),
  },
  { name: '% of', width: 16, cell: (row) => row.margin?.percentOf ?? '' },
  { name: 'Compliance', width: 14, cell: (row) => row.compliance },
  { name: 'Basis', width: 14, cell: (row) => row.basis ?? '' },
  { name: 'Evidence', width: 24, cell: (row) => row.evidence },
  { name: 'Credibility or placard', width: 30, cell: (row) => row.placard },
  { name: 'Departure', width: 30, cell: (row) => row.departure },
  { name: 'Close-out', width: 12, cell: (row) => row.closeOut },
  { name: 'Reason', width: 40, cell: (row) => row.reason },
  { name: 'Allocated to', width: 20, cell: (row) => row.element },
  { name: 'Owner', width: 18, cell: (row) => row.owner },
  { name: 'Signature', width: 36, cell: (row) => row.signature },
];

/** Compliance counts in a sentence. */
export function countsInWords(header: MatrixHeader): string {
  const { counts } = header;
  return `yes ${counts.yes}, partial ${counts.partial}, no ${counts.no}, not assessed ${counts['not assessed']}`;
}

/** What the matrix is of, line by line: product, standpoint, counts, basis, decision rule, caution. */
export function headerLines({ header, rows }: ComplianceView): readonly (readonly [string, string])[] {
  const verdicts = Object.entries(header.verdicts)
    .map(([verdict, count]) => `${verdict} ${count}`)
    .join(', ');
  return [
    ['Study', `${header.study} (${header.studyKey})`],
    ['Phase', header.phase],
    ['Standpoint', header.standpoint],
    ['Revision', `r${header.revision}`],
    ['Baseline in force', header.baseline || 'none taken yet'],
    ['Digest of that baseline', header.digest || 'none'],
    ['Ledger head', header.ledgerHead],
    ['As of (UTC)', header.at],
    ['Statement', statement(header)],
    ['Requirements', String(rows.length)],
    ['Compliance', countsInWords(header)],
    ['Verdicts', verdicts],
    ['Rows closed', String(header.closedRows)],
    ['To be resolved', String(header.openItems)],
    ['Departures in force', String(header.departuresInForce)],
    ['Decision rule', header.decisionRule],
    ['Caution', header.caution],
  ];
}

/** Says whether compliance is predicted or demonstrated; analysis in an early phase is never called verified. */
export function statement({ basis }: MatrixHeader): string {
  switch (basis) {
    case 'predicted':
      return 'Predicted compliance: every assessed row rests on analysis. Nothing here has been demonstrated.';
    case 'demonstrated':
      return 'Demonstrated compliance: every assessed row rests on recorded findings.';
    case 'predicted and demonstrated':
      return 'Predicted compliance, except the rows whose basis is demonstrated, which rest on recorded findings.';
  }
}

/** File name without its ending: study, standpoint and revision. */
export function matrixFileName({ header }: ComplianceView): string {
  return `${header.studyKey}-compliance-r${header.revision}`.toLowerCase();
}
