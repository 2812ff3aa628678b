import type { QuantityRow, Uncertainty, UncertaintyInput } from '@shared/contract';
import { prettyUnit } from '@shared/units';
import { readTyped } from '../ui/measure/quantity-field';
import type { ShowNumber } from '../ui/measure/show-number';

/** What of a quantity can be edited in its row. */
export type EditedField = 'value' | 'uncertainty' | 'basis' | 'source';

export const BASES: readonly QuantityRow['basis'][] = ['measured', 'calculated', 'estimated', 'allocated', 'assumed'];
const DISTRIBUTIONS: readonly UncertaintyInput['distribution'][] = ['normal', 'rectangular', 'triangular'];
const USUAL_K = 2;

/** A reading of what was typed, or why it cannot be read and what would be right. */
export type Reading<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly message: string };

/** The value as it was typed, to edit it: "6700 s". Empty when there is none. */
export function valueText(row: QuantityRow): string {
  return row.value === null ? '' : `${row.value.text} ${row.value.unit}`.trim();
}

/** The value for reading; "—" when there is none. */
export function shownValue(row: QuantityRow, show: ShowNumber): string {
  return row.value === null ? '—' : show(row.value.si, row.unit, { temperature: row.temperature });
}

/** An uncertainty as it is typed: "50 s", "50 s, k = 1", "50 s, rectangular". */
export function uncertaintyText(uncertainty: Uncertainty | null): string {
  if (uncertainty === null) return '';
  const { halfWidth, distribution, k } = uncertainty;
  const width = `${halfWidth.text} ${halfWidth.unit}`.trim();
  if (distribution !== 'normal') return `${width}, ${distribution}`;
  return k === USUAL_K ? width : `${width}, k = ${k}`;
}

/** An uncertainty for reading: "± 50 s, k = 2". */
export function shownUncertainty(row: QuantityRow, show: ShowNumber): string {
  if (row.uncertainty === null) return '—';
  const { halfWidth, distribution, k } = row.uncertainty;
  const width = show(halfWidth.si, row.unit, { temperature: 'difference' });
  return `± ${width}, ${distribution === 'normal' ? `k = ${k}` : distribution}`;
}

/** Reads a typed value of the quantity's dimension; empty takes the value away. */
export function readValue(row: Pick<QuantityRow, 'unit' | 'temperature'>, typed: string): Reading<Typed | null> {
  if (typed.trim() === '') return { ok: true, value: null };
  const result = readTyped(typed, row.unit, row.temperature);
  if (!result.ok)
    return { ok: false, message: result.code === 'no-unit' ? unitMissing(typed, row.unit) : result.message };
  return { ok: true, value: { text: result.measure.text, unit: result.measure.unit } };
}

/** What is missing is said with the unit of the quantity itself. */
function unitMissing(typed: string, unit: string): string {
  return `“${typed.trim()}” has no unit. Right would be “${typed.trim()} ${prettyUnit(unit)}”, or any other unit of the same dimension.`;
}

/** Digits and unit, as commands take them. */
export interface Typed {
  readonly text: string;
  readonly unit: string;
}

/** Reads "50 s", "± 50 s, k = 1" or "50 s, rectangular"; empty takes the uncertainty away. */
export function readUncertainty(unit: string, typed: string): Reading<UncertaintyInput | null> {
  const [width = '', ...rest] = typed.replace(/^\s*±/, '').split(',');
  if (typed.trim() === '') return { ok: true, value: null };
  const halfWidth = readTyped(width, unit, 'difference');
  if (!halfWidth.ok) return { ok: false, message: halfWidth.message };
  let distribution: UncertaintyInput['distribution'] = 'normal';
  let k = USUAL_K;
  for (const part of rest.map((word) => word.trim().toLowerCase())) {
    const named = DISTRIBUTIONS.find((name) => name === part);
    const factor = /^k\s*=?\s*(\d+(?:\.\d+)?)$/.exec(part);
    if (named !== undefined) distribution = named;
    else if (factor !== null) k = Number(factor[1]);
    else {
      return {
        ok: false,
        message: `“${part}” is neither a distribution nor a coverage factor. Right would be “${width.trim()}, rectangular” or “${width.trim()}, k = 2”.`,
      };
    }
  }
  const { text, unit: typedUnit } = halfWidth.measure;
  return { ok: true, value: { distribution, k, halfWidth: { text, unit: typedUnit } } };
}
