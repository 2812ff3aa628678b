/** An exact fraction in lowest terms with a positive denominator; exponents of dimensions are kept as these. */
export interface Rational {
  readonly n: number;
  readonly d: number;
}

/** Largest denominator looked for when a decimal exponent such as 0.333… is read as a fraction. */
const LARGEST_DENOMINATOR = 24;

function greatestCommonDivisor(a: number, b: number): number {
  let x = Math.abs(a);
  let y = Math.abs(b);
  while (y !== 0) [x, y] = [y, x % y];
  return x;
}

/** Makes a reduced fraction; throws RangeError for a zero denominator or integers beyond 2^53. */
export function rational(n: number, d = 1): Rational {
  if (!Number.isSafeInteger(n) || !Number.isSafeInteger(d) || d === 0) {
    throw new RangeError(`${n}/${d} is not a fraction of exact integers.`);
  }
  const divisor = greatestCommonDivisor(n, d) * (d < 0 ? -1 : 1);
  // Adding 0 turns -0 into 0, so that equal fractions have equal text.
  return { n: n / divisor + 0, d: d / divisor };
}

/** Reads a double as the fraction it stands for (0.5 → 1/2); undefined when no small denominator fits within 1e-12. */
export function rationalOf(x: number): Rational | undefined {
  for (let d = 1; d <= LARGEST_DENOMINATOR; d += 1) {
    const n = Math.round(x * d);
    if (!Number.isSafeInteger(n)) return undefined;
    if (Math.abs(x - n / d) <= 1e-12 * Math.max(1, Math.abs(x))) return rational(n, d);
  }
  return undefined;
}

/** The sum of two fractions. */
export function addRationals(a: Rational, b: Rational): Rational {
  return rational(a.n * b.d + b.n * a.d, a.d * b.d);
}

/** The product of two fractions. */
export function multiplyRationals(a: Rational, b: Rational): Rational {
  return rational(a.n * b.n, a.d * b.d);
}

/** The text of a fraction: "2", "-1", "1/2". */
export function rationalText(r: Rational): string {
  return r.d === 1 ? String(r.n) : `${r.n}/${r.d}`;
}
