import { fromSi, type TemperatureKind } from './convert';
import { superscript } from './dimension-names';
import { prettyUnit } from './pretty-unit';
import { rational } from './rational';
import { parseUnit } from './unit';

const THIN_SPACE = '\u2009';
const MINUS = '\u2212';
/** Digits shown when nobody says: enough for a concept study, few enough to read. */
const USUAL_DIGITS = 3;

function withoutTrailingZeros(decimal: string): string {
  return decimal.includes('.') ? decimal.replace(/\.?0+$/, '') : decimal;
}

function grouped(digits: string): string {
  return digits.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE);
}

/**
 * A number for reading: 39.1, 0.88, 6 500 (thin space), 2.0 · 10¹⁴, with a true minus sign. Significant digits are an
 * upper bound; whole digits below a million are never rounded away. Not a finite number: "not computable".
 */
export function formatNumber(x: number, digits: number = USUAL_DIGITS): string {
  if (!Number.isFinite(x)) return 'not computable';
  const size = Math.abs(x);
  const significant = Math.min(Math.max(Math.trunc(digits), 1), 17);
  const body =
    size === 0 ? '0' : size >= 1e6 || size < 1e-3 ? scientific(size, significant) : positional(size, significant);
  return x < 0 && body !== '0' ? MINUS + body : body;
}

function scientific(size: number, digits: number): string {
  const [mantissa = '', exponent = '0'] = size.toExponential(digits - 1).split('e');
  const short = withoutTrailingZeros(mantissa);
  return `${short.includes('.') || digits === 1 ? short : `${short}.0`} · 10${superscript(rational(Number(exponent)))}`;
}

function positional(size: number, digits: number): string {
  const rounded = Number(size.toPrecision(digits));
  if (rounded >= 1e6 && size < 1e6 && Math.round(size) >= 1e6) return scientific(rounded, digits);
  const magnitude = Math.floor(Math.log10(rounded));
  const text = withoutTrailingZeros(
    magnitude >= digits - 1 ? size.toFixed(0) : size.toFixed(Math.min(digits - 1 - magnitude, 20)),
  );
  const [whole = '', fraction] = text.split('.');
  return grouped(whole) + (fraction === undefined ? '' : `.${fraction}`);
}

export interface FormatOptions {
  readonly digits?: number;
  readonly temperature?: TemperatureKind;
  /** false leaves the unit off, for a column that names it in its head. */
  readonly withUnit?: boolean;
}

/** An SI value in a unit, for reading: "39.1 km/s". Throws when the unit text does not parse. */
export function formatSi(si: number, unit: string, options: FormatOptions = {}): string {
  const parsed = parseUnit(unit);
  if (!parsed.ok) throw new Error(parsed.message);
  const number = formatNumber(fromSi(si, parsed.unit, options.temperature), options.digits);
  const symbol = prettyUnit(unit);
  return options.withUnit === false || symbol === '' || !Number.isFinite(si) ? number : `${number} ${symbol}`;
}

/** A number for CSV and for copying, in ASCII: "39.08", "-4.2", "2e14"; up to 15 significant digits by default. */
export function plainNumber(x: number, digits = 15): string {
  if (!Number.isFinite(x)) return '';
  const rounded = Number(x.toPrecision(Math.min(Math.max(Math.trunc(digits), 1), 17)));
  return (rounded === 0 ? '0' : String(rounded)).replace('e+', 'e');
}
