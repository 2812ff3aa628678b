import type { QuantityRow } from '@shared/contract';
import type { CellClassParams, ColDef } from 'ag-grid-community';
import type { ShowNumber } from '../../ui/measure/show-number';
import type { Held } from '../quantity-edits';
import { BASES, type EditedField, shownUncertainty, shownValue, uncertaintyText, valueText } from '../quantity-text';
import { KeysCell, QuantityKeyCell } from './quantity-cells';

/** What the columns need to know of the page around them. */
export interface QuantityColumnsContext {
  readonly show: ShowNumber;
  readonly mayEdit: (row: QuantityRow) => boolean;
  readonly typedInto: (row: QuantityRow, field: EditedField) => Held | undefined;
  readonly edit: (row: QuantityRow, field: EditedField, typed: string) => void;
}

/** The columns of the register. Value, uncertainty, basis and source are edited in place, as text with any unit. */
export function quantityColumns(context: QuantityColumnsContext, sort: string): ColDef<QuantityRow>[] {
  const words = (colId: string, headerName: string, width: number, text: (row: QuantityRow) => string) =>
    ({
      colId,
      headerName,
      width,
      valueGetter: ({ data }) => (data ? text(data) : ''),
      tooltipValueGetter: ({ value }) => (typeof value === 'string' && value.length * 7 > width ? value : undefined),
    }) satisfies ColDef<QuantityRow>;
  const keys = (
    colId: 'usedBy' | 'bearsOn' | 'changePending',
    headerName: string,
    width: number,
    section: 'analyses' | 'requirements' | 'changes',
  ): ColDef<QuantityRow> => ({
    colId,
    headerName,
    width,
    valueGetter: ({ data }) => data?.[colId] ?? [],
    cellRenderer: KeysCell,
    cellRendererParams: { section },
    comparator: (a: readonly string[], b: readonly string[]) => a.length - b.length,
    tooltipValueGetter: ({ data }) => ((data?.[colId].length ?? 0) > 3 ? data?.[colId].join(', ') : undefined),
  });
  const edited = (
    field: EditedField,
    headerName: string,
    width: number,
    text: (row: QuantityRow) => string,
    shown: (row: QuantityRow) => string = text,
  ): ColDef<QuantityRow> => ({
    colId: field,
    headerName,
    width,
    cellDataType: false,
    editable: ({ data }) => data !== undefined && context.mayEdit(data),
    valueGetter: ({ data }) => (data ? (context.typedInto(data, field)?.typed ?? text(data)) : ''),
    valueFormatter: ({ data }) => (data ? (context.typedInto(data, field)?.typed ?? shown(data)) : ''),
    valueSetter: ({ data, newValue }) => {
      context.edit(data, field, String(newValue ?? ''));
      return false;
    },
    // Every state is written out, because the grid keeps what an earlier state has set.
    cellStyle: ({ data }: CellClassParams<QuantityRow>) =>
      isRefused(context, data, field)
        ? { color: 'var(--non-compliant)', boxShadow: 'inset 3px 0 0 var(--non-compliant)' }
        : { color: 'var(--ink)', boxShadow: 'none' },
    tooltipValueGetter: ({ data, value }) => {
      const message = data && context.typedInto(data, field)?.message;
      return message || (typeof value === 'string' && value.length * 7 > width ? value : undefined);
    },
  });
  const columns: ColDef<QuantityRow>[] = [
    { ...words('key', 'Key', 84, (row) => row.key), pinned: 'left', cellRenderer: QuantityKeyCell },
    { ...words('symbol', 'Symbol', 92, (row) => row.symbol), cellClass: 'mono' },
    words('name', 'Name', 240, (row) => row.name),
    {
      ...edited('value', 'Value', 152, valueText, (row) => shownValue(row, context.show)),
      type: 'rightAligned',
      cellClass: 'mono ag-right-aligned-cell',
      comparator: (_a, _b, a, b) => order(a.data?.value?.si, b.data?.value?.si),
    },
    {
      ...edited(
        'uncertainty',
        'Uncertainty',
        200,
        (row) => uncertaintyText(row.uncertainty),
        (row) => shownUncertainty(row, context.show),
      ),
      cellClass: 'mono',
      comparator: (_a, _b, a, b) => order(a.data?.uncertainty?.halfWidth.si, b.data?.uncertainty?.halfWidth.si),
    },
    {
      ...edited('basis', 'Basis', 110, (row) => row.basis),
      cellEditor: 'agSelectCellEditor',
      cellEditorParams: { values: [...BASES] },
    },
    words('state', 'State', 104, (row) => row.state),
    keys('bearsOn', 'Bears on', 290, 'requirements'),
    words('element', 'Element', 90, (row) => row.element),
    keys('usedBy', 'Used by', 170, 'analyses'),
    edited('source', 'Source', 220, (row) => row.source),
    keys('changePending', 'Change pending', 140, 'changes'),
    words('owner', 'Owner', 150, (row) => row.owner.name),
  ];
  const [, falling, sorted] = /^(-?)(.+)$/.exec(sort) ?? [];
  return columns.map((column) => ({
    ...column,
    sort: column.colId === sorted ? (falling === '-' ? 'desc' : 'asc') : null,
  }));
}

function isRefused(context: QuantityColumnsContext, row: QuantityRow | undefined, field: EditedField): boolean {
  return row !== undefined && (context.typedInto(row, field)?.message ?? '') !== '';
}

/** Rows without the number stand last. */
function order(a: number | null | undefined, b: number | null | undefined): number {
  return (a ?? Infinity) === (b ?? Infinity) ? 0 : (a ?? Infinity) - (b ?? Infinity);
}
