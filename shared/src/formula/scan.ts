import type { FormulaError, FormulaErrorCode } from './ast';
import { isFunctionName } from './functions';

export interface Token {
  readonly kind: 'number' | 'name' | 'operator' | 'open' | 'close' | 'comma' | 'question' | 'colon';
  readonly text: string;
  readonly from: number;
  readonly to: number;
}

/** The tokens, and the text as the parser gets it, with the place in the typed text of each of its characters. */
export type ScanResult =
  | { readonly ok: true; readonly tokens: readonly Token[]; readonly plain: string; readonly places: readonly number[] }
  | { readonly ok: false; readonly error: FormulaError };

export const MAX_LENGTH = 2000;
const MAX_PARENTHESES = 30;
const MAX_POWERS = 20;
const MAX_CONDITIONS = 20;
const MAX_SIGNS = 3;

/** Signs people paste from documents, one character each, so that positions stay true. */
const TYPOGRAPHIC: ReadonlyMap<string, string> = new Map([
  ['\u2212', '-'],
  ['\u00d7', '*'],
  ['\u00b7', '*'],
  ['\u22c5', '*'],
  ['\u00f7', '/'],
  ['\u2264', '<='],
  ['\u2265', '>='],
  ['\u2260', '!='],
  ['\u00a0', ' '],
  ['\u2009', ' '],
  ['\u202f', ' '],
]);

/** What a refused character would begin, in words. */
const REFUSED: ReadonlyMap<string, string> = new Map([
  ['%', 'A percent sign is not part of a formula; write 0.05 for 5 %, or give the input the unit %'],
  ['!', 'A factorial is not part of a formula'],
  ['=', 'An assignment is not part of a formula; to compare, write =='],
  ['[', 'Lists and indexes are not part of a formula'],
  [']', 'Lists and indexes are not part of a formula'],
  ['{', 'Objects are not part of a formula'],
  ['}', 'Objects are not part of a formula'],
  ['"', 'Text is not part of a formula'],
  ["'", 'Text and transposition are not part of a formula'],
  ['`', 'Text is not part of a formula'],
  [';', 'A formula is a single expression; use one line for each'],
  ['\n', 'A formula is a single line; use one line for each expression'],
  ['\r', 'A formula is a single line; use one line for each expression'],
  ['.', 'A dot only stands inside a number; parts of objects and element-wise operators are not part of a formula'],
  ['&', 'Logic and bit operators are not part of a formula; nest conditions with ? and :'],
  ['|', 'Logic and bit operators are not part of a formula; nest conditions with ? and :'],
  ['~', 'Bit operators are not part of a formula'],
  ['#', 'Comments are not part of a formula'],
]);

/** Words that mathjs would read as operators or values. */
const WORDS: ReadonlyMap<string, string> = new Map([
  ['and', 'The operator "and" is not part of a formula; chain comparisons (a < b < c) or nest conditions'],
  ['or', 'The operator "or" is not part of a formula; nest conditions with ? and :'],
  ['xor', 'The operator "xor" is not part of a formula'],
  ['not', 'The operator "not" is not part of a formula; turn the comparison round'],
  ['mod', 'The operator "mod" is not part of a formula'],
  ['to', 'Unit conversion is not part of a formula; units belong to the inputs'],
  ['in', 'Unit conversion is not part of a formula; units belong to the inputs'],
  ['end', 'The word "end" is not part of a formula'],
  ['true', 'Truth values are not part of a formula; write a comparison'],
  ['false', 'Truth values are not part of a formula; write a comparison'],
  ['null', 'null is not a number'],
  ['undefined', 'undefined is not a number'],
  ['uninitialized', 'uninitialized is not a number'],
  ['Infinity', 'Infinity is not a finite number'],
  ['NaN', 'NaN is not a number'],
]);

