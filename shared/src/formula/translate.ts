import type { BinaryOperator, CompareOperator, FormulaError, FormulaErrorCode, FormulaNode } from './ast';
import { FUNCTIONS, functionSuggestion, isFunctionName } from './functions';
import type { Token } from './scan';

const MAX_NODES = 300;
const MAX_DEPTH = 40;

/** Thrown inside the translation and turned into a result by the parser's caller. */
export class Refusal extends Error {
  constructor(readonly reason: FormulaError) {
    super(reason.message);
  }
}

/** The fields of a mathjs node that are read here; nothing else of it is touched, and no method is called. */
interface ParsedNode {
  readonly type: string;
  readonly name?: unknown;
  readonly op?: unknown;
  readonly fn?: unknown;
  readonly implicit?: unknown;
  readonly args?: readonly ParsedNode[];
  readonly params?: readonly ParsedNode[];
  readonly content?: ParsedNode;
  readonly condition?: ParsedNode;
  readonly trueExpr?: ParsedNode;
  readonly falseExpr?: ParsedNode;
}

/** What other node types are called in a refusal. */
const REFUSED_NODES: ReadonlyMap<string, string> = new Map([
  ['AccessorNode', 'Parts of objects are'],
  ['IndexNode', 'An index is'],
  ['ArrayNode', 'A list is'],
  ['ObjectNode', 'An object is'],
  ['RangeNode', 'A range (a:b) is'],
  ['AssignmentNode', 'An assignment is'],
  ['FunctionAssignmentNode', 'A function definition is'],
  ['BlockNode', 'A block of expressions is'],
]);

const BINARY: ReadonlySet<string> = new Set<BinaryOperator>(['+', '-', '*', '/', '^']);
const COMPARE: ReadonlySet<string> = new Set<CompareOperator>(['<', '<=', '>', '>=', '==', '!=']);

/**
 * Copies a mathjs tree into ours. The tree is walked in the order of the text beside the scanned tokens, which gives
 * every node its place; a tree that does not match its tokens one by one is refused.
 */
