import {
  applyFunction,
  binary,
  type BinaryOperator,
  type CompareOperator,
  type FormulaNode,
  type FunctionName,
} from '@shared/formula';
import { Op, STRIDE } from './tape';

const BINARY_OP: Readonly<Record<BinaryOperator, Op>> = {
  '+': Op.Add,
  '-': Op.Subtract,
  '*': Op.Multiply,
  '/': Op.Divide,
  '^': Op.Power,
};

const FUNCTION_OP: Readonly<Record<FunctionName, Op>> = {
  sqrt: Op.Sqrt,
  cbrt: Op.Cbrt,
  exp: Op.Exp,
  expm1: Op.Expm1,
  log: Op.Log,
  log10: Op.Log10,
  log2: Op.Log2,
  log1p: Op.Log1p,
  sin: Op.Sin,
  cos: Op.Cos,
  tan: Op.Tan,
  asin: Op.Asin,
  acos: Op.Acos,
  atan: Op.Atan,
  atan2: Op.Atan2,
  sinh: Op.Sinh,
  cosh: Op.Cosh,
  tanh: Op.Tanh,
  asinh: Op.Asinh,
  acosh: Op.Acosh,
  atanh: Op.Atanh,
  hypot: Op.Hypot,
  abs: Op.Abs,
  min: Op.Min,
  max: Op.Max,
  floor: Op.Floor,
  ceil: Op.Ceil,
  round: Op.Round,
  sign: Op.Sign,
};

/** Where a value stands while a formula is compiled, and what is known of it. */
interface Operand {
  readonly slot: number;
  /** The number itself, when no name is read. */
  readonly constant?: number;
}

/** The finished tape: instructions, constants that follow the node values, and the number of temporaries after them. */
export interface CompiledTape {
  readonly code: Int32Array;
  readonly constants: readonly number[];
  readonly temporaries: number;
}

/**
 * Compiles formulas one after the other into one tape. Slots 0 to nodes - 1 are the nodes; constants and temporaries
 * follow. Temporaries are shared by all formulas and written as negative slots until their number is known.
 */
export class TapeCompiler {
  private readonly code: number[] = [];
  private readonly constantSlots = new Map<number, number>();
  private temporaries = 0;
  private inUse = 0;
  private slotOf: (name: string) => number = () => 0;

  constructor(private readonly nodes: number) {}

  /** Length of the code so far. */
  get length(): number {
    return this.code.length;
  }

  /** Appends the instructions that compute a formula into its node's slot. */
  compile(root: FormulaNode, target: number, slotOf: (name: string) => number): void {
    this.slotOf = slotOf;
    this.inUse = 0;
    const before = this.code.length;
    const result = this.operand(root);
    const last = this.code.length - STRIDE * (this.code.at(-STRIDE) === Op.Otherwise ? 2 : 1);
    if (last >= before && this.code[last + 1] === result.slot) this.code[last + 1] = target;
    else this.emit(Op.Copy, target, result.slot, result.slot);
  }

  finish(): CompiledTape {
    const code = Int32Array.from(this.code);
    const firstTemporary = this.nodes + this.constantSlots.size;
    for (let i = 0; i < code.length; i++) {
      const slot = code[i] as number;
      if (slot < 0) code[i] = firstTemporary - 1 - slot;
    }
    return { code, constants: [...this.constantSlots.keys()], temporaries: this.temporaries };
  }

  private operand(node: FormulaNode): Operand {
    switch (node.kind) {
      case 'number':
        return this.constant(node.value);
      case 'name':
        return { slot: this.slotOf(node.name) };
      case 'negate': {
        const mark = this.inUse;
        const inner = this.operand(node.operand);
        if (inner.constant !== undefined) return this.constant(-inner.constant);
        return this.result(Op.Negate, mark, inner, inner);
      }
      case 'binary':
        return this.binary(node.op, node.left, node.right);
      case 'compare':
        return this.comparison(node.ops, node.operands);
      case 'conditional': {
        const mark = this.inUse;
        const condition = this.operand(node.condition);
        const yes = this.operand(node.whenTrue);
        const no = this.operand(node.whenFalse);
        this.inUse = mark;
        const slot = this.temporary();
        this.emit(Op.Select, slot, condition.slot, yes.slot);
        this.emit(Op.Otherwise, slot, no.slot, no.slot);
        return { slot };
      }
      case 'call':
        return this.call(node.fn, node.args);
    }
  }

