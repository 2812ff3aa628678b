export type {
  Formula,
  FormulaError,
  FormulaErrorCode,
  FormulaNode,
  FormulaResult,
  BinaryOperator,
  CompareOperator,
} from './ast';
export { applyFunction, binary, compare, power, roundHalfAway } from './arithmetic';
export { checkFormula, type CheckResult, type Typed } from './check';
export { evaluateFormula, evaluateTree, type ReadName } from './evaluate';
export { FUNCTIONS, isFunctionName, type FunctionName } from './functions';
export { nameTex } from './name-tex';
export type { Failure, Outcome } from './outcome';
export { parseFormula } from './parse';
export { isFormulaName, MAX_LENGTH } from './scan';
export { formulaTex, formulaTexWithValues } from './tex';
