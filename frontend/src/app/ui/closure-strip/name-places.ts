import { Placed } from './beeswarm';
import type { StripMark } from './strip-mark';

export interface NamePlace {
  readonly key: string;
  readonly text: string;
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'end';
}

const LETTER = 6.6;
const MOST_LETTERS = 34;

/**
 * Where to write the names of marks beside a strip `width` px wide whose middle is at `middle`: alternately above and
 * below, each over its mark, moved on to the next row while it would run into another name.
 */
export function placeNames(
  marks: readonly Placed<StripMark>[],
  width: number,
  middle: number,
  reach: number,
): readonly NamePlace[] {
  const taken: { left: number; right: number; y: number }[] = [];
  return marks.flatMap((mark, index) => {
    const name = `${mark.item.key} ${mark.item.title.charAt(0).toLowerCase()}${mark.item.title.slice(1)}`;
    const text = name.length > MOST_LETTERS ? `${name.slice(0, MOST_LETTERS - 1)}…` : name;
    const length = text.length * LETTER;
    const anchor = mark.x - length < 4 && mark.x + length < width - 4 ? 'start' : 'end';
    const right = anchor === 'end' ? Math.max(mark.x + 6, length + 4) : mark.x - 6 + length;
    const rows = index % 2 === 0 ? [-1, 1, -2, 2] : [1, -1, 2, -2];
    for (const row of rows) {
      const y = middle + Math.sign(row) * (reach * 0.55 + 4 + (Math.abs(row) - 1) * 15) + 4;
      const clash = taken.some(
        (other) => Math.abs(other.y - y) < 13 && other.left < right && right - length < other.right,
      );
      if (clash) continue;
      taken.push({ left: right - length - 6, right: right + 6, y });
      return [{ key: mark.item.key, text, x: anchor === 'end' ? right : right - length, y, anchor }];
    }
    return [];
  });
}
