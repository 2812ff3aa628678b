import type { QuantityRow } from '@shared/contract';
import { matchesWords } from '../ui/address/address';

/** What of the register is looked at; every part is empty when it does not narrow. */
export interface QuantityFilter {
  readonly state: string;
  readonly basis: string;
  readonly element: string;
  /** Words that occur in key, symbol, name, source, element or what it bears on. */
  readonly q: string;
}
export type FilterName = keyof QuantityFilter;

export const UNBOUND = 'not used';

/** Rows that pass every part of a filter, in their order. */
export function filtered(rows: readonly QuantityRow[], filter: QuantityFilter): QuantityRow[] {
  return rows.filter(
    (row) =>
      hasState(row, filter.state) &&
      (filter.basis === '' || filter.basis === row.basis) &&
      (filter.element === '' || filter.element === row.element) &&
      matchesWords(
        filter.q,
        ...[row.key, row.symbol, row.name, row.kindName, row.source, row.element],
        ...row.usedBy,
        ...row.bearsOn,
      ),
  );
}

/** Whether a row stands in a state that the register can be narrowed to. */
export function hasState(row: QuantityRow, state: string): boolean {
  switch (state) {
    case '':
      return true;
    case 'change pending':
      return row.changePending.length > 0;
    case 'without value':
      return row.value === null;
    case UNBOUND:
      return row.usedBy.length === 0;
    default:
      return row.state === state;
  }
}
