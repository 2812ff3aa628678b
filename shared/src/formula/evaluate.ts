import { applyFunction, binary, binaryProblem, compare, functionProblem, type Problem } from './arithmetic';
import type { Formula, FormulaNode } from './ast';
import type { Failure, Outcome } from './outcome';

/** Gives the value of a name, or the failure it carries. */
export type ReadName = (name: string) => number | Failure;

/**
 * Computes a tree step by step, in SI. Only the branch a condition chooses is computed. A step without a finite result
 * becomes a failure whose message ends in `where`; a failed name passes its failure on, the leftmost first.
 */
export function evaluateTree(
  root: FormulaNode,
  read: ReadName,
  where: { origin: string; label: string },
): number | Failure {
  const failed = (problem: Problem): Failure => ({
    code: problem.code,
    message: where.label ? `${problem.message} in ${where.label}` : problem.message,
    origin: where.origin,
  });

  const all = (nodes: readonly FormulaNode[]): number[] | Failure => {
    const values: number[] = [];
    for (const node of nodes) {
      const value = step(node);
      if (typeof value !== 'number') return value;
      values.push(value);
    }
    return values;
  };

  const step = (node: FormulaNode): number | Failure => {
    switch (node.kind) {
      case 'number':
        return node.value;
      case 'name':
        return read(node.name);
      case 'negate': {
        const value = step(node.operand);
        return typeof value === 'number' ? -value : value;
      }
      case 'binary': {
        const a = step(node.left);
        if (typeof a !== 'number') return a;
        const b = step(node.right);
        if (typeof b !== 'number') return b;
        const result = binary(node.op, a, b);
        const problem = binaryProblem(node.op, a, b, result);
        return problem ? failed(problem) : result;
      }
      case 'compare': {
        const values = all(node.operands);
        if (!Array.isArray(values)) return values;
        const holds = node.ops.every((op, i) => compare(op, values[i] ?? NaN, values[i + 1] ?? NaN) === 1);
        return holds ? 1 : 0;
      }
      case 'conditional': {
        const condition = step(node.condition);
        if (typeof condition !== 'number') return condition;
        return step(condition !== 0 ? node.whenTrue : node.whenFalse);
      }
      case 'call': {
        const values = all(node.args);
        if (!Array.isArray(values)) return values;
        const result = applyFunction(node.fn, values);
        const problem = functionProblem(node.fn, values, result);
        return problem ? failed(problem) : result;
      }
    }
  };
  return step(root);
}

/** Computes one formula from values in SI by name. A name without a finite value is the failure's origin. */
export function evaluateFormula(formula: Formula, values: ReadonlyMap<string, number>): Outcome {
  const read: ReadName = (name) => {
    const value = values.get(name);
    if (value !== undefined && Number.isFinite(value)) return value;
    return { code: 'missing', message: `${name} has no value`, origin: name };
  };
  const result = evaluateTree(formula.root, read, { origin: '', label: '' });
  return typeof result === 'number' ? { ok: true, value: result } : { ok: false, failure: result };
}
