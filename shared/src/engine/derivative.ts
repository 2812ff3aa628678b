/** Step relative to the value: rounding costs 2e-16/1e-4, truncation (1e-4)^4 after extrapolation. */
const RELATIVE_STEP = 1e-4;
/** Step at zero, where the value gives no scale; SI. */
const STEP_AT_ZERO = 1e-6;
const SHRINK = 1 / 64;
const ATTEMPTS = 4;

/**
 * Slope of f at x by central differences over two steps, extrapolated (Richardson) to fourth order. Near the edge of
 * the domain the step shrinks; null when f has no value at x or beside it. f gives NaN for "no value".
 */
export function centralDifference(f: (x: number) => number, x: number): number | null {
  if (!Number.isFinite(f(x))) return null;
  let step = x === 0 ? STEP_AT_ZERO : Math.abs(x) * RELATIVE_STEP;
  for (let attempt = 0; attempt < ATTEMPTS; attempt++, step *= SHRINK) {
    const wide = difference(f, x, step);
    const narrow = difference(f, x, step / 2);
    if (Number.isFinite(wide) && Number.isFinite(narrow)) return (4 * narrow - wide) / 3;
  }
  return null;
}

function difference(f: (x: number) => number, x: number, step: number): number {
  const [below, above] = [x - step, x + step];
  // The distance as rounded, not as meant.
  return (f(above) - f(below)) / (above - below);
}
