import * as fs from 'node:fs';
import * as path from 'node:path';

/** Colours of both lights as written in _tokens.scss. */
const TOKENS = new Map(
  [
    ...fs
      .readFileSync(path.join(__dirname, '_tokens.scss'), 'utf8')
      .matchAll(/--([\w-]+): light-dark\((#\w{6}), (#\w{6})\)/g),
  ].map((match) => [match[1] ?? '', [match[2] ?? '', match[3] ?? ''] as const]),
);

/** Contrast ratio of two colours, WCAG 2.2 "relative luminance" and "contrast ratio". */
function contrast(a: string, b: string): number {
  const luminance = (colour: string): number => {
    const [r, g, blue] = [1, 3, 5].map((at) => {
      const channel = Number.parseInt(colour.slice(at, at + 2), 16) / 255;
      return channel <= 0.04045 ? channel / 12.92 : ((channel + 0.055) / 1.055) ** 2.4;
    });
    return 0.2126 * (r ?? 0) + 0.7152 * (g ?? 0) + 0.0722 * (blue ?? 0);
  };
  const [light, dark] = [luminance(a), luminance(b)].sort((x, y) => y - x);
  return ((light ?? 0) + 0.05) / ((dark ?? 0) + 0.05);
}

const TEXT_PAIRS: readonly (readonly [string, readonly string[]])[] = [
  ['ink', ['paper', 'sheet', 'lifted', 'chosen', 'hatch', 'indeterminate-ground', 'non-compliant-ground']],
  ['ink-2', ['paper', 'sheet', 'lifted', 'chosen']],
  ['cobalt', ['paper', 'sheet', 'lifted', 'chosen', 'indeterminate-ground', 'non-compliant-ground']],
  ['on-cobalt', ['cobalt', 'cobalt-deep']],
  ['block-ink', ['block', 'block-hover']],
  ['block-ink-2', ['block', 'block-hover']],
  ['compliant', ['sheet', 'chosen', 'compliant-ground']],
  ['short', ['sheet', 'chosen', 'short-ground']],
  ['indeterminate', ['sheet', 'chosen', 'indeterminate-ground']],
  ['non-compliant', ['sheet', 'chosen', 'non-compliant-ground', 'lifted']],
  ['unknown', ['sheet', 'chosen']],
  ['on-share', ['share-1', 'share-2', 'share-3']],
];
const DRAWN = [
  'compliant-fill',
  'short-fill',
  'indeterminate-fill',
  'non-compliant-fill',
  'unknown-fill',
  'edge',
  'cobalt',
];

describe('the tokens of both lights', () => {
  it('is not contrast of nothing: black on white is 21', () => {
    expect(contrast('#000000', '#ffffff')).toBeCloseTo(21, 6);
    expect(TOKENS.size).toBeGreaterThan(30);
  });

  it.each([
    ['paper', 0],
    ['blueprint', 1],
  ] as const)('keeps text at 4.5:1 and drawn marks at 3:1 on %s', (_, light) => {
    const failing: string[] = [];
    const check = (above: string, below: string, least: number): void => {
      const [a, b] = [TOKENS.get(above)?.[light], TOKENS.get(below)?.[light]];
      const ratio = a === undefined || b === undefined ? 0 : contrast(a, b);
      if (ratio < least) failing.push(`${above} on ${below}: ${ratio.toFixed(2)}`);
    };
    for (const [text, grounds] of TEXT_PAIRS) for (const ground of grounds) check(text, ground, 4.5);
    for (const mark of DRAWN) check(mark, 'sheet', 3);
    expect(failing).toEqual([]);
  });
});