export function translate(tree: unknown, tokens: readonly Token[]): { node: FormulaNode; names: readonly string[] } {
  const names = new Set<string>();
  let next = 0;
  let nodes = 0;

  const fail = (code: FormulaErrorCode, message: string, from: number, to: number): never => {
    throw new Refusal({ code, message, from, to });
  };
  const peek = (): Token => tokens[next] ?? tokens[tokens.length - 1] ?? { kind: 'close', text: '', from: 0, to: 0 };
  const take = (kind: Token['kind'], text?: string): Token => {
    const token = tokens[next];
    if (!token || token.kind !== kind || (text !== undefined && token.text !== text)) {
      const at = peek();
      return fail('construct', `"${at.text}" is not understood here`, at.from, at.to);
    }
    next += 1;
    return token;
  };

  const child = (node: ParsedNode | undefined, depth: number): FormulaNode => {
    if (!node) return fail('construct', 'This is not understood', peek().from, peek().to);
    return walk(node, depth + 1);
  };

  const operator = (node: ParsedNode, depth: number): FormulaNode => {
    const args = node.args ?? [];
    const op = typeof node.op === 'string' ? node.op : '';
    if (node.implicit === true)
      return fail('implicit-multiplication', 'Write the multiplication sign', peek().from, peek().to);
    if (args.length === 1 && (op === '-' || op === '+')) {
      const sign = take('operator', op);
      const operand = child(args[0], depth);
      if (op === '+') return { ...operand, from: sign.from };
      return { kind: 'negate', operand, from: sign.from, to: operand.to };
    }
    if (args.length !== 2)
      return fail('construct', `The operator "${op}" is not part of a formula`, peek().from, peek().to);
    const left = child(args[0], depth);
    if (!BINARY.has(op) && !COMPARE.has(op)) {
      return fail('construct', `The operator "${op}" is not part of a formula`, peek().from, peek().to);
    }
    take('operator', op);
    const right = child(args[1], depth);
    const place = { from: left.from, to: right.to };
    if (COMPARE.has(op)) return { kind: 'compare', ops: [op as CompareOperator], operands: [left, right], ...place };
    return { kind: 'binary', op: op as BinaryOperator, left, right, ...place };
  };

  const chain = (node: ParsedNode, depth: number): FormulaNode => {
    const ops: CompareOperator[] = [];
    const operands: FormulaNode[] = [];
    for (const param of node.params ?? []) {
      if (operands.length > 0) {
        const token = take('operator');
        if (!COMPARE.has(token.text)) fail('construct', `"${token.text}" is not understood here`, token.from, token.to);
        ops.push(token.text as CompareOperator);
      }
      operands.push(child(param, depth));
    }
    const first = operands[0];
    const last = operands.at(-1);
    if (!first || !last) return fail('construct', 'This comparison is not understood', peek().from, peek().to);
    return { kind: 'compare', ops, operands, from: first.from, to: last.to };
  };

  const call = (node: ParsedNode, depth: number): FormulaNode => {
    const name = take('name');
    const spec = FUNCTIONS.get(name.text);
    if (!spec || !isFunctionName(name.text)) {
      const instead = functionSuggestion(name.text);
      const hint = instead ? `; write ${instead}` : '; to multiply, write the multiplication sign';
      return fail('unknown-function', `${name.text} is not a function that formulas know${hint}`, name.from, name.to);
    }
    take('open');
    const args: FormulaNode[] = [];
    for (const argument of node.args ?? []) {
      if (args.length > 0) take('comma');
      args.push(child(argument, depth));
    }
    const close = take('close');
    if (args.length < spec.least || args.length > spec.most) {
      const wanted = spec.least === spec.most ? `${spec.least}` : `${spec.least} to ${spec.most}`;
      const noun = wanted === '1' ? 'argument' : 'arguments';
      const message = `${name.text} takes ${wanted} ${noun}, not ${args.length}`;
      return fail('argument-count', message, name.from, close.to);
    }
    return { kind: 'call', fn: name.text, args, from: name.from, to: close.to };
  };

  const walk = (node: ParsedNode, depth: number): FormulaNode => {
    nodes += 1;
    const here = peek();
    if (nodes > MAX_NODES) fail('too-complex', `A formula has at most ${MAX_NODES} parts`, here.from, here.to);
    if (depth > MAX_DEPTH) fail('too-complex', `A formula nests at most ${MAX_DEPTH} deep`, here.from, here.to);
    switch (node.type) {
      case 'ConstantNode': {
        const token = take('number');
        return { kind: 'number', value: Number(token.text), digits: token.text, from: token.from, to: token.to };
      }
      case 'SymbolNode': {
        const token = take('name');
        if (isFunctionName(token.text)) {
          fail('argument-count', `${token.text} is a function: write ${token.text}(…)`, token.from, token.to);
        }
        names.add(token.text);
        return { kind: 'name', name: token.text, from: token.from, to: token.to };
      }
      case 'ParenthesisNode': {
        const open = take('open');
        const inner = child(node.content, depth);
        const close = take('close');
        return { ...inner, from: open.from, to: close.to };
      }
      case 'OperatorNode':
        return operator(node, depth);
      case 'RelationalNode':
        return chain(node, depth);
      case 'ConditionalNode': {
        const condition = child(node.condition, depth);
        take('question');
        const whenTrue = child(node.trueExpr, depth);
        take('colon');
        const whenFalse = child(node.falseExpr, depth);
        return { kind: 'conditional', condition, whenTrue, whenFalse, from: condition.from, to: whenFalse.to };
      }
      case 'FunctionNode':
        return call(node, depth);
      default: {
        const what = REFUSED_NODES.get(node.type) ?? 'This construct is';
        const last = tokens.at(-1) ?? here;
        return fail('construct', `${what} not part of a formula`, here.from, last.to);
      }
    }
  };

  const node = walk(tree as ParsedNode, 1);
  const left = tokens[next];
  if (left) fail('construct', `"${left.text}" is not understood here`, left.from, left.to);
  return { node, names: [...names] };
}
