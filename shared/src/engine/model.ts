import type { Failure, Formula, Outcome } from '@shared/formula';

/** A library function over SI numbers; a refusal says why in words. */
export type ComputeFunction = (
  values: readonly number[],
) => { readonly ok: true; readonly values: readonly number[] } | { readonly ok: false; readonly message: string };

export interface InputSpec {
  readonly id: string;
  /** SI; null when there is no value. */
  readonly value: number | null;
  /** What failure messages call it; the id when absent. */
  readonly label?: string;
}
export interface FormulaSpec {
  readonly id: string;
  readonly formula: Formula;
  /** From each name of the formula to a node id. */
  readonly bind: ReadonlyMap<string, string>;
  readonly label?: string;
}
export interface FunctionSpec {
  readonly id: string;
  /** Node ids, in the order in which `compute` takes them. */
  readonly inputs: readonly string[];
  /** Node ids, in the order in which `compute` gives them. */
  readonly outputs: readonly string[];
  readonly label?: string;
  readonly compute: ComputeFunction;
}
export interface CheckSpec {
  readonly id: string;
  readonly node: string;
  readonly relation: 'at-least' | 'at-most';
  /** SI. */
  readonly limit: number;
}

/** Everything that is computed together. All ids of inputs, formulas and function outputs differ. */
export interface ModelSpec {
  readonly inputs: readonly InputSpec[];
  readonly formulas: readonly FormulaSpec[];
  readonly functions: readonly FunctionSpec[];
  readonly checks?: readonly CheckSpec[];
}

/**
 * A built model, or why there is none: a cycle (each id feeds the next and the last feeds the first), or an id or name
 * that nothing provides.
 */
export type BuildResult =
  | { readonly ok: true; readonly model: Model }
  | { readonly ok: false; readonly cycle: readonly string[] }
  | { readonly ok: false; readonly unknown: string; readonly in: string };

/** New values of inputs by id, in SI; null takes the value away. */
export type Changes = ReadonlyMap<string, number | null>;

export interface TurningPointOptions {
  /** Bounds of the search, SI. */
  readonly min?: number;
  readonly max?: number;
}

/** A computed study: reads are instant, edits recompute only what follows from them. */
export interface Model {
  /** The value of a node in SI, or why it has none; throws for an id the model does not know. */
  outcome(id: string): Outcome;
  has(id: string): boolean;
  /** The margin of a threshold check in SI, 0 within the relative tolerance of its limit; or why it has none. */
  margin(checkId: string): Outcome;
  /** Changes inputs and recomputes what follows; gives the ids whose outcome changed. */
  set(changes: Changes): readonly string[];
  /** As `set`, but everything is as before to the last bit when `read` has returned. `turned` lists checks that turned. */
  whatIf<T>(changes: Changes, read: (changed: readonly string[], turned: readonly string[]) => T): T;
  /** The checks that turned at the last `set`. */
  turned(): readonly string[];
  /** Computes everything again from the inputs, with the same result as the edits that led here. */
  recompute(): void;
  /** All input ids upstream of a node, sorted. */
  inputsOf(id: string): readonly string[];
  /** All node ids downstream of a node, each after the ones it follows from. */
  dependantsOf(id: string): readonly string[];
  /** Slope of an output over an input, SI per SI; null if it cannot be computed on both sides of the present value. */
  derivative(output: string, input: string): number | null;
  /** The derivatives of several outputs by one input in one sweep; each is the same to the bit as `derivative` gives. */
  slopes(outputs: readonly string[], input: string): readonly (number | null)[];
  /** The input value nearest to the present one at which the output reaches the target (SI); null when none is found. */
  turningPoint(output: string, input: string, target: number, options?: TurningPointOptions): number | null;
  /** Values in SI in the order of the ids; NaN stands for a failure. */
  values(ids: readonly string[]): Float64Array;
}

export type { Failure, Outcome };