  private binary(op: BinaryOperator, leftNode: FormulaNode, rightNode: FormulaNode): Operand {
    const mark = this.inUse;
    const left = this.operand(leftNode);
    const right = this.operand(rightNode);
    if (left.constant !== undefined && right.constant !== undefined) {
      const folded = binary(op, left.constant, right.constant);
      if (Number.isFinite(folded)) return this.constant(folded);
    }
    if (op === '^' && right.constant === 2) return this.result(Op.Multiply, mark, left, left);
    return this.result(BINARY_OP[op], mark, left, right);
  }

  /** A chain holds when the product of its links is 1. */
  private comparison(ops: readonly CompareOperator[], nodes: readonly FormulaNode[]): Operand {
    const mark = this.inUse;
    const operands = nodes.map((node) => this.operand(node));
    let all: Operand | undefined;
    ops.forEach((op, i) => {
      const [a, b] = [operands[i] as Operand, operands[i + 1] as Operand];
      const link = this.link(op, a, b);
      all = all ? this.result(Op.Multiply, this.inUse, all, link) : link;
    });
    const slot = all?.slot ?? 0;
    this.inUse = mark;
    const kept = this.temporary();
    if (kept !== slot) this.emit(Op.Copy, kept, slot, slot);
    return { slot: kept };
  }

  private link(op: CompareOperator, a: Operand, b: Operand): Operand {
    switch (op) {
      case '<':
        return this.result(Op.Less, this.inUse, a, b);
      case '<=':
        return this.result(Op.LessOrEqual, this.inUse, a, b);
      case '>':
        return this.result(Op.Less, this.inUse, b, a);
      case '>=':
        return this.result(Op.LessOrEqual, this.inUse, b, a);
      case '==':
        return this.result(Op.Equal, this.inUse, a, b);
      case '!=':
        return this.result(Op.NotEqual, this.inUse, a, b);
    }
  }

  private call(fn: FunctionName, nodes: readonly FormulaNode[]): Operand {
    const mark = this.inUse;
    const op = FUNCTION_OP[fn];
    const operands = nodes.map((node) => this.operand(node));
    const constants = operands.map((operand) => operand.constant);
    if (constants.every((constant): constant is number => constant !== undefined)) {
      const folded = applyFunction(fn, constants);
      if (Number.isFinite(folded)) return this.constant(folded);
    }
    const first = operands[0] as Operand;
    if (operands.length === 1) return this.result(op, mark, first, first);
    // While arguments are still to come, the folded value stands above all of them.
    const top = this.inUse;
    const rest = operands.slice(1);
    return rest.reduce(
      (folded, operand, i) => this.result(op, i === rest.length - 1 ? mark : top, folded, operand),
      first,
    );
  }

  private constant(value: number): Operand {
    // A Map does not tell 0 from -0; the few formulas with a folded -0 compute it at run time instead.
    if (Object.is(value, -0)) {
      const zero = this.constant(0);
      const slot = this.temporary();
      this.emit(Op.Negate, slot, zero.slot, zero.slot);
      return { slot };
    }
    let slot = this.constantSlots.get(value);
    if (slot === undefined) {
      slot = this.nodes + this.constantSlots.size;
      this.constantSlots.set(value, slot);
    }
    return { slot, constant: value };
  }

  /** Emits an operation whose operands are no longer needed; `mark` is the temporaries in use before them. */
  private result(op: Op, mark: number, a: Operand, b: Operand): Operand {
    this.inUse = mark;
    const slot = this.temporary();
    this.emit(op, slot, a.slot, b.slot);
    return { slot };
  }

  private temporary(): number {
    this.inUse += 1;
    this.temporaries = Math.max(this.temporaries, this.inUse);
    return -this.inUse;
  }

  private emit(op: Op, target: number, a: number, b: number): void {
    this.code.push(op, target, a, b);
  }
}
