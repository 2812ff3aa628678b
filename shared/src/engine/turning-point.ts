export interface RootOptions {
  readonly min?: number;
  readonly max?: number;
  /** Size of the values whose difference f is, to tell a root from rounding. */
  readonly scale: number;
}

interface Point {
  readonly x: number;
  readonly y: number;
}

const FIRST_STEP = 1e-3;
const GROWTH = 1.6;
/** Growing by 1.6 from a thousandth, 75 steps reach about 1e12 times the present value. */
const STEPS = 75;
const EDGE_HALVINGS = 40;
const ITERATIONS = 200;
const ROUNDING = 1e-12;

/**
 * The root of f nearest to x: steps on both sides grow geometrically until the sign changes, then Brent's method
 * narrows the bracket. A jump across zero counts (a conditional may turn there), a pole does not. f gives NaN for "no
 * value"; a side ends there, after a search up to the edge. Null when no root lies within the bounds or reach.
 */
export function nearestRoot(f: (x: number) => number, x: number, options: RootOptions): number | null {
  const { min = -Infinity, max = Infinity, scale } = options;
  const here: Point = { x, y: f(x) };
  if (!Number.isFinite(here.y)) return null;
  if (Math.abs(here.y) <= ROUNDING * scale) return x;

  const sides = [-1, 1].map((direction) => ({ direction, last: here, open: true }));
  let reach = firstStep(x, min, max);
  for (let k = 0; k < STEPS && sides.some((side) => side.open); k++, reach *= GROWTH) {
    const found: number[] = [];
    for (const side of sides.filter(({ open }) => open)) {
      const next = Math.min(max, Math.max(min, x + side.direction * reach));
      if (next === side.last.x) {
        side.open = false;
        continue;
      }
      const point: Point = { x: next, y: f(next) };
      const bracket = Number.isFinite(point.y) ? [side.last, point] : approachEdge(f, side.last, next);
      const [a, b] = bracket as [Point, Point];
      const root = a.y * b.y <= 0 && a.x !== b.x ? narrow(f, a, b) : null;
      if (root !== null) found.push(root);
      side.last = b;
      side.open = Number.isFinite(point.y) && next !== min && next !== max;
    }
    if (found.length > 0) return found.reduce((a, b) => (Math.abs(b - x) < Math.abs(a - x) ? b : a));
  }
  return null;
}

function firstStep(x: number, min: number, max: number): number {
  if (x !== 0) return Math.abs(x) * FIRST_STEP;
  const range = max - min;
  return Number.isFinite(range) && range > 0 ? range * FIRST_STEP * FIRST_STEP : FIRST_STEP;
}

/** Halves towards the edge of the domain between a good and a failing place; ends at a change of sign or at the edge. */
function approachEdge(f: (x: number) => number, good: Point, failing: number): [Point, Point] {
  let last = good;
  let edge = failing;
  for (let i = 0; i < EDGE_HALVINGS; i++) {
    const middle = last.x + (edge - last.x) / 2;
    const y = f(middle);
    if (!Number.isFinite(y)) {
      edge = middle;
      continue;
    }
    const point: Point = { x: middle, y };
    if (last.y * y <= 0) return [last, point];
    last = point;
  }
  return [last, last];
}

/** Brent's method (Brent 1973, zeroin) in a bracket; null when the change of sign is a pole or meets a failure. */
function narrow(f: (x: number) => number, first: Point, second: Point): number | null {
  let [a, b] = [first, second];
  let c = a;
  let width = b.x - a.x;
  let before = width;
  for (let i = 0; i < ITERATIONS; i++) {
    if (b.y > 0 === c.y > 0) {
      c = a;
      width = b.x - a.x;
      before = width;
    }
    if (Math.abs(c.y) < Math.abs(b.y)) [a, b, c] = [b, c, b];
    const tolerance = 2 * Number.EPSILON * Math.abs(b.x);
    const half = (c.x - b.x) / 2;
    if (Math.abs(half) <= tolerance || b.y === 0) break;
    const step = interpolate(a, b, c, half);
    if (
      Math.abs(before) >= tolerance &&
      step !== null &&
      Math.abs(2 * step) < Math.min(3 * Math.abs(half), Math.abs(before))
    ) {
      before = width;
      width = step;
    } else {
      width = half;
      before = half;
    }
    a = b;
    const x = b.x + (Math.abs(width) > tolerance ? width : Math.sign(half) * Math.max(tolerance, Number.MIN_VALUE));
    const y = f(x);
    if (!Number.isFinite(y)) return null;
    b = { x, y };
  }
  const pole = Math.abs(b.y) > Math.max(Math.abs(first.y), Math.abs(second.y));
  return pole ? null : b.x;
}

/** Inverse quadratic step, or secant when only two points differ; null when it is no number. */
function interpolate(a: Point, b: Point, c: Point, half: number): number | null {
  const s = b.y / a.y;
  let p: number;
  let q: number;
  if (a.x === c.x) {
    p = 2 * half * s;
    q = 1 - s;
  } else {
    const r = b.y / c.y;
    const t = a.y / c.y;
    p = s * (2 * half * t * (t - r) - (b.x - a.x) * (r - 1));
    q = (t - 1) * (r - 1) * (s - 1);
  }
  if (p > 0) q = -q;
  const step = Math.abs(p) / q;
  return Number.isFinite(step) && step * half > 0 ? step : null;
}
