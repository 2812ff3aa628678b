import { CSP_NONCE, inject } from '@angular/core';
import {
  CellStyleModule,
  ClientSideRowModelModule,
  ColumnAutoSizeModule,
  type GridOptions,
  ModuleRegistry,
  RowApiModule,
  RowSelectionModule,
  RowStyleModule,
  ScrollApiModule,
  TextEditorModule,
  TooltipModule,
  ValidationModule,
  themeQuartz,
} from 'ag-grid-community';

/** AG Grid in the drawing office's tokens; every value is a custom property, so both lights follow by themselves. */
export const gridTheme = themeQuartz.withParams({
  accentColor: 'var(--cobalt)',
  backgroundColor: 'var(--sheet)',
  foregroundColor: 'var(--ink)',
  browserColorScheme: 'inherit',
  borderColor: 'var(--hair)',
  borderRadius: 2,
  wrapperBorder: false,
  wrapperBorderRadius: 0,
  fontFamily: 'var(--words)',
  fontSize: 15,
  dataFontSize: 15,
  cellTextColor: 'var(--ink)',
  cellHorizontalPadding: 10,
  headerBackgroundColor: 'var(--sheet)',
  headerTextColor: 'var(--ink-2)',
  headerFontSize: 12,
  headerFontWeight: 600,
  headerRowBorder: { style: 'solid', width: 1.5, color: 'var(--line)' },
  headerColumnBorder: false,
  headerColumnResizeHandleColor: 'var(--rule)',
  rowBorder: { style: 'solid', width: 1, color: 'var(--hair)' },
  columnBorder: false,
  oddRowBackgroundColor: 'transparent',
  rowHoverColor: 'var(--chosen)',
  selectedRowBackgroundColor: 'var(--chosen)',
  rangeSelectionBorderColor: 'var(--cobalt)',
  focusShadow: '0 0 0 2px var(--cobalt)',
  inputBackgroundColor: 'var(--lifted)',
  inputBorder: { style: 'solid', width: 1, color: 'var(--edge)' },
  inputFocusBorder: { style: 'solid', width: 1, color: 'var(--cobalt)' },
  inputFocusShadow: 'none',
  inputTextColor: 'var(--ink)',
  menuBackgroundColor: 'var(--lifted)',
  menuBorder: { style: 'solid', width: 1, color: 'var(--line)' },
  menuShadow: 'none',
  popupShadow: 'none',
  dropdownShadow: 'none',
  tooltipBackgroundColor: 'var(--block)',
  tooltipTextColor: 'var(--block-ink)',
  tooltipBorder: false,
  iconColor: 'var(--ink-2)',
  checkboxBorderRadius: 2,
  checkboxUncheckedBorderColor: 'var(--edge)',
});

let isRegistered = false;

/**
 * What every grid of ours starts from: theme, the nonce its styles need, row height by density, keyboard and copying.
 * Call it in an injection context and spread it: `gridOptions = { ...gridBasics<Row>(), columnDefs }`. A page that needs
 * further grid modules registers them itself.
 */
export function gridBasics<Row>(): GridOptions<Row> {
  registerModules();
  const styleNonce = inject(CSP_NONCE, { optional: true });
  return {
    theme: gridTheme,
    ...(styleNonce === null ? {} : { styleNonce }),
    rowHeight: rowHeight(),
    headerHeight: 30,
    animateRows: false,
    suppressCellFocus: false,
    enableCellTextSelection: true,
    ensureDomOrder: true,
    suppressDragLeaveHidesColumns: true,
    tooltipShowDelay: 400,
    defaultColDef: { resizable: true, sortable: true, suppressHeaderMenuButton: true },
  };
}

/** Row height in px as the density setting has it. */
function rowHeight(): number {
  const row = Number.parseFloat(getComputedStyle(document.documentElement).getPropertyValue('--row'));
  return Number.isFinite(row) && row > 0 ? row : 36;
}

function registerModules(): void {
  if (isRegistered) return;
  isRegistered = true;
  ModuleRegistry.registerModules([
    CellStyleModule,
    ClientSideRowModelModule,
    ColumnAutoSizeModule,
    RowApiModule,
    RowSelectionModule,
    RowStyleModule,
    ScrollApiModule,
    TextEditorModule,
    TooltipModule,
    ...(typeof ngDevMode === 'undefined' || ngDevMode ? [ValidationModule] : []),
  ]);
}

declare const ngDevMode: object | undefined;
