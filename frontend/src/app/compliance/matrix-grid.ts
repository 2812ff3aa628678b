import { ChangeDetectionStrategy, Component, computed, inject, input, output } from '@angular/core';
import type { MatrixRow } from '@shared/contract';
import { AgGridAngular } from 'ag-grid-angular';
import {
  type CellKeyDownEvent,
  type FullWidthCellKeyDownEvent,
  type GetRowIdParams,
  type GridOptions,
  ModuleRegistry,
  RowAutoHeightModule,
  type RowClickedEvent,
  type SortChangedEvent,
} from 'ag-grid-community';
import { UnitPreferences } from '../core/preferences/unit-preferences';
import { gridBasics } from '../ui/grid/grid-options';
import { matrixColumns } from './matrix-columns';

/** The matrix as a grid: one row for each requirement in force, a click or Enter opens its sheet. */
@Component({
  selector: 'dp-matrix-grid',
  changeDetection: ChangeDetectionStrategy.OnPush,
  imports: [AgGridAngular],
  template: `
    <ag-grid-angular
      class="grid"
      [gridOptions]="options"
      [rowData]="rowData()"
      [columnDefs]="columns()"
      (rowClicked)="click($event)"
      (cellKeyDown)="press($event)"
      (sortChanged)="sorted($event)"
    />
  `,
  styleUrl: './matrix-grid.scss',
})
export class MatrixGrid {
  private readonly units = inject(UnitPreferences);
  readonly rows = input.required<readonly MatrixRow[]>();
  readonly statements = input(false);
  /** Column and direction from the address: "margin" rises, "-margin" falls, empty is bad news first. */
  readonly sort = input('');
  readonly openRow = output<MatrixRow>();
  readonly sortChange = output<string>();

  private readonly numbers = {
    show: this.units.show.bind(this.units),
    unitFor: this.units.unitFor.bind(this.units),
  };
  protected readonly options: GridOptions<MatrixRow> = {
    ...gridBasics<MatrixRow>(),
    getRowId: ({ data }: GetRowIdParams<MatrixRow>) => data.id,
    overlayNoRowsTemplate: '<span>No row matches. Choose “All” or clear the filters.</span>',
  };
  protected readonly rowData = computed(() => [...this.rows()]);
  protected readonly columns = computed(() => matrixColumns(this.numbers, this.statements(), this.sort()));

  constructor() {
    ModuleRegistry.registerModules([RowAutoHeightModule]);
  }

  protected click({ data, event }: RowClickedEvent<MatrixRow>): void {
    const onLink = event?.target instanceof Element && event.target.closest('a') !== null;
    const isSelecting = (window.getSelection()?.toString() ?? '') !== '';
    if (data !== undefined && !onLink && !isSelecting) this.openRow.emit(data);
  }

  protected press({ data, event }: CellKeyDownEvent<MatrixRow> | FullWidthCellKeyDownEvent<MatrixRow>): void {
    if (data !== undefined && event instanceof KeyboardEvent && event.key === 'Enter') this.openRow.emit(data);
  }

  protected sorted({ columns, source }: SortChangedEvent<MatrixRow>): void {
    // Setting the columns from the address sorts too; only what the person did goes back into it.
    if (source !== 'uiColumnSorted') return;
    const column = columns?.find((candidate) => Boolean(candidate.getSort()));
    this.sortChange.emit(column ? `${column.getSort() === 'desc' ? '-' : ''}${column.getColId()}` : '');
  }
}
