import { formatNumber, fromSi, parseUnit, type TemperatureKind } from '@shared/units';

/** Digits of computed numbers in a proof: one more than in a table, so that a reader can follow the arithmetic. */
export const PROOF_DIGITS = 4;

/** A number for reading as TeX: 6 500 → 6\,500, 2.0 · 10¹⁴ → 2.0 \times 10^{14}, with a plain minus sign. */
export function numberTex(text: string): string {
  const [mantissa = '', exponent] = text
    .replace(/\u2212/g, '-')
    .replace(/\u2009/g, '\\,')
    .split(' · 10');
  if (exponent === undefined) return mantissa;
  const digits = [...exponent].map((sign) => SUPERSCRIPTS.get(sign) ?? sign).join('');
  return `${mantissa} \\times 10^{${digits}}`;
}

const SUPERSCRIPTS: ReadonlyMap<string, string> = new Map([
  ...[...'⁰¹²³⁴⁵⁶⁷⁸⁹'].map((sign, digit) => [sign, String(digit)] as const),
  ['⁻', '-'],
]);

const SYMBOLS: readonly (readonly [RegExp, string])[] = [
  [/°C|degC/g, '^{\\circ}C'],
  [/°|\bdeg\b/g, '^{\\circ}'],
  [/%/g, '\\%'],
  [/ohm/g, '\\Omega'],
  [/\bg_?0\b/g, 'g_0'],
  [/\bu(?=[A-Za-z])|µ/g, '\\mu{}'],
  [/\^(-?\d+(?:\.\d+)?)/g, '^{$1}'],
  [/\s*[*·]\s*/g, '{\\cdot}'],
  [/(?<=[A-Za-z0-9})])[ ](?=[A-Za-z(])/g, '\\,'],
];

/** A unit as TeX in upright type: m/s^2 → \mathrm{m/s^{2}}; nothing for a plain number. */
export function unitTex(unit: string): string {
  const text = unit.trim();
  if (text === '' || text === '1') return '';
  if (text === '%') return '\\%';
  return `\\mathrm{${SYMBOLS.reduce((tex, [pattern, replacement]) => tex.replace(pattern, replacement), text)}}`;
}

/** A number as TeX with its unit behind it. */
export function withUnitTex(number: string, unit: string): string {
  const symbol = unitTex(unit);
  return symbol ? `${number}\\,${symbol}` : number;
}

/** An SI value in a unit, as TeX with the unit. */
export function valueTex(
  si: number,
  unit: string,
  options: { readonly digits?: number; readonly temperature?: TemperatureKind } = {},
): string {
  return withUnitTex(numberIn(si, unit, options), unit);
}

/** An SI value in a unit, as TeX without the unit. */
export function numberIn(
  si: number,
  unit: string,
  { digits = PROOF_DIGITS, temperature }: { readonly digits?: number; readonly temperature?: TemperatureKind } = {},
): string {
  const parsed = parseUnit(unit);
  const value = parsed.ok ? fromSi(si, parsed.unit, temperature) : si;
  return numberTex(formatNumber(value, digits));
}

const PLAIN = /^([-\u2212+]?)(\d[\d \u2009\u00a0]*)(\.\d+)?$/;

/** What a person typed, digit by digit as TeX: "6500" → 6\,500, "120.0" → 120.0; null when it is written some other way. */
export function typedTex(text: string): string | null {
  const match = PLAIN.exec(text.trim());
  if (!match) return null;
  const [, sign = '', whole = '', fraction = ''] = match;
  const grouped = whole.replace(/\D/g, '').replace(/\B(?=(\d{3})+$)/g, '\\,');
  return `${sign === '\u2212' || sign === '-' ? '-' : ''}${grouped}${fraction}`;
}

/** Words inside a formula. */
export function wordsTex(words: string): string {
  return `\\text{${words.replace(/[\\{}$%#&_^~]/g, ' ')}}`;
}
