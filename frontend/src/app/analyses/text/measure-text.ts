/** Digits and unit of "6 700 s" apart, as commands take them; the server says what is wrong with either. */
export function readMeasureText(typed: string): { text: string; unit: string } {
  const [, digits = '', unit = ''] =
    /^\s*([+\-−]?[\d\s\u2009\u00a0.,]*\d\.?(?:\s*[eE][+\-−]?\d+)?)\s*(.*)$/.exec(typed) ?? [];
  if (digits === '') return { text: typed.trim(), unit: '' };
  return { text: digits.trim(), unit: unit.trim() };
}
