import { evaluateTree, type Failure } from '@shared/formula';
import type { CheckTable } from './checks';
import { DirtySet } from './dirty-set';
import type { ComputeFunction, FormulaSpec } from './model';
import { run } from './tape';

/** What a rank is: an input, a formula, the first output of a function (which computes all), or a further output. */
export const enum Kind {
  Input,
  Formula,
  Function,
  FurtherOutput,
}

/** A function with what failure messages call it. */
export interface FunctionNode {
  readonly id: string;
  readonly label: string;
  readonly outputs: number;
  readonly compute: ComputeFunction;
}

/** The compiled model. Ranks are topological: a node only reads nodes of lower rank. */
export interface Program {
  readonly ids: readonly string[];
  readonly kinds: Uint8Array;
  readonly code: Int32Array;
  /** First instruction of each rank; one more entry than nodes. */
  readonly codeStarts: Int32Array;
  /** Ranks that each rank reads, in reading order. */
  readonly readStarts: Int32Array;
  readonly reads: Int32Array;
  /** Ranks to be computed again after each rank changes. */
  readonly dependantStarts: Int32Array;
  readonly dependants: Int32Array;
  /** The formula of each rank that has one. */
  readonly formulas: readonly (FormulaSpec | undefined)[];
  readonly functions: ReadonlyMap<number, FunctionNode>;
  /** What failure messages call the input of each rank that is one. */
  readonly inputLabels: readonly (string | undefined)[];
}

/** How long the logs were at some moment. */
export interface Mark {
  readonly values: number;
  readonly failures: number;
  readonly turns: number;
}

/**
 * Holds the values and carries changes through the tape. NaN in the value array stands for a failure, whose reason is
 * kept beside it. Every overwritten value is logged, so that a change can be taken back to the last bit.
 */
export class Propagation {
  private readonly dirty: DirtySet;
  private readonly failures = new Map<number, Failure>();
  /** Overwritten values: rank and value before, `logged` of them. */
  private logRanks: Int32Array;
  private logValues: Float64Array;
  private logged = 0;
  private readonly failureLog: { readonly rank: number; readonly before: Failure | undefined }[] = [];

  constructor(
    private readonly program: Program,
    readonly values: Float64Array,
    private readonly checks: CheckTable,
  ) {
    this.dirty = new DirtySet(program.ids.length);
    this.logRanks = new Int32Array(program.ids.length);
    this.logValues = new Float64Array(program.ids.length);
  }

  /** Why a rank has no value; undefined when it has one. */
  failure(rank: number): Failure | undefined {
    return this.failures.get(rank);
  }

  /** Writes an input and marks what follows from it; null or no finite number: the input has no value. */
  write(rank: number, value: number | null): void {
    if (value !== null && Number.isFinite(value)) {
      this.store(rank, value, undefined);
      return;
    }
    const label = this.program.inputLabels[rank] ?? '';
    this.store(rank, NaN, { code: 'missing', message: `${label} has no value`, origin: this.program.ids[rank] ?? '' });
  }

  /** Recomputes everything marked, in the order of ranks. A visit only ever marks ranks above its own. */
  propagate(): void {
    const { words, summary } = this.dirty;
    for (let s = 0; s < summary.length; s++) {
      for (let marks = summary[s] as number; marks !== 0; marks = summary[s] as number) {
        const bit = marks & -marks;
        const word = (s << 5) + 31 - Math.clz32(bit);
        for (let bits = words[word] as number; bits !== 0; bits = words[word]) {
          const lowest = bits & -bits;
          words[word] = bits ^ lowest;
          this.visit((word << 5) + 31 - Math.clz32(lowest));
        }
        summary[s] = (summary[s] as number) & ~bit;
      }
    }
  }

  private visit(rank: number): void {
    const { values } = this;
    const { kinds, code, codeStarts } = this.program;
    if (kinds[rank] === Kind.Function) {
      this.runFunction(rank);
      return;
    }
    const before = values[rank] as number;
    run(code, values, codeStarts[rank] as number, codeStarts[rank + 1] as number);
    const after = values[rank] as number;
    if (after - after !== 0 || before !== before) {
      values[rank] = before;
      this.storeFormula(rank, after);
    } else if (!Object.is(after, before)) {
      this.changed(rank, before, after);
    }
  }

  /** Computes every formula and function from the inputs, leaving nothing in the log. */
  recompute(): void {
    const { kinds, code, codeStarts } = this.program;
    const { values } = this;
    const mark = this.logged;
    for (let rank = 0; rank < kinds.length; rank++) {
      if (kinds[rank] === Kind.Formula) {
        const before = values[rank] as number;
        run(code, values, codeStarts[rank] as number, codeStarts[rank + 1] as number);
        const after = values[rank] as number;
        if (after - after !== 0 || before !== before) {
          values[rank] = before;
          this.storeFormula(rank, after);
        }
      } else if (kinds[rank] === Kind.Function) this.runFunction(rank);
      this.checks.update(rank, values[rank] as number);
    }
    // Everything has been visited: what was marked on the way is done.
    this.dirty.clear();
    this.forget(mark, 0);
  }

  /** A place in the log to come back to. */
  mark(): Mark {
    return { values: this.logged, failures: this.failureLog.length, turns: this.checks.turns };
  }

