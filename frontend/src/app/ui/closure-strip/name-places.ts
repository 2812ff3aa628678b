import { type Placed } from './beeswarm';
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
/** Distances from the mark that are tried, in px; negative is the other side. */
const ROWS = [20, -20, 34, -34];

/**
 * Where to write the names of marks on a strip `width` px wide whose middle is at `middle`: alternately above and below
 * their mark, moved on to the next row while a name would run into another name or over a mark.
 */
export function placeNames(
  named: readonly Placed<StripMark>[],
  marks: readonly Placed<StripMark>[],
  width: number,
  middle: number,
): readonly NamePlace[] {
  const taken: Box[] = marks.map((mark) => boxOf(mark.x - 7, mark.x + 7, middle + mark.y));
  return named.flatMap((mark, index) => {
    const text = nameOf(mark.item);
    const length = text.length * LETTER;
    const anchor = mark.x - length < 4 && mark.x + length < width - 4 ? 'start' : 'end';
    const right = anchor === 'end' ? Math.max(mark.x + 6, length + 4) : mark.x - 6 + length;
    const side = index % 2 === 0 ? -1 : 1;
    for (const row of ROWS) {
      const y = middle + mark.y + side * row;
      const box = boxOf(right - length, right, y);
      if (taken.some((other) => overlap(box, other))) continue;
      taken.push(box);
      return [{ key: mark.item.key, text, x: anchor === 'end' ? right : right - length, y: y + 4, anchor }];
    }
    return [];
  });
}

interface Box {
  readonly left: number;
  readonly right: number;
  readonly y: number;
}

function boxOf(left: number, right: number, y: number): Box {
  return { left: left - 3, right: right + 3, y };
}

function overlap(a: Box, b: Box): boolean {
  return Math.abs(a.y - b.y) < 13 && a.left < b.right && b.left < a.right;
}

function nameOf(mark: StripMark): string {
  const name = `${mark.key} ${mark.title.charAt(0).toLowerCase()}${mark.title.slice(1)}`;
  return name.length > MOST_LETTERS ? `${name.slice(0, MOST_LETTERS - 1)}…` : name;
}
