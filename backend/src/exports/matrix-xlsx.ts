import type { ComplianceView } from '@shared/contract';
import writeXlsx from 'write-excel-file/node';
import { headerLines, MATRIX_COLUMNS } from './matrix-table';

/** The matrix as a workbook of two sheets: what it is of, and the rows. Text is typed as text, so it can never be a formula. */
export async function matrixXlsx(view: ComplianceView): Promise<Buffer> {
  const about = headerLines(view).map(([name, value]) => [
    { value: name, type: String, fontWeight: 'bold' as const, alignVertical: 'top' as const },
    { value, type: String, wrap: true, alignVertical: 'top' as const },
  ]);
  const head = MATRIX_COLUMNS.map((column) => ({
    value: column.name,
    type: String,
    fontWeight: 'bold' as const,
    wrap: true,
    backgroundColor: '#E7E1D3' as const,
  }));
  const rows = view.rows.map((row) =>
    MATRIX_COLUMNS.map((column) => {
      const value = column.cell(row);
      if (value === null || value === '') return null;
      return typeof value === 'number'
        ? { value, type: Number }
        : { value, type: String, wrap: true, alignVertical: 'top' as const };
    }),
  );
  return writeXlsx(
    [
      { data: about, sheet: 'About', columns: [{ width: 26 }, { width: 110 }] },
      {
        data: [head, ...rows],
        sheet: 'Matrix',
        columns: MATRIX_COLUMNS.map(({ width }) => ({ width })),
        stickyRowsCount: 1,
        stickyColumnsCount: 1,
        orientation: 'landscape' as const,
      },
    ],
    { fontFamily: 'Arial', fontSize: 10 },
  ).toBuffer();
}
