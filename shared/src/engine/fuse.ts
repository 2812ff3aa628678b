import { Op, STRIDE } from './tape';

/** What a first and a second operation become when the second reads the first's result on its left, or on its right. */
const FUSED: ReadonlyMap<Op, { readonly left: ReadonlyMap<Op, Op>; readonly right: ReadonlyMap<Op, Op> }> = new Map([
  [
    Op.Multiply,
    {
      left: new Map([
        [Op.Multiply, Op.MultiplyMultiply],
        [Op.Add, Op.MultiplyAdd],
        [Op.Subtract, Op.MultiplySubtract],
        [Op.Divide, Op.MultiplyDivide],
      ]),
      right: new Map([
        [Op.Subtract, Op.SubtractProduct],
        [Op.Divide, Op.DivideByProduct],
      ]),
    },
  ],
  [
    Op.Add,
    {
      left: new Map([
        [Op.Multiply, Op.AddMultiply],
        [Op.Add, Op.AddAdd],
      ]),
      right: new Map([[Op.Divide, Op.DivideBySum]]),
    },
  ],
  [Op.Subtract, { left: new Map([[Op.Multiply, Op.SubtractMultiply]]), right: new Map() }],
]);

/**
 * Joins pairs of neighbouring instructions in place: the first takes the joint operation, the second stays behind it as
 * its operands. Results are the same to the last bit, since each step still rounds. A temporary is read exactly once,
 * so the first result, which is no longer stored, is not missed.
 */
export function fuse(code: Int32Array, firstTemporary: number): void {
  for (let pc = 0; pc + STRIDE < code.length; pc += STRIDE) {
    const next = pc + STRIDE;
    const [first, second] = [code[pc] as Op, code[next] as Op];
    const rules = FUSED.get(first);
    const result = code[pc + 1] as number;
    if (!rules || result < firstTemporary) continue;
    const onRight = code[next + 3] === result;
    if (code[next + 2] === result && onRight) continue;
    const commutes = second === Op.Add || second === Op.Multiply;
    if (onRight && commutes) {
      code[next + 3] = code[next + 2] as number;
      code[next + 2] = result;
    }
    const onLeft = code[next + 2] === result;
    const joint = onLeft ? rules.left.get(second) : onRight ? rules.right.get(second) : undefined;
    if (joint === undefined) continue;
    code[pc] = joint;
    pc = next;
  }
}
