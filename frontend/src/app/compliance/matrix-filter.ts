import type { MatrixRow } from '@shared/contract';
import { matchesWords } from '../ui/address/address';

/** What of the matrix is looked at; every part is empty when it does not narrow. */
export interface MatrixFilter {
  readonly verdict: string;
  readonly compliance: string;
  readonly method: string;
  readonly element: string;
  readonly owner: string;
  /** Words that occur in key, title, statement, reason or evidence. */
  readonly q: string;
}
export type FilterName = keyof MatrixFilter;

/** Rows that pass every part of a filter, in their order. */
export function filtered(rows: readonly MatrixRow[], filter: MatrixFilter): MatrixRow[] {
  return rows.filter((row) => passes(row, filter));
}

function passes(row: MatrixRow, filter: MatrixFilter): boolean {
  const same = (asked: string, has: string): boolean => asked === '' || asked === has;
  return (
    same(filter.verdict, row.verdict) &&
    same(filter.compliance, row.compliance) &&
    (filter.method === '' || methodsOf(row).includes(filter.method)) &&
    same(filter.element, row.element) &&
    same(filter.owner, row.owner) &&
    matchesWords(filter.q, row.key, row.title, row.text, row.reason, row.evidence, row.departure)
  );
}

/** What one field can be narrowed to, in alphabetical order. */
export function choicesOf(rows: readonly MatrixRow[], field: 'method' | 'element' | 'owner'): string[] {
  const all = rows.flatMap((row) => (field === 'method' ? methodsOf(row) : [row[field]]));
  return [...new Set(all)].filter((choice) => choice !== '').sort((a, b) => a.localeCompare(b, 'en'));
}

/** A row with several verifications names all of their methods. */
function methodsOf(row: MatrixRow): string[] {
  return row.method.split(/[,;]\s*/);
}
