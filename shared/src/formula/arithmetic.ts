import type { BinaryOperator, CompareOperator } from './ast';
import type { FunctionName } from './functions';

/** What a computation with finite arguments could not do; null when the result is a finite number. */
export interface Problem {
  readonly code: 'domain' | 'division-by-zero' | 'overflow';
  readonly message: string;
}

/** a^b in doubles; NaN stays NaN even under the exponent 0. */
export function power(a: number, b: number): number {
  if (b === 2) return a * a;
  return a !== a ? NaN : Math.pow(a, b);
}

/** Rounds half away from zero, alike for both signs. */
export function roundHalfAway(x: number): number {
  return x < 0 ? -Math.round(-x) : Math.round(x);
}

/** 1 or 0; NaN when a side is NaN. */
export function compare(op: CompareOperator, a: number, b: number): number {
  if (a !== a || b !== b) return NaN;
  switch (op) {
    case '<':
      return a < b ? 1 : 0;
    case '<=':
      return a <= b ? 1 : 0;
    case '>':
      return a > b ? 1 : 0;
    case '>=':
      return a >= b ? 1 : 0;
    case '==':
      return a === b ? 1 : 0;
    case '!=':
      return a !== b ? 1 : 0;
  }
}

/** One of + - * / ^ in doubles, in SI. */
export function binary(op: BinaryOperator, a: number, b: number): number {
  switch (op) {
    case '+':
      return a + b;
    case '-':
      return a - b;
    case '*':
      return a * b;
    case '/':
      return a / b;
    case '^':
      return power(a, b);
  }
}

/** A function of the list, arguments and result in SI. Functions of several arguments fold from the left. */
export function applyFunction(fn: FunctionName, args: readonly number[]): number {
  const x = args[0] ?? NaN;
  switch (fn) {
    case 'atan2':
      return Math.atan2(x, args[1] ?? NaN);
    case 'hypot':
      return args.reduce((a, b) => Math.hypot(a, b));
    case 'min':
      return args.reduce((a, b) => Math.min(a, b));
    case 'max':
      return args.reduce((a, b) => Math.max(a, b));
    case 'round':
      return roundHalfAway(x);
    default:
      return Math[fn](x);
  }
}

const TOO_LARGE: Problem = { code: 'overflow', message: 'a value too large to be computed with' };

/** Why a binary operation on finite numbers gave no finite number. */
export function binaryProblem(op: BinaryOperator, a: number, b: number, result: number): Problem | null {
  if (Number.isFinite(result)) return null;
  if (op === '/' && b === 0) return { code: 'division-by-zero', message: 'division by zero' };
  if (op === '^' && a === 0) return { code: 'division-by-zero', message: 'zero raised to a negative power' };
  if (op === '^' && a < 0 && !Number.isInteger(b)) {
    return { code: 'domain', message: 'a fractional power of a negative number' };
  }
  return TOO_LARGE;
}

/** Why a function of finite numbers gave no finite number. */
export function functionProblem(fn: FunctionName, args: readonly number[], result: number): Problem | null {
  if (Number.isFinite(result)) return null;
  const x = args[0] ?? NaN;
  const domain = (message: string): Problem => ({ code: 'domain', message });
  switch (fn) {
    case 'sqrt':
      return domain('square root of a negative number');
    case 'log':
    case 'log10':
    case 'log2':
      return domain(x === 0 ? 'logarithm of zero' : 'logarithm of a negative number');
    case 'log1p':
      return domain('log1p of a number not above -1');
    case 'asin':
    case 'acos':
      return domain(`${fn} of a number outside -1 to 1`);
    case 'acosh':
      return domain('acosh of a number below 1');
    case 'atanh':
      return domain('atanh of a number not between -1 and 1');
    default:
      return TOO_LARGE;
  }
}
