import { ChangeDetectionStrategy, Component, computed, effect, inject, input, output, signal } from '@angular/core';
import type { QuantityRow } from '@shared/contract';
import { AgGridAngular } from 'ag-grid-angular';
import {
  type CellKeyDownEvent,
  type FullWidthCellKeyDownEvent,
  type GetRowIdParams,
  type GridApi,
  type GridOptions,
  ModuleRegistry,
  RenderApiModule,
  SelectEditorModule,
  type SortChangedEvent,
} from 'ag-grid-community';
import { UnitPreferences } from '../../core/preferences/unit-preferences';
import { gridBasics } from '../../ui/grid/grid-options';
import { QuantityEdits } from '../quantity-edits';
import { type EditedField } from '../quantity-text';
import { quantityColumns } from './quantity-columns';

/** The register as a grid: edited in place, Enter on a key opens the sheet of the quantity. */
@Component({
  selector: 'dp-quantity-grid',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [AgGridAngular],
  template: `
    <ag-grid-angular
      class="grid"
      [gridOptions]="options"
      [rowData]="rowData()"
      [columnDefs]="columns()"
      (gridReady)="api.set($event.api)"
      (cellKeyDown)="press($event)"
      (sortChanged)="sorted($event)"
    />
  `,
  styleUrl: './quantity-grid.scss',
})
export class QuantityGrid {
  private readonly units = inject(UnitPreferences);
  private readonly edits = inject(QuantityEdits);
  readonly rows = input.required<readonly QuantityRow[]>();
  /** Key of the row to bring into view. */
  readonly selected = input('');
  /** Column and direction from the address: "value" rises, "-value" falls. */
  readonly sort = input('');
  readonly openRow = output<QuantityRow>();
  readonly sortChange = output<string>();

  protected readonly api = signal<GridApi<QuantityRow> | undefined>(undefined);
  protected readonly options: GridOptions<QuantityRow> = {
    ...gridBasics<QuantityRow>(),
    getRowId: ({ data }: GetRowIdParams<QuantityRow>) => data.id,
    overlayNoRowsTemplate: '<span>No quantity matches. Choose “All” or clear the filters.</span>',
    stopEditingWhenCellsLoseFocus: true,
  };
  protected readonly rowData = computed(() => [...this.rows()]);
  protected readonly columns = computed(() =>
    quantityColumns(
      {
        show: this.units.show.bind(this.units),
        mayEdit: (row) => this.edits.mayEdit(row),
        typedInto: (row, field) => this.edits.typedInto(row, field),
        edit: (row, field, typed) => void this.edits.give(row, field, typed),
      },
      this.sort(),
    ),
  );
  private brought = '';

  constructor() {
    ModuleRegistry.registerModules([RenderApiModule, SelectEditorModule]);
    // What is held belongs to no row of the grid: the cells are told to look again.
    effect(() => {
      this.edits.held();
      const api = this.api();
      if (api !== undefined && !api.isDestroyed()) queueMicrotask(() => api.refreshCells({ force: true }));
    });
    effect(() => {
      const [api, key, rows] = [this.api(), this.selected(), this.rows()];
      const row = rows.find((one) => one.key === key);
      if (api === undefined || row === undefined || this.brought === key) return;
      this.brought = key;
      queueMicrotask(() => {
        const node = api.getRowNode(row.id);
        if (node === undefined) return;
        api.ensureNodeVisible(node, 'middle');
        if (node.rowIndex !== null) api.setFocusedCell(node.rowIndex, 'value');
      });
    });
  }

  /** Opens the editor of one cell again, with what was typed in it. */
  editAgain(row: QuantityRow, field: EditedField): void {
    const rowIndex = this.api()?.getRowNode(row.id)?.rowIndex;
    if (typeof rowIndex === 'number') this.api()?.startEditingCell({ rowIndex, colKey: field });
  }

  protected press({
    data,
    event,
    column,
  }: CellKeyDownEvent<QuantityRow> | (FullWidthCellKeyDownEvent<QuantityRow> & { column?: undefined })): void {
    if (data === undefined || !(event instanceof KeyboardEvent) || event.key !== 'Enter') return;
    if (column?.getColId() === 'key') this.openRow.emit(data);
  }

  protected sorted({ columns, source }: SortChangedEvent<QuantityRow>): void {
    // Setting the columns from the address sorts too; only what the person did goes back into it.
    if (source !== 'uiColumnSorted') return;
    const column = columns?.find((candidate) => candidate.getSort() != null);
    this.sortChange.emit(column ? `${column.getSort() === 'desc' ? '-' : ''}${column.getColId()}` : '');
  }
}
