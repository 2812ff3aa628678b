/** A number read from what a person typed: the digits verbatim, the rest of the text, and the double. */
export interface NumberText {
  readonly text: string;
  readonly rest: string;
  readonly value: number;
}

export type NumberTextResult =
  ({ ok: true } & NumberText) | { ok: false; code: 'not-a-number' | 'out-of-range'; message: string };

/** Spaces that separate groups of three digits: space, no-break, figure, thin and narrow no-break space. */
const GROUP_SPACE = '[ \\u00a0\\u2007\\u2009\\u202f]';
const MINUS = '[-\\u2212\\u2013]';
const DIGITS = `(?:\\d{1,3}(?:${GROUP_SPACE}\\d{3})+(?!\\d)|\\d+)`;
const MANTISSA = `(?:${DIGITS}(?:\\.\\d*)?|\\.\\d+)`;
const SUPER = '[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+';
const TEN_POWER = `10(?:\\^\\(?(?:\\+|${MINUS})?\\d+\\)?|${SUPER})`;
const E_POWER = `[eE](?:\\+|${MINUS})?\\d+`;
const SIGN = `(?:\\+|${MINUS})?`;

/** Longer texts are no value that a person types; the cap keeps messages short. */
const LONGEST_TEXT = 200;

/** 1.2e3, 1.2×10^3, 1.2 · 10³, 10^-9; the power of ten alone has mantissa 1. */
const NUMBER = new RegExp(
  `^(?<sign>${SIGN})\\s*(?:(?<ten>${TEN_POWER})|(?<mantissa>${MANTISSA})(?:(?<e>${E_POWER})|\\s*[×x*·⋅]\\s*(?<times>${TEN_POWER}))?)`,
  'u',
);
const COMMA = new RegExp(`^${SIGN}\\s*\\d[\\d \\u00a0\\u2007\\u2009\\u202f.]*,\\d`, 'u');

const SUPERSCRIPTS = '⁺⁻⁰¹²³⁴⁵⁶⁷⁸⁹';
const PLAIN = '+-0123456789';

function exponentDigits(power: string): string {
  return [...power.replace(/^10\^?\(?|\)$/gu, '').replace(/^[eE]/u, '')]
    .map((sign) => PLAIN[SUPERSCRIPTS.indexOf(sign)] ?? sign)
    .join('')
    .replace(/[\u2212\u2013]/u, '-');
}

function commaMessage(input: string): string {
  const number = /^[^A-Za-z%°]*/u.exec(input)?.[0].trim() ?? input;
  const pointed = number.split(',').length === 2 ? number.replace(',', '.') : number.replaceAll(',', ' ');
  return `“${number}” has a comma. Write a point for decimals, as in ${pointed}, and spaces between thousands.`;
}

/**
 * Reads the number at the start of a text: signs - and −, digit groups of three by any space, 1.2e3, 1.2×10^3, 1.2·10³.
 * Errors: a decimal comma, no number, or a number that a double cannot hold (1e400, 1e-400), each with a sentence.
 */
export function readNumber(input: string): NumberTextResult {
  const source = input.trim();
  if (source.length > LONGEST_TEXT) {
    return { ok: false, code: 'not-a-number', message: `A value of more than ${LONGEST_TEXT} characters is refused.` };
  }
  if (COMMA.test(source)) return { ok: false, code: 'not-a-number', message: commaMessage(source) };
  const match = NUMBER.exec(source);
  const rest = match ? source.slice(match[0].length) : source;
  if (!match || /^(?:[.,\d]|\s+[.\d]\d*(?![\d/]))/u.test(rest)) {
    return {
      ok: false,
      code: 'not-a-number',
      message: `“${source}” does not start with a readable number; write for example 6 500 or 1.2e3.`,
    };
  }
  const { sign = '', ten, mantissa = '1', e, times } = match.groups ?? {};
  const power = ten ?? e ?? times;
  const digits = mantissa.replace(/\s/gu, '');
  const value =
    Number(`${digits}${power === undefined ? '' : `e${exponentDigits(power)}`}`) *
      (/^(?:-|\u2212|\u2013)/u.test(sign) ? -1 : 1) +
    // Turns -0 into 0: a typed zero has no sign.
    0;
  const text = match[0].trim();
  const range = rangeProblem(text, value, /[1-9]/u.test(digits));
  return range ?? { ok: true, text, rest: rest.trim(), value };
}

/** Refuses what a double would silently turn into infinity or zero, or hold with lost digits. */
export function rangeProblem(text: string, value: number, notZero: boolean): NumberTextResult | undefined {
  if (!Number.isFinite(value))
    return {
      ok: false,
      code: 'out-of-range',
      message: `“${text}” is too large to compute with; the largest value is about 1.8e308.`,
    };
  if (notZero && Math.abs(value) < 2.2250738585072014e-308) {
    return {
      ok: false,
      code: 'out-of-range',
      message: `“${text}” is too close to zero to compute with; the smallest value is about 2.2e-308.`,
    };
  }
  return undefined;
}
