import type { CommandOf, QuantityRow } from '@shared/contract';
import { parseUnit } from '@shared/units';
import type { QuantityKind } from '@shared/methods';
import { BASES, type Reading, readValue, valueText } from '../quantity-text';
import { readTyped } from '../../ui/measure/quantity-field';

/** A quantity as it stands in its form: texts only, as typed. */
export interface QuantityText {
  readonly symbol: string;
  readonly name: string;
  readonly kind: string;
  readonly unit: string;
  readonly temperature: string;
  readonly value: string;
  readonly halfWidth: string;
  readonly distribution: string;
  readonly k: string;
  readonly basis: string;
  readonly source: string;
  readonly elementId: string;
}
export type QuantityTextField = keyof QuantityText;

export const BLANK: QuantityText = {
  symbol: '',
  name: '',
  kind: '',
  unit: '',
  temperature: 'absolute',
  value: '',
  halfWidth: '',
  distribution: 'normal',
  k: '2',
  basis: 'estimated',
  source: '',
  elementId: '',
};

type Fields = Omit<CommandOf<'quantity.create'>, 'type' | 'id'>;
const DISTRIBUTIONS = ['normal', 'rectangular', 'triangular'] as const;

/** A quantity as the form shows it. */
export function textOf(row: QuantityRow): QuantityText {
  const { uncertainty } = row;
  return {
    symbol: row.symbol,
    name: row.name,
    kind: row.kind ?? '',
    unit: row.unit,
    temperature: row.temperature,
    value: valueText(row),
    halfWidth: uncertainty === null ? '' : `${uncertainty.halfWidth.text} ${uncertainty.halfWidth.unit}`.trim(),
    distribution: uncertainty?.distribution ?? 'normal',
    k: String(uncertainty?.k ?? 2),
    basis: row.basis,
    source: row.source,
    elementId: row.elementId ?? '',
  };
}

/** What is wrong with the fields, by field; empty when it can be sent. */
export function faultsOf(text: QuantityText): Partial<Record<QuantityTextField, string>> {
  const faults: Partial<Record<QuantityTextField, string>> = {};
  if (!/^[A-Za-z][A-Za-z0-9_]{0,39}$/.test(text.symbol.trim()))
    faults.symbol = 'A symbol starts with a letter and holds only letters, digits and _, such as I_sp.';
  if (text.name.trim() === '') faults.name = 'Say in words what it is.';
  const unit = parseUnit(text.unit.trim());
  if (!unit.ok) {
    faults.unit = unit.suggestion ? `${unit.message} Did you mean ${unit.suggestion}?` : unit.message;
    return faults;
  }
  const value = readValue({ unit: text.unit.trim(), temperature: temperatureOf(text) }, text.value);
  if (!value.ok) faults.value = value.message;
  const width = readHalfWidth(text);
  if (!width.ok) faults.halfWidth = width.message;
  const k = Number(text.k);
  if (text.distribution === 'normal' && !(k > 0 && k <= 10))
    faults.k = `“${text.k}” is no coverage factor; right would be a number above 0 and up to 10, such as 2.`;
  return faults;
}

/** The form as the fields of a command. Call it on a form without faults. */
export function fieldsOf(text: QuantityText): Fields {
  const value = readValue({ unit: text.unit.trim(), temperature: temperatureOf(text) }, text.value);
  const width = readHalfWidth(text);
  return {
    symbol: text.symbol.trim(),
    name: text.name.trim(),
    kind: text.kind === '' ? null : text.kind,
    unit: text.unit.trim(),
    temperature: temperatureOf(text),
    value: value.ok ? value.value : null,
    uncertainty:
      width.ok && width.value !== null
        ? {
            distribution: DISTRIBUTIONS.find((one) => one === text.distribution) ?? 'normal',
            halfWidth: width.value,
            k: text.distribution === 'normal' ? Number(text.k) : 2,
          }
        : null,
    basis: (BASES.find((one) => one === text.basis) ?? 'estimated') as Fields['basis'],
    source: text.source.trim(),
    elementId: text.elementId === '' ? null : text.elementId,
  };
}

/** Only what differs between two states of the form, so that an edit says what it changes. */
export function changedFields(before: QuantityText, after: QuantityText): Partial<Fields> {
  const [old, now] = [fieldsOf(before), fieldsOf(after)];
  return Object.fromEntries(
    Object.entries(now).filter(([name, value]) => JSON.stringify(value) !== JSON.stringify(old[name as keyof Fields])),
  );
}

/** The bounds of a kind in words, with the reason for them: "above 0 s (…)". */
export function boundsInWords(kind: QuantityKind, show: (si: number) => string): string {
  const { bounds } = kind;
  if (bounds === null) return 'Physics sets no limit on the value alone.';
  const { min, max } = bounds;
  const parts = [
    ...(min === undefined ? [] : [`${bounds.minExclusive ? 'above' : 'at least'} ${show(min)}`]),
    ...(max === undefined ? [] : [`${bounds.maxExclusive ? 'below' : 'at most'} ${show(max)}`]),
  ];
  const words = parts.join(', ');
  return `${words.charAt(0).toUpperCase()}${words.slice(1)}: ${bounds.reason}.`;
}

function temperatureOf(text: QuantityText): 'absolute' | 'difference' {
  return text.temperature === 'difference' ? 'difference' : 'absolute';
}

function readHalfWidth(text: QuantityText): Reading<{ readonly text: string; readonly unit: string } | null> {
  if (text.halfWidth.trim() === '') return { ok: true, value: null };
  const read = readTyped(text.halfWidth, text.unit.trim(), 'difference');
  return read.ok
    ? { ok: true, value: { text: read.measure.text, unit: read.measure.unit } }
    : { ok: false, message: read.message };
}
