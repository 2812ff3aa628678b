export type { Failure, Outcome } from '@shared/formula';
export { buildModel } from './build';
export { LIMIT_TOLERANCE } from './checks';
export type {
  BuildResult,
  Changes,
  CheckSpec,
  ComputeFunction,
  FormulaSpec,
  FunctionSpec,
  InputSpec,
  Model,
  ModelSpec,
  TurningPointOptions,
} from './model';