  /** Ids that changed since the mark: the inputs written, then what follows from them in the order of ranks. */
  changedSince(mark: Mark): string[] {
    const { ids } = this.program;
    const changed: string[] = [];
    for (let i = mark.values; i < this.logged; i++) changed.push(ids[this.logRanks[i] as number] as string);
    return changed;
  }

  /** Keeps what changed since the mark and drops the log of it. */
  keep(mark: Mark): void {
    this.forget(mark.values, mark.failures);
  }

  /** Takes back what changed since the mark. */
  rollBack(mark: Mark): void {
    const { logRanks, logValues, values, checks } = this;
    for (let i = this.failureLog.length - 1; i >= mark.failures; i--) {
      const entry = this.failureLog[i];
      if (!entry) continue;
      if (entry.before) this.failures.set(entry.rank, entry.before);
      else this.failures.delete(entry.rank);
    }
    for (let i = this.logged - 1; i >= mark.values; i--) {
      const rank = logRanks[i] as number;
      values[rank] = logValues[i] as number;
      checks.update(rank, values[rank]);
    }
    checks.forgetSince(mark.turns);
    this.forget(mark.values, mark.failures);
  }

  private forget(values: number, failures: number): void {
    this.logged = values;
    if (this.failureLog.length > failures) this.failureLog.length = failures;
  }

  /** Notes a new value: log, what depends on it, its checks. */
  private changed(rank: number, before: number, after: number): void {
    const { dependantStarts, dependants } = this.program;
    if (this.logged === this.logRanks.length) this.growLog();
    this.logRanks[this.logged] = rank;
    this.logValues[this.logged] = before;
    this.logged += 1;
    this.values[rank] = after;
    const end = dependantStarts[rank + 1] as number;
    for (let i = dependantStarts[rank] as number; i < end; i++) this.dirty.add(dependants[i] as number);
    this.checks.update(rank, after);
  }

  /** One pass logs each rank at most once; what-ifs inside what-ifs need more room. */
  private growLog(): void {
    const ranks = new Int32Array(2 * this.logRanks.length + 16);
    const values = new Float64Array(ranks.length);
    ranks.set(this.logRanks);
    values.set(this.logValues);
    this.logRanks = ranks;
    this.logValues = values;
  }

  /** Stores a value or failure if it differs from what stands; a failure for another reason counts as different. */
  private store(rank: number, value: number, failure: Failure | undefined): void {
    const before = this.values[rank] as number;
    const known = this.failures.get(rank);
    if (Object.is(before, value) && sameFailure(known, failure)) return;
    if (known || failure) {
      this.failureLog.push({ rank, before: known });
      if (failure) this.failures.set(rank, failure);
      else this.failures.delete(rank);
    }
    this.changed(rank, before, value);
  }

  /** The slow way, for formulas that fail or failed: the tree says why. */
  private storeFormula(rank: number, computed: number): void {
    const formula = this.program.formulas[rank];
    if (!formula || Number.isFinite(computed)) {
      this.store(rank, computed, undefined);
      return;
    }
    const first = this.program.readStarts[rank] as number;
    const read = (name: string): number | Failure => {
      const source = this.program.reads[first + formula.formula.names.indexOf(name)] as number;
      return this.failures.get(source) ?? (this.values[source] as number);
    };
    const where = { origin: formula.id, label: formula.label ?? formula.id };
    const result = evaluateTree(formula.formula.root, read, where);
    if (typeof result === 'number') this.store(rank, result, undefined);
    else this.store(rank, NaN, result);
  }

  private runFunction(rank: number): void {
    const node = this.program.functions.get(rank);
    if (!node) return;
    const { readStarts, reads } = this.program;
    const inputs: number[] = [];
    let failure: Failure | undefined;
    for (let i = readStarts[rank] as number; i < (readStarts[rank + 1] as number) && !failure; i++) {
      const source = reads[i] as number;
      failure = this.failures.get(source);
      inputs.push(this.values[source] as number);
    }
    const computed = failure ? { values: [], failure } : compute(node, inputs);
    for (let k = 0; k < node.outputs; k++) this.store(rank + k, computed.values[k] ?? NaN, computed.failure);
  }
}

/** Runs a library function; whatever goes wrong in it becomes a failure that names it. */
function compute(node: FunctionNode, inputs: readonly number[]): { values: readonly number[]; failure?: Failure } {
  const failed = (code: Failure['code'], message: string): { values: []; failure: Failure } => ({
    values: [],
    failure: { code, message: `${message} in ${node.label}`, origin: node.id },
  });
  let result: ReturnType<ComputeFunction>;
  try {
    result = node.compute(inputs);
  } catch (error) {
    return failed('refused', error instanceof Error ? error.message : 'an error');
  }
  if (!result.ok) return failed('refused', result.message);
  const { values } = result;
  if (values.length !== node.outputs) return failed('refused', `${values.length} results instead of ${node.outputs}`);
  if (!values.every(Number.isFinite)) return failed('overflow', 'a result that is no finite number');
  return { values };
}

function sameFailure(a: Failure | undefined, b: Failure | undefined): boolean {
  if (a === b) return true;
  return a !== undefined && b !== undefined && a.code === b.code && a.message === b.message && a.origin === b.origin;
}
