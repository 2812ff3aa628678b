import { DIMENSIONLESS, multiplyDimensions, powerDimension, type Dimension } from './dimension';
import { explainUnknownSymbol } from './suggestion';
import { parseUnitTerms, type UnitTerm } from './unit-grammar';
import { UNIT_TABLE, type UnitEntry } from './unit-table';

/** A unit ready for conversion: SI value = value × factor (+ offset for a bare temperature scale). */
export interface Unit {
  /** The text as it was typed, without the spaces around it. */
  readonly symbol: string;
  readonly dimension: Dimension;
  /** numerator/denominator, rounded once. */
  readonly factor: number;
  /** The two parts of the factor, both exact for nearly every unit; conversion uses them to round only once. */
  readonly numerator: number;
  readonly denominator: number;
  /** In kelvin; not zero only for a temperature scale standing alone, such as °C. */
  readonly offset: number;
  readonly display: 'plain' | 'angle' | 'temperature';
}

export type UnitResult = { ok: true; unit: Unit } | { ok: false; message: string; suggestion?: string };

const ONE: Omit<Unit, 'symbol'> = {
  dimension: DIMENSIONLESS,
  factor: 1,
  numerator: 1,
  denominator: 1,
  offset: 0,
  display: 'plain',
};

/** Parsed texts are kept; the store is emptied when full, since people can type any number of different texts. */
const LARGEST_STORE = 4000;
const LONGEST_STORED = 200;
const store = new Map<string, UnitResult>();

/**
 * Reads a unit such as "km/s", "W/(m^2 K)", "kg/kW" or "%"; "" and "1" are the dimensionless unit. Case-sensitive.
 * Errors: a sentence, with the corrected text as suggestion where one is near.
 */
export function parseUnit(text: string): UnitResult {
  const known = store.get(text);
  if (known) return known;
  const result = Object.freeze(readUnit(text.trim()));
  if (text.length > LONGEST_STORED) return result;
  if (store.size >= LARGEST_STORE) store.clear();
  store.set(text, result);
  return result;
}

function readUnit(text: string): UnitResult {
  if (text === '' || text === '1') return { ok: true, unit: Object.freeze({ ...ONE, symbol: text }) };
  const parsed = parseUnitTerms(text);
  if (!parsed.ok) return parsed;
  const found: { term: UnitTerm; entry: UnitEntry }[] = [];
  for (const term of parsed.terms) {
    const entry = UNIT_TABLE.get(term.symbol);
    if (!entry) return unknownSymbol(text, term);
    found.push({ term, entry });
  }
  const [only] = found;
  const alone =
    found.length === 1 && only?.term.exponent.n === 1 && only.term.exponent.d === 1 ? only.entry : undefined;
  return composed(text, found, alone);
}

function composed(
  text: string,
  found: readonly { term: UnitTerm; entry: UnitEntry }[],
  alone: UnitEntry | undefined,
): UnitResult {
  let dimension = DIMENSIONLESS;
  let numerator = 1;
  let denominator = 1;
  for (const { term, entry } of found) {
    const power = Math.abs(term.exponent.n / term.exponent.d);
    const [up, down] =
      term.exponent.n >= 0 ? [entry.numerator, entry.denominator] : [entry.denominator, entry.numerator];
    numerator *= up ** power;
    denominator *= down ** power;
    dimension = multiplyDimensions(dimension, powerDimension(entry.dimension, term.exponent));
  }
  const factor = numerator / denominator;
  if (!Number.isFinite(factor) || factor === 0)
    return { ok: false, message: `The unit “${text}” is too large or too small to compute with.` };
  return {
    ok: true,
    unit: Object.freeze({
      symbol: text,
      dimension,
      factor,
      numerator,
      denominator,
      offset: alone?.offset ?? 0,
      display: alone?.display ?? 'plain',
    }),
  };
}

function unknownSymbol(text: string, term: UnitTerm): UnitResult {
  const { message, suggestions } = explainUnknownSymbol(term.symbol);
  const [best] = suggestions;
  if (best === undefined) return { ok: false, message };
  const whole = term.from === 0 && term.to === text.length;
  const put = /[/ ]/.test(best) && !whole ? `(${best})` : best;
  return { ok: false, message, suggestion: text.slice(0, term.from) + put + text.slice(term.to) };
}

/** The unit of a text that the program itself wrote; throws when it does not parse. */
export function unitOf(text: string): Unit {
  const result = parseUnit(text);
  if (!result.ok) throw new Error(result.message);
  return result.unit;
}
