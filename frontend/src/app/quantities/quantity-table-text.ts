import type { QuantityRow } from '@shared/contract';
import { fromSi, plainNumber, unitOf } from '@shared/units';

const HEADS = [
  ...['Key', 'Symbol', 'Name', 'Value', 'Unit', 'Half-width', 'Distribution', 'k', 'Basis', 'Source', 'Element'],
  ...['State', 'Used by', 'Bears on'],
];

/** The rows for pasting into a spreadsheet: tab-separated, numbers bare in the quantity's own unit, texts inert. */
export function quantityTableText(rows: readonly QuantityRow[]): string {
  return [HEADS, ...rows.map(cells)].map((line) => line.join('\t')).join('\n');
}

function cells(row: QuantityRow): string[] {
  const unit = unitOf(row.unit);
  const { uncertainty } = row;
  return [
    text(row.key),
    text(row.symbol),
    text(row.name),
    row.value === null ? '' : plainNumber(fromSi(row.value.si, unit, row.temperature), 12),
    text(row.unit),
    uncertainty === null ? '' : plainNumber(fromSi(uncertainty.halfWidth.si, unit, 'difference'), 12),
    uncertainty?.distribution ?? '',
    uncertainty?.distribution === 'normal' ? String(uncertainty.k) : '',
    row.basis,
    text(row.source),
    text(row.element),
    row.state,
    text(row.usedBy.join(', ')),
    text(row.bearsOn.join(', ')),
  ];
}

/** A text must not end its cell, and must not be taken for a formula. */
function text(value: string): string {
  const line = value.replace(/\s+/g, ' ');
  return /^[=+\-@]/.test(line) ? `'${line}` : line;
}
