import { HyperFormula } from 'hyperformula';
import { startValue, type Dialect, type Study } from '../study';

/** Rows of the sheet; nodes fill one column after the other. */
const ROWS = 2000;

function columnName(column: number): string {
  return column < 26
    ? String.fromCharCode(65 + column)
    : columnName(Math.floor(column / 26) - 1) + columnName(column % 26);
}

export class SpreadsheetPeer {
  private readonly engine: HyperFormula;
  private readonly rows: number;

  /** Builds the sheet: inputs and formulas column after column, then one formula for each check. */
  constructor(study: Study, rows = ROWS) {
    this.rows = rows;
    const cells = study.inputs.length + study.formulas.length + study.checks.length;
    const columns = Math.ceil(cells / rows) + 2;
    const sheet: (string | number | null)[][] = Array.from({ length: rows }, () =>
      new Array<string | number | null>(columns).fill(null),
    );
    const put = (cell: number, content: string | number): void => {
      (sheet[cell % rows] as (string | number | null)[])[Math.floor(cell / rows)] = content;
    };
    const dialect: Dialect = {
      ref: (node) => `${columnName(Math.floor(node / rows))}${(node % rows) + 1}`,
      call: (fn, argument) => `${fn === 'log' ? 'LN' : fn.toUpperCase()}(${argument})`,
      power: (base, exponent) => `${base}^${exponent}`,
    };
    for (const input of study.inputs) put(input, startValue(input));
    for (const formula of study.formulas) put(formula.node, `=${formula.text(dialect)}`);
    const firstCheck = study.inputs.length + study.formulas.length;
    study.checks.forEach(({ node, relation, limit }, i) => {
      put(firstCheck + i, `=${dialect.ref(node)}${relation === 'at-least' ? '>=' : '<='}${limit}`);
    });
    // Without its rounding to ten digits, so that the results can be compared.
    this.engine = HyperFormula.buildFromArray(sheet, { licenseKey: 'gpl-v3', smartRounding: false });
  }

  set(node: number, value: number): void {
    this.engine.setCellContents({ sheet: 0, row: node % this.rows, col: Math.floor(node / this.rows) }, value);
  }

  get(node: number): number {
    return Number(this.engine.getCellValue({ sheet: 0, row: node % this.rows, col: Math.floor(node / this.rows) }));
  }

  close(): void {
    this.engine.destroy();
  }
}
