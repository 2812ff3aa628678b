import { addRationals, multiplyRationals, rational, rationalOf, rationalText, type Rational } from './rational';

/** The seven base units of the SI, in the order in which exponents are kept. */
export const BASE_UNITS = ['m', 'kg', 's', 'A', 'K', 'mol', 'cd'] as const;
export type BaseUnit = (typeof BASE_UNITS)[number];

/**
 * A physical dimension: the exponents of m, kg, s, A, K, mol, cd. Interned, so two dimensions are equal exactly when
 * they are the same object. The key is their permanent text, fit for storage.
 */
export interface Dimension {
  readonly key: string;
  readonly exponents: readonly Rational[];
}

const interned = new Map<string, Dimension>();

function intern(exponents: readonly Rational[]): Dimension {
  const key = exponents.map(rationalText).join(',');
  const known = interned.get(key);
  if (known) return known;
  const dimension: Dimension = Object.freeze({ key, exponents: Object.freeze(exponents.map((r) => Object.freeze(r))) });
  interned.set(key, dimension);
  return dimension;
}

/** The dimension of a plain number, and of an angle: the radian counts as 1. */
export const DIMENSIONLESS: Dimension = intern(BASE_UNITS.map(() => rational(0)));

/** The dimension with the given exponents; throws RangeError for an exponent that is not a small fraction. */
export function dimensionOf(exponents: Partial<Record<BaseUnit, number>>): Dimension {
  return intern(
    BASE_UNITS.map((base) => {
      const exponent = rationalOf(exponents[base] ?? 0);
      if (!exponent) throw new RangeError(`The exponent ${exponents[base]} of ${base} is not a small fraction.`);
      return exponent;
    }),
  );
}

function combine(a: Dimension, b: Dimension, sign: 1 | -1): Dimension {
  const weight = rational(sign);
  return intern(a.exponents.map((r, i) => addRationals(r, multiplyRationals(weight, b.exponents[i] ?? rational(0)))));
}

/** The dimension of a product. */
export function multiplyDimensions(a: Dimension, b: Dimension): Dimension {
  return combine(a, b, 1);
}

/** The dimension of a quotient. */
export function divideDimensions(a: Dimension, b: Dimension): Dimension {
  return combine(a, b, -1);
}

/** The dimension of a power with a constant rational exponent; throws RangeError when an exponent leaves 2^53. */
export function powerDimension(a: Dimension, r: Rational): Dimension {
  return intern(a.exponents.map((exponent) => multiplyRationals(exponent, r)));
}

/** Finds the interned dimension of a stored key; undefined when the text is not seven fractions. */
export function dimensionOfKey(key: string): Dimension | undefined {
  const known = interned.get(key);
  if (known) return known;
  const parts = key.split(',');
  if (parts.length !== BASE_UNITS.length || !parts.every((part) => /^-?\d{1,6}(\/\d{1,6})?$/.test(part)))
    return undefined;
  if (parts.some((part) => /\/0+$/.test(part))) return undefined;
  return intern(
    parts.map((part) => {
      const [n, d] = part.split('/');
      return rational(Number(n), Number(d ?? '1'));
    }),
  );
}
