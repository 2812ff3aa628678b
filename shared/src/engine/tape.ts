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
  /** NaN instead of an infinite value, before an operation that would swallow the infinity. */
  Finite,
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

/** Runs the instructions from `from` (included) to `to` (excluded) over the values. */
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
        values[target] = a / b;
        break;
      case Op.Copy:
        values[target] = a;
        break;
      case Op.Negate:
        values[target] = -a;
        break;
      case Op.Power:
        values[target] = a !== a ? NaN : Math.pow(a, b);
        break;
      case Op.Finite:
        values[target] = a - a === 0 ? a : NaN;
        break;
      case Op.Less:
        values[target] = a < b ? 1 : a >= b ? 0 : NaN;
        break;
      case Op.LessOrEqual:
        values[target] = a <= b ? 1 : a > b ? 0 : NaN;
        break;
      case Op.Equal:
        values[target] = a === b ? 1 : a !== a || b !== b ? NaN : 0;
        break;
      case Op.NotEqual:
        values[target] = a === b ? 0 : a !== a || b !== b ? NaN : 1;
        break;
      case Op.Select:
        pc += STRIDE;
        values[target] = a === 0 ? (values[code[pc + 2] as number] as number) : a !== a ? NaN : b;
        break;
      case Op.Min:
        values[target] = Math.min(a, b);
        break;
      case Op.Max:
        values[target] = Math.max(a, b);
        break;
      case Op.Hypot:
        values[target] = Math.hypot(a, b);
        break;
      case Op.Atan2:
        values[target] = Math.atan2(a, b);
        break;
      default:
        values[target] = unary(code[pc] as number, a);
    }
  }
}

function unary(op: Op, x: number): number {
  switch (op) {
    case Op.Sqrt:
      return Math.sqrt(x);
    case Op.Cbrt:
      return Math.cbrt(x);
    case Op.Exp:
      return Math.exp(x);
    case Op.Expm1:
      return Math.expm1(x);
    case Op.Log:
      return Math.log(x);
    case Op.Log10:
      return Math.log10(x);
    case Op.Log2:
      return Math.log2(x);
    case Op.Log1p:
      return Math.log1p(x);
    case Op.Sin:
      return Math.sin(x);
    case Op.Cos:
      return Math.cos(x);
    case Op.Tan:
      return Math.tan(x);
    case Op.Asin:
      return Math.asin(x);
    case Op.Acos:
      return Math.acos(x);
    case Op.Atan:
      return Math.atan(x);
    case Op.Sinh:
      return Math.sinh(x);
    case Op.Cosh:
      return Math.cosh(x);
    case Op.Tanh:
      return Math.tanh(x);
    case Op.Asinh:
      return Math.asinh(x);
    case Op.Acosh:
      return Math.acosh(x);
    case Op.Atanh:
      return Math.atanh(x);
    case Op.Abs:
      return Math.abs(x);
    case Op.Floor:
      return Math.floor(x);
    case Op.Ceil:
      return Math.ceil(x);
    case Op.Round:
      return roundHalfAway(x);
    case Op.Sign:
      return Math.sign(x);
    default:
      throw new Error(`The tape has no operation ${op}`);
  }
}
