import type { MatrixRow } from '@shared/contract';
import { formatSi } from '@shared/units';
import type { ColDef } from 'ag-grid-community';
import { limitText } from '../ui/limit/limit-text';
import type { ShowNumber } from '../ui/measure/show-number';
import { WORST_FIRST } from '../ui/verdict/verdict-words';
import { MarginCell, RequirementCell, VerdictCell } from './matrix-cells';

/** How numbers are shown: in the unit that the person prefers. */
export interface MatrixNumbers {
  readonly show: ShowNumber;
  readonly unitFor: (si: number, unit: string) => string;
}

/** "39.1 ± 0.71 km/s", value and uncertainty in one unit; nothing where there is no computed value. */
export function assessedText(row: MatrixRow, numbers: MatrixNumbers): string {
  if (row.value === null) return '';
  const { si, difference } = row.value;
  const unit = numbers.unitFor(si, row.value.unit);
  const temperature = difference ? ('difference' as const) : ('absolute' as const);
  if (row.expanded === null) return formatSi(si, unit, { temperature });
  const value = formatSi(si, unit, { temperature, withUnit: false });
  return `${value} ± ${formatSi(row.expanded, unit, { temperature: 'difference', digits: 2 })}`;
}

/** The columns of the matrix: what one reads first stands first, the rest in the order of the exported matrix. */
export function matrixColumns(numbers: MatrixNumbers, withStatements: boolean, sort: string): ColDef<MatrixRow>[] {
  const words = (colId: string, headerName: string, width: number, text: (row: MatrixRow) => string) =>
    ({
      colId,
      headerName,
      width,
      valueGetter: ({ data }) => (data ? text(data) : ''),
      tooltipValueGetter: ({ value }) => (typeof value === 'string' && value.length * 7 > width ? value : undefined),
    }) satisfies ColDef<MatrixRow>;
  const columns: ColDef<MatrixRow>[] = [
    {
      ...words('key', 'Requirement', 310, (row) => row.key),
      pinned: 'left',
      cellRenderer: RequirementCell,
      tooltipValueGetter: ({ data }) => data?.title,
    },
    {
      ...words('text', 'Statement', 380, (row) => row.text),
      hide: !withStatements,
      wrapText: true,
      autoHeight: withStatements,
      cellStyle: { lineHeight: '20px', paddingTop: '7px', paddingBottom: '7px' },
    },
    {
      ...words('required', 'Required', 130, (row) => limitText(row.limit, numbers.show)),
      type: 'rightAligned',
      cellClass: 'mono ag-right-aligned-cell',
      comparator: (_a, _b, a, b) => order(a.data?.limit?.value.si, b.data?.limit?.value.si),
    },
    {
      ...words('assessed', 'Assessed ± U', 224, (row) => assessedText(row, numbers)),
      type: 'rightAligned',
      cellClass: 'mono ag-right-aligned-cell',
      comparator: (_a, _b, a, b) => order(a.data?.value?.si, b.data?.value?.si),
    },
    {
      ...words('margin', 'Margin against limit', 216, (row) => row.margin?.percent?.toString() ?? ''),
      cellRenderer: MarginCell,
      tooltipValueGetter: ({ data }) => data?.policy || undefined,
      comparator: (_a, _b, a, b) => order(a.data?.margin?.percent, b.data?.margin?.percent),
    },
    {
      ...words('verdict', 'Verdict', 150, (row) => row.verdict),
      cellRenderer: VerdictCell,
      tooltipValueGetter: ({ data }) => data?.reason || undefined,
      comparator: (_a, _b, a, b) => rank(a.data) - rank(b.data),
    },
    words('compliance', 'Compliance', 116, (row) => row.compliance),
    words('basis', 'Basis', 108, (row) => row.basis ?? ''),
    words('method', 'Method', 120, (row) => row.method),
    words('level', 'Level', 90, (row) => row.level),
    words('stage', 'Stage', 110, (row) => row.stage),
    words('criterion', 'Success criterion', 200, (row) => row.criterion),
    words('policy', 'Margin policy applied', 210, (row) => row.policy),
    words('evidence', 'Evidence', 150, (row) => row.evidence),
    words('placard', 'Credibility or placard', 220, (row) => row.placard),
    words('departure', 'Departure', 220, (row) => row.departure),
    words('closeOut', 'Close-out', 100, (row) => row.closeOut),
    words('reason', 'Reason', 240, (row) => row.reason),
    words('parents', 'Parents', 110, (row) => row.parents.join(', ')),
    words('element', 'Allocated to', 130, (row) => row.element),
    words('owner', 'Owner', 140, (row) => row.owner),
    words('signature', 'Signature', 240, (row) => row.signature),
    { ...words('version', 'Version', 80, (row) => String(row.version)), comparator: (a, b) => order(+a, +b) },
  ];
  const [, falling, sorted] = /^(-?)(.+)$/.exec(sort) ?? [];
  return columns.map((column) => ({
    ...column,
    sort: column.colId === sorted ? (falling === '-' ? 'desc' : 'asc') : null,
  }));
}

function rank(row: MatrixRow | undefined): number {
  return row ? WORST_FIRST.indexOf(row.verdict) : WORST_FIRST.length;
}

/** Rows without the number stand last. */
function order(a: number | null | undefined, b: number | null | undefined): number {
  return (a ?? Infinity) === (b ?? Infinity) ? 0 : (a ?? Infinity) - (b ?? Infinity);
}
