import type { CheckTable } from './checks';
import { centralDifferences } from './derivative';
import type { Changes, Model, Outcome, TurningPointOptions } from './model';
import { Kind, type Program, type Propagation } from './propagation';
import { nearestRoot } from './turning-point';

/** The model as others see it: ids outside, ranks inside. */
export class TapeModel implements Model {
  private depth = 0;
  private lastTurned: readonly string[] = [];

  constructor(
    private readonly program: Program,
    private readonly rankOf: ReadonlyMap<string, number>,
    private readonly propagation: Propagation,
    private readonly checks: CheckTable,
  ) {}

  has(id: string): boolean {
    return this.rankOf.has(id);
  }

  outcome(id: string): Outcome {
    return this.outcomeAt(this.rank(id));
  }

  margin(checkId: string): Outcome {
    const place = this.checks.place(checkId);
    if (place === undefined) throw new Error(`The model has no check ${checkId}`);
    const outcome = this.outcomeAt(this.checks.nodeOf(place));
    return outcome.ok ? { ok: true, value: this.checks.margin(place, outcome.value) } : outcome;
  }

  set(changes: Changes): readonly string[] {
    this.refuseInsideWhatIf();
    const ranks = this.inputRanks(changes);
    const mark = this.propagation.mark();
    this.apply(changes, ranks);
    const changed = this.propagation.changedSince(mark);
    this.lastTurned = this.checks.turnedSince(mark.turns);
    this.checks.forgetSince(mark.turns);
    this.propagation.keep(mark);
    return changed;
  }

  whatIf<T>(changes: Changes, read: (changed: readonly string[], turned: readonly string[]) => T): T {
    const ranks = this.inputRanks(changes);
    const mark = this.propagation.mark();
    this.depth += 1;
    try {
      this.apply(changes, ranks);
      return read(this.propagation.changedSince(mark), this.checks.turnedSince(mark.turns));
    } finally {
      this.propagation.rollBack(mark);
      this.depth -= 1;
    }
  }

  turned(): readonly string[] {
    return this.lastTurned;
  }

  recompute(): void {
    this.refuseInsideWhatIf();
    this.propagation.recompute();
    this.checks.forgetSince(0);
  }

  inputsOf(id: string): readonly string[] {
    const { readStarts, reads, kinds, ids } = this.program;
    const upstream = this.reach([this.rank(id)], (rank) => {
      const head = this.headOf(rank);
      return reads.subarray(readStarts[head], readStarts[head + 1]);
    });
    const inputs = upstream.filter((rank) => kinds[rank] === Kind.Input).map((rank) => ids[rank] as string);
    return inputs.filter((input) => input !== id).sort();
  }

  dependantsOf(id: string): readonly string[] {
    const { dependantStarts, dependants, kinds, ids } = this.program;
    const start = this.rank(id);
    const downstream = this.reach([start], (rank) => {
      const next: number[] = [];
      for (let i = dependantStarts[rank] as number; i < (dependantStarts[rank + 1] as number); i++) {
        let reader = dependants[i] as number;
        next.push(reader);
        // A function depends as a whole: all its outputs follow.
        if (kinds[reader] === Kind.Function) while (kinds[reader + 1] === Kind.FurtherOutput) next.push(++reader);
      }
      return next;
    });
    const others = downstream.filter((rank) => rank !== start).sort((a, b) => a - b);
    return others.map((rank) => ids[rank] as string);
  }

  derivative(output: string, input: string): number | null {
    return this.slopes([output], input)[0] ?? null;
  }

  slopes(outputs: readonly string[], input: string): readonly (number | null)[] {
    const at = this.presentValue(input);
    if (at === null) return outputs.map(() => null);
    const ranks = outputs.map((output) => this.rank(output));
    return centralDifferences((x) => this.probeAll(input, x, ranks), at);
  }

  turningPoint(output: string, input: string, target: number, options: TurningPointOptions = {}): number | null {
    const at = this.presentValue(input);
    if (at === null) return null;
    const distance = (x: number): number => this.probe(input, x, output) - target;
    return nearestRoot(distance, at, { min: options.min, max: options.max, scale: Math.abs(target) });
  }

  values(ids: readonly string[]): Float64Array {
    return Float64Array.from(ids, (id) => this.propagation.values[this.rank(id)] as number);
  }

  private outcomeAt(rank: number): Outcome {
    const failure = this.propagation.failure(rank);
    return failure ? { ok: false, failure } : { ok: true, value: this.propagation.values[rank] as number };
  }

  private rank(id: string): number {
    const rank = this.rankOf.get(id);
    if (rank === undefined) throw new Error(`The model has no node ${id}`);
    return rank;
  }

  /** The ranks of the inputs to change, all known before the first is written. */
  private inputRanks(changes: Changes): number[] {
    const ranks: number[] = [];
    for (const id of changes.keys()) ranks.push(this.inputRank(id));
    return ranks;
  }

  private inputRank(id: string): number {
    const rank = this.rank(id);
    if (this.program.kinds[rank] !== Kind.Input) throw new Error(`${id} is computed and cannot be set`);
    return rank;
  }

  private apply(changes: Changes, ranks: readonly number[]): void {
    let i = 0;
    for (const value of changes.values()) this.propagation.write(ranks[i++] as number, value);
    this.propagation.propagate();
  }

  /** Several outputs for another value of one input, NaN for those that cannot be computed. The model is as before afterwards. */
  private probeAll(input: string, value: number, ranks: readonly number[]): Float64Array {
    const mark = this.propagation.mark();
    this.propagation.write(this.inputRank(input), value);
    this.propagation.propagate();
    const results = Float64Array.from(ranks, (rank) => this.propagation.values[rank] as number);
    this.propagation.rollBack(mark);
    return results;
  }

  /** The output for another value of one input; NaN when it cannot be computed. The model is as before afterwards. */
  private probe(input: string, value: number, output: string): number {
    const mark = this.propagation.mark();
    this.propagation.write(this.inputRank(input), value);
    this.propagation.propagate();
    const result = this.propagation.values[this.rank(output)] as number;
    this.propagation.rollBack(mark);
    return result;
  }

  private presentValue(input: string): number | null {
    const value = this.propagation.values[this.inputRank(input)] as number;
    return Number.isFinite(value) ? value : null;
  }

  private headOf(rank: number): number {
    let head = rank;
    while (this.program.kinds[head] === Kind.FurtherOutput) head -= 1;
    return head;
  }

  private reach(from: readonly number[], neighbours: (rank: number) => Iterable<number>): number[] {
    const seen = new Set(from);
    const queue = [...from];
    for (let i = 0; i < queue.length; i++) {
      for (const rank of neighbours(queue[i] as number)) {
        if (seen.has(rank)) continue;
        seen.add(rank);
        queue.push(rank);
      }
    }
    return queue;
  }

  private refuseInsideWhatIf(): void {
    if (this.depth > 0) throw new Error('The model cannot be changed while a what-if is being read');
  }
}
