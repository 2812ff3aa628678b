import type { FunctionName } from './functions';

export type CompareOperator = '<' | '<=' | '>' | '>=' | '==' | '!=';
export type BinaryOperator = '+' | '-' | '*' | '/' | '^';

/** Where a node stands in the text: characters `from` (included) to `to` (excluded), surrounding parentheses included. */
interface Place {
  readonly from: number;
  readonly to: number;
}

export interface NumberNode extends Place {
  readonly kind: 'number';
  readonly value: number;
  /** The digits as typed. */
  readonly digits: string;
}
export interface NameNode extends Place {
  readonly kind: 'name';
  readonly name: string;
}
export interface NegateNode extends Place {
  readonly kind: 'negate';
  readonly operand: FormulaNode;
}
export interface BinaryNode extends Place {
  readonly kind: 'binary';
  readonly op: BinaryOperator;
  readonly left: FormulaNode;
  readonly right: FormulaNode;
}
/** One comparison, or a chain such as a < b <= c, which holds when every link holds. Its value is 1 or 0. */
export interface CompareNode extends Place {
  readonly kind: 'compare';
  readonly ops: readonly CompareOperator[];
  readonly operands: readonly FormulaNode[];
}
export interface ConditionalNode extends Place {
  readonly kind: 'conditional';
  readonly condition: FormulaNode;
  readonly whenTrue: FormulaNode;
  readonly whenFalse: FormulaNode;
}
export interface CallNode extends Place {
  readonly kind: 'call';
  readonly fn: FunctionName;
  readonly args: readonly FormulaNode[];
}

/** The only things a formula can consist of. */
export type FormulaNode = NumberNode | NameNode | NegateNode | BinaryNode | CompareNode | ConditionalNode | CallNode;

/** A parsed formula: the text as typed, its tree, and the names it reads in order of first appearance. */
export interface Formula {
  readonly text: string;
  readonly root: FormulaNode;
  readonly names: readonly string[];
}

/** A refusal, with the character range of the text it is about. */
export interface FormulaError {
  readonly code: FormulaErrorCode;
  readonly message: string;
  readonly from: number;
  readonly to: number;
}

export type FormulaErrorCode =
  | 'empty'
  | 'too-long'
  | 'too-complex'
  | 'character'
  | 'construct'
  | 'number-range'
  | 'implicit-multiplication'
  | 'reserved-name'
  | 'unknown-function'
  | 'argument-count'
  | 'syntax'
  | 'undeclared-name'
  | 'dimension'
  | 'temperature'
  | 'exponent';

export type FormulaResult =
  { readonly ok: true; readonly formula: Formula } | { readonly ok: false; readonly error: FormulaError };
