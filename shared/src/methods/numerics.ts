/**
 * Root of a continuous function between two points where it has opposite signs, by bisection to the last bit.
 * Throws when the signs do not differ: callers bracket by analysis, so that is a programming error.
 */
export function bisect(f: (x: number) => number, low: number, high: number): number {
  let [a, b] = [low, high];
  const rising = f(a) <= 0;
  if (rising === f(b) <= 0 && f(b) !== 0 && f(a) !== 0) throw new Error('The root is not bracketed.');
  for (let step = 0; step < 2000; step += 1) {
    const middle = a + (b - a) / 2;
    if (middle <= a || middle >= b) return middle;
    if (f(middle) <= 0 === rising) a = middle;
    else b = middle;
  }
  return a + (b - a) / 2;
}
