import { toSi, type TemperatureKind } from './convert';
import { DIMENSIONLESS, type Dimension } from './dimension';
import { describeWithArticle } from './dimension-names';
import { rangeProblem, readNumber } from './number-text';
import { preferredUnit } from './preferences';
import { prettyUnit } from './pretty-unit';
import { parseUnit, unitOf, type Unit } from './unit';

/** A number with its unit as a person gave it, and its value in SI. */
export interface Measure {
  /** Digits verbatim as typed. */
  readonly text: string;
  /** Unit as typed; "" for a plain number. */
  readonly unit: string;
  readonly si: number;
}

export type MeasureProblem = 'empty' | 'not-a-number' | 'no-unit' | 'unknown-unit' | 'wrong-dimension' | 'out-of-range';
export type MeasureResult = { ok: true; measure: Measure } | { ok: false; code: MeasureProblem; message: string };

/** What a field takes. A default unit is used only when no unit is typed. */
export interface ExpectedMeasure {
  readonly dimension: Dimension;
  readonly temperature?: TemperatureKind;
  readonly defaultUnit?: string;
}

/** Symbols that people type for another one, known only from what the field expects. */
const MEANT: Readonly<Record<string, string>> = { C: '°C', T: 't', F: 'N', k: 'K', G: 'g0', H: 'h', g: 'g0' };

/**
 * Reads "38 km/s", "0.12 c", "6 500 s", "−4.2 m/s", "1.2·10³ kg" for a field of the given dimension.
 * Errors: a code and a sentence that names what was typed and what would be right.
 */
export function parseMeasure(input: string, expected: ExpectedMeasure): MeasureResult {
  const typed = input.trim();
  if (typed === '')
    return { ok: false, code: 'empty', message: `Nothing is typed; ${needed(expected.dimension, undefined)}.` };
  const number = readNumber(typed);
  if (!number.ok) return number;
  const symbol = number.rest === '' && expected.defaultUnit !== undefined ? expected.defaultUnit : number.rest;
  if (symbol === '' && expected.dimension !== DIMENSIONLESS) {
    return {
      ok: false,
      code: 'no-unit',
      message: `“${typed}” has no unit; ${needed(expected.dimension, number.text)}.`,
    };
  }
  const unit = parseUnit(symbol);
  if (!unit.ok) return { ok: false, code: 'unknown-unit', message: unit.message };
  if (unit.unit.dimension !== expected.dimension)
    return wrongDimension(typed, number.text, unit.unit, expected.dimension);
  return measured(number.text, symbol, number.value, unit.unit, expected.temperature);
}

/** Makes a measure of digits and unit given apart; "" is the unit of a plain number. Errors as parseMeasure. */
export function makeMeasure(text: string, unit: string, temperature?: TemperatureKind): MeasureResult {
  if (text.trim() === '') return { ok: false, code: 'empty', message: 'Nothing is typed; a number is needed here.' };
  const number = readNumber(text);
  if (!number.ok) return number;
  if (number.rest !== '') {
    return {
      ok: false,
      code: 'not-a-number',
      message: `“${text.trim()}” is more than a number; its unit belongs in the unit field.`,
    };
  }
  const parsed = parseUnit(unit);
  if (!parsed.ok) return { ok: false, code: 'unknown-unit', message: parsed.message };
  return measured(number.text, unit.trim(), number.value, parsed.unit, temperature);
}

function measured(
  text: string,
  symbol: string,
  value: number,
  unit: Unit,
  temperature?: TemperatureKind,
): MeasureResult {
  const si = toSi(value, unit, temperature);
  const problem = rangeProblem(`${text} ${symbol}`.trim(), si, value !== 0 && unit.offset === 0);
  if (problem && !problem.ok) return problem;
  return { ok: true, measure: Object.freeze({ text, unit: symbol, si }) };
}

function wrongDimension(typed: string, digits: string, unit: Unit, dimension: Dimension): MeasureResult {
  const meant = Object.hasOwn(MEANT, unit.symbol) ? MEANT[unit.symbol] : undefined;
  const hint = meant !== undefined && unitOf(meant).dimension === dimension ? ` Did you mean ${digits} ${meant}?` : '';
  const given = unit.symbol === '' ? 'a plain number' : describeWithArticle(unit.dimension);
  return {
    ok: false,
    code: 'wrong-dimension',
    message: `“${typed}” is ${given}; ${needed(dimension, digits)}.${hint}`,
  };
}

/** "a speed is needed here, for example 38 km/s" */
function needed(dimension: Dimension, digits: string | undefined): string {
  const unit = prettyUnit(preferredUnit(dimension, {}));
  const example = `${digits ?? (dimension === DIMENSIONLESS ? '0.9' : '38')} ${unit}`.trim();
  return `${describeWithArticle(dimension)} is needed here, for example ${example}`;
}