const NUMBER = /(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?/y;
const NAME = /[A-Za-z_][A-Za-z0-9_]*/y;
const OPERATOR = /<=|>=|==|!=|[-+*/^<>]/y;

/**
 * Cuts a formula into tokens, refusing by name everything that is not on the list of characters and words, and
 * whatever could make the parser work hard (length, nesting, powers). Also returns the text with typographic signs
 * replaced, which is what the parser gets to see.
 */
export function scan(text: string): ScanResult {
  const refuse = (code: FormulaErrorCode, message: string, from: number, to: number): ScanResult => ({
    ok: false,
    error: { code, message, from, to },
  });
  if (text.length > MAX_LENGTH) {
    return refuse(
      'too-long',
      `A formula has at most ${MAX_LENGTH} characters; this one has ${text.length}`,
      MAX_LENGTH,
      text.length,
    );
  }
  const tokens: Token[] = [];
  const places: number[] = [];
  let plain = '';
  const opened: Token[] = [];
  let powers = 0;
  let conditions = 0;
  let signs = 0;
  let at = 0;
  while (at < text.length) {
    const typed = text[at] ?? '';
    const sign = TYPOGRAPHIC.get(typed);
    if (typed === ' ' || typed === '\t' || sign === ' ') {
      plain += ' ';
      places.push(at);
      at += 1;
      continue;
    }
    const token = sign ? operatorToken(sign, at, at + 1) : tokenAt(text, at);
    if (!token) {
      const message = REFUSED.get(typed);
      if (message) return refuse('construct', message, at, at + 1);
      return refuse('character', `${describeCharacter(text, at)} is not allowed in a formula`, at, at + 1);
    }
    const before = tokens.at(-1);
    if (token.kind === 'number') {
      const outOfRange = numberRefusal(token.text);
      if (outOfRange) return refuse('number-range', outOfRange, token.from, token.to);
    }
    if (token.kind === 'name') {
      const word = WORDS.get(token.text);
      if (word) return refuse('construct', word, token.from, token.to);
      if (isReserved(token.text)) {
        return refuse('reserved-name', `${token.text} cannot be used as a name`, token.from, token.to);
      }
    }
    if (before && isAdjacent(before, token)) {
      const parts = `${before.text} and ${token.text}`;
      return refuse('implicit-multiplication', `Write the multiplication sign between ${parts}`, before.from, token.to);
    }
    if (token.kind === 'operator' && token.text === '*' && before?.text === '*' && before.to === token.from) {
      return refuse('construct', 'Write ^ for a power', before.from, token.to);
    }
    signs = token.text === '+' || token.text === '-' ? signs + 1 : 0;
    if (signs > MAX_SIGNS) return refuse('too-complex', 'Too many signs in a row', token.from, token.to);
    if (token.text === '^' && ++powers > MAX_POWERS) {
      return refuse('too-complex', `A formula has at most ${MAX_POWERS} powers`, token.from, token.to);
    }
    if (token.kind === 'question' && ++conditions > MAX_CONDITIONS) {
      return refuse('too-complex', `A formula has at most ${MAX_CONDITIONS} conditions`, token.from, token.to);
    }
    if (token.kind === 'open') {
      opened.push(token);
      if (opened.length > MAX_PARENTHESES) {
        return refuse('too-complex', `Parentheses nest at most ${MAX_PARENTHESES} deep`, token.from, token.to);
      }
    }
    if (token.kind === 'close' && !opened.pop()) {
      return refuse('syntax', 'This parenthesis closes nothing', token.from, token.to);
    }
    tokens.push(token);
    plain += token.text;
    for (let i = 0; i < token.text.length; i++) places.push(Math.min(token.from + i, token.to));
    at = token.to;
  }
  const open = opened.at(-1);
  if (open) return refuse('syntax', 'This parenthesis is never closed', open.from, open.to);
  if (tokens.length === 0) return refuse('empty', 'The formula is empty', 0, text.length);
  return { ok: true, tokens, plain, places };
}

function operatorToken(text: string, from: number, to: number): Token {
  return { kind: 'operator', text, from, to };
}

function tokenAt(text: string, from: number): Token | undefined {
  const single = SINGLE.get(text[from] ?? '');
  if (single) return { kind: single, text: text[from] ?? '', from, to: from + 1 };
  for (const [kind, pattern] of PATTERNS) {
    pattern.lastIndex = from;
    const match = pattern.exec(text);
    if (match) return { kind, text: match[0], from, to: from + match[0].length };
  }
  return undefined;
}

const SINGLE: ReadonlyMap<string, Token['kind']> = new Map([
  ['(', 'open'],
  [')', 'close'],
  [',', 'comma'],
  ['?', 'question'],
  [':', 'colon'],
]);
const PATTERNS: readonly (readonly [Token['kind'], RegExp])[] = [
  ['number', NUMBER],
  ['name', NAME],
  ['operator', OPERATOR],
];

/** Two values side by side, which mathjs would multiply silently. A name before a parenthesis is a call. */
function isAdjacent(before: Token, token: Token): boolean {
  const ends = before.kind === 'number' || before.kind === 'name' || before.kind === 'close';
  if (!ends) return false;
  if (token.kind === 'number' || token.kind === 'name') return true;
  return token.kind === 'open' && before.kind !== 'name';
}

function numberRefusal(digits: string): string | undefined {
  const value = Number(digits);
  if (!Number.isFinite(value)) return `${digits} is too large to be computed with`;
  const mantissa = digits.split(/[eE]/)[0] ?? '';
  if (value === 0 && /[1-9]/.test(mantissa)) return `${digits} is too small to be told from 0`;
  return undefined;
}

/** Names of the language's own object properties stay out, so that no later use of a name as a key can meet them. */
export function isReserved(name: string): boolean {
  return name in Object.prototype || name === 'prototype' || name === 'arguments' || name.startsWith('__');
}

/** Whether a text can name an input or a line of a formula. */
export function isFormulaName(name: string): boolean {
  return /^[A-Za-z_][A-Za-z0-9_]*$/.test(name) && !WORDS.has(name) && !isReserved(name) && !isFunctionName(name);
}

function describeCharacter(text: string, at: number): string {
  const code = text.codePointAt(at) ?? 0;
  const visible = /[\p{L}\p{M}\p{N}\p{P}\p{S}]/u.test(String.fromCodePoint(code));
  const number = `U+${code.toString(16).toUpperCase().padStart(4, '0')}`;
  if (!visible) return `The invisible character ${number}`;
  const letter = /\p{L}/u.test(String.fromCodePoint(code));
  return letter
    ? `The letter ${String.fromCodePoint(code)} (names are written in the letters A to Z)`
    : `The character ${String.fromCodePoint(code)}`;
}
