import { roundHalfAway } from '@shared/formula';

/**
 * Instructions of the tape, four numbers each: [operation, destination, a, b], the last three slots of the value array.
 * Kept in this file so that the compiler puts the numbers in place of the names inside the loop.
 */
export const enum Op {
  Copy,
  Negate,
  Add,
  Subtract,
  Multiply,
  Divide,
  Power,
  Less,
  LessOrEqual,
  Equal,
  NotEqual,
  /** destination = a ? b : the a of the instruction behind it. */
  Select,
  Otherwise,
  Min,
  Max,
  Hypot,
  Atan2,
  Sqrt,
  Cbrt,
  Exp,
  Expm1,
  Log,
  Log10,
  Log2,
  Log1p,
  Sin,
  Cos,
  Tan,
  Asin,
  Acos,
  Atan,
  Sinh,
  Cosh,
  Tanh,
  Asinh,
  Acosh,
  Atanh,
  Abs,
  Floor,
  Ceil,
  Round,
  Sign,
}

/** Numbers per instruction. */
export const STRIDE = 4;

/**
 * Runs the instructions from `from` (included) to `to` (excluded) over the values. An operation that would make a
 * finite number of an infinite argument gives NaN instead, so that no overflow on the way is lost.
 */
export function run(code: Int32Array, values: Float64Array, from: number, to: number): void {
  for (let pc = from; pc < to; pc += STRIDE) {
    const target = code[pc + 1] as number;
    const a = values[code[pc + 2] as number] as number;
    const b = values[code[pc + 3] as number] as number;
    switch (code[pc] as number) {
      case Op.Add:
        values[target] = a + b;
        break;
      case Op.Subtract:
        values[target] = a - b;
        break;
      case Op.Multiply:
        values[target] = a * b;
        break;
      case Op.Divide:
        values[target] = b - b === 0 ? a / b : NaN;
        break;
      case Op.Copy:
        values[target] = a;
        break;
      case Op.Negate:
        values[target] = -a;
        break;
      case Op.Power:
        values[target] = finite(a, b) ? Math.pow(a, b) : NaN;
        break;
      case Op.Less:
        values[target] = finite(a, b) ? (a < b ? 1 : 0) : NaN;
        break;
      case Op.LessOrEqual:
        values[target] = finite(a, b) ? (a <= b ? 1 : 0) : NaN;
        break;
      case Op.Equal:
        values[target] = finite(a, b) ? (a === b ? 1 : 0) : NaN;
        break;
      case Op.NotEqual:
        values[target] = finite(a, b) ? (a === b ? 0 : 1) : NaN;
        break;
      case Op.Select:
        pc += STRIDE;
        values[target] = a === 0 ? (values[code[pc + 2] as number] as number) : a - a === 0 ? b : NaN;
        break;
      case Op.Min:
        values[target] = finite(a, b) ? Math.min(a, b) : NaN;
        break;
      case Op.Max:
        values[target] = finite(a, b) ? Math.max(a, b) : NaN;
        break;
      case Op.Hypot:
        values[target] = Math.hypot(a, b);
        break;
      case Op.Atan2:
        values[target] = finite(a, b) ? Math.atan2(a, b) : NaN;
        break;
      case Op.Sqrt:
        values[target] = Math.sqrt(a);
        break;
      case Op.Cbrt:
        values[target] = Math.cbrt(a);
        break;
      case Op.Exp:
        values[target] = a - a === 0 ? Math.exp(a) : NaN;
        break;
      case Op.Expm1:
        values[target] = a - a === 0 ? Math.expm1(a) : NaN;
        break;
      case Op.Log:
        values[target] = Math.log(a);
        break;
      case Op.Log10:
        values[target] = Math.log10(a);
        break;
      case Op.Log2:
        values[target] = Math.log2(a);
        break;
      case Op.Log1p:
        values[target] = Math.log1p(a);
        break;
      case Op.Sin:
        values[target] = Math.sin(a);
        break;
      case Op.Cos:
        values[target] = Math.cos(a);
        break;
      case Op.Tan:
        values[target] = Math.tan(a);
        break;
      case Op.Asin:
        values[target] = Math.asin(a);
        break;
      case Op.Acos:
        values[target] = Math.acos(a);
        break;
      case Op.Atan:
        values[target] = a - a === 0 ? Math.atan(a) : NaN;
        break;
      case Op.Sinh:
        values[target] = Math.sinh(a);
        break;
      case Op.Cosh:
        values[target] = Math.cosh(a);
        break;
      case Op.Tanh:
        values[target] = a - a === 0 ? Math.tanh(a) : NaN;
        break;
      case Op.Asinh:
        values[target] = Math.asinh(a);
        break;
      case Op.Acosh:
        values[target] = Math.acosh(a);
        break;
      case Op.Atanh:
        values[target] = Math.atanh(a);
        break;
      case Op.Abs:
        values[target] = Math.abs(a);
        break;
      case Op.Floor:
        values[target] = Math.floor(a);
        break;
      case Op.Ceil:
        values[target] = Math.ceil(a);
        break;
      case Op.Round:
        values[target] = roundHalfAway(a);
        break;
      case Op.Sign:
        values[target] = a - a === 0 ? Math.sign(a) : NaN;
        break;
    }
  }
}

/** Whether both numbers are finite: the difference of such a number to itself is 0, of any other NaN. */
function finite(a: number, b: number): boolean {
  return a - a === 0 && b - b === 0;
}
