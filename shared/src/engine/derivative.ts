/** Step relative to the value: rounding costs 2e-16/1e-4, truncation (1e-4)^4 after extrapolation. */
const RELATIVE_STEP = 1e-4;
/** Step at zero, where the value gives no scale; SI. */
const STEP_AT_ZERO = 1e-6;
const SHRINK = 1 / 64;
const ATTEMPTS = 4;

/**
 * Slopes of several functions of one variable at x, by central differences over two steps, extrapolated (Richardson) to
 * fourth order. Near the edge of a function's domain its step shrinks; null where it has no value at x or beside it.
 * `f` gives all values at once, NaN for "no value"; each slope is the same whatever other functions are asked with it.
 */
export function centralDifferences(f: (x: number) => Float64Array, x: number): (number | null)[] {
  const slopes = Array.from(f(x), (value): number | null | undefined => (Number.isFinite(value) ? undefined : null));
  let step = x === 0 ? STEP_AT_ZERO : Math.abs(x) * RELATIVE_STEP;
  for (let attempt = 0; attempt < ATTEMPTS && slopes.includes(undefined); attempt++, step *= SHRINK) {
    const wide = differences(f, x, step);
    const narrow = differences(f, x, step / 2);
    slopes.forEach((slope, i) => {
      const [w, n] = [wide[i] as number, narrow[i] as number];
      if (slope === undefined && Number.isFinite(w) && Number.isFinite(n)) slopes[i] = (4 * n - w) / 3;
    });
  }
  return slopes.map((slope) => slope ?? null);
}

function differences(f: (x: number) => Float64Array, x: number, step: number): Float64Array {
  const [below, above] = [x - step, x + step];
  const lower = f(below);
  // The distance as rounded, not as meant.
  return f(above).map((value, i) => (value - (lower[i] as number)) / (above - below));
}
