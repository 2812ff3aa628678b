import { parse as parseWithMathjs } from 'mathjs/number';
import type { Formula, FormulaError, FormulaErrorCode, FormulaResult } from './ast';
import { scan } from './scan';
import { translate, Refusal } from './translate';

/** Formulas kept per generation; two generations live at once. */
const GENERATION = 15_000;
let young = new Map<string, FormulaResult>();
let old = new Map<string, FormulaResult>();

/**
 * Reads a formula. The text is scanned against the allow-list first, parsed by mathjs's parser (never evaluated),
 * and its tree copied node by node into our own; whatever is not on the list is refused by name with its place.
 * Results are kept per text, so that the same text is parsed once.
 */
export function parseFormula(text: string): FormulaResult {
  const known = young.get(text);
  if (known) return known;
  const result = old.get(text) ?? parseAfresh(text);
  if (young.size >= GENERATION) {
    old = young;
    young = new Map();
  }
  young.set(text, result);
  return result;
}

function parseAfresh(text: string): FormulaResult {
  const scanned = scan(text);
  if (!scanned.ok) return scanned;
  let tree: unknown;
  try {
    tree = parseWithMathjs(scanned.plain);
  } catch (error) {
    return { ok: false, error: syntaxError(error, text, scanned.places) };
  }
  try {
    const root = translate(tree, scanned.tokens);
    const formula: Formula = { text, root: root.node, names: root.names };
    return { ok: true, formula };
  } catch (error) {
    if (error instanceof Refusal) return { ok: false, error: error.reason };
    throw error;
  }
}

/** Our words for the parser's complaints; its own words name characters by number. */
function syntaxError(error: unknown, text: string, places: readonly number[]): FormulaError {
  const make = (code: FormulaErrorCode, message: string, from: number, to: number): FormulaError => ({
    code,
    message,
    from,
    to,
  });
  if (error instanceof RangeError) return make('too-complex', 'The formula is nested too deeply', 0, text.length);
  const raw = error instanceof Error ? error.message : '';
  const char = error instanceof Error && 'char' in error && typeof error.char === 'number' ? error.char - 1 : 0;
  const from = places[char] ?? text.length;
  const to = Math.min(from + 1, text.length);
  if (raw.startsWith('Unexpected end') || from >= text.length) {
    return make(
      'syntax',
      'The formula ends too soon: a value is missing',
      Math.max(0, text.trimEnd().length - 1),
      text.length,
    );
  }
  if (raw.startsWith('Value expected')) return make('syntax', 'A value is missing here', from, to);
  if (raw.startsWith('False part')) return make('syntax', 'The part after ":" of the condition is missing', from, to);
  if (raw.startsWith('Parenthesis')) return make('syntax', 'A closing parenthesis is expected here', from, to);
  return make('syntax', `"${text.slice(from, to)}" is not expected here`, from, to);
}
