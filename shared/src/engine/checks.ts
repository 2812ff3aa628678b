import type { CheckSpec } from './model';

/** Values this close to a limit, relative to it, count as at the limit: margin 0, on the good side. */
export const LIMIT_TOLERANCE = 1e-9;

/** Standing of a check: on the good side, on the bad side, or without a value. */
const GOOD = 1;
const BAD = 0;
const NO_VALUE = -1;

/**
 * Threshold checks in arrays sorted by node, so that a changed node finds its own side by side. While changes are
 * carried through only the standings are kept; margins follow from the values when asked for.
 */
export class CheckTable {
  readonly ids: readonly string[];
  /** First check of each node; one more entry than nodes. */
  private readonly starts: Int32Array;
  private readonly nodes: Int32Array;
  private readonly limits: Float64Array;
  /** 1 for at least, -1 for at most. */
  private readonly senses: Float64Array;
  /** A check holds where sense times value reaches this: the limit less its tolerance. */
  private readonly thresholds: Float64Array;
  private readonly standings: Int8Array;
  private readonly turnedChecks: number[] = [];
  private placeOf: ReadonlyMap<string, number> | undefined;

  constructor(specs: readonly CheckSpec[], rankOf: ReadonlyMap<string, number>, nodes: number) {
    const ranked = specs.map((spec) => ({ spec, rank: rankOf.get(spec.node) ?? -1 })).sort((a, b) => a.rank - b.rank);
    this.ids = ranked.map(({ spec }) => spec.id);
    this.starts = new Int32Array(nodes + 1);
    for (const { rank } of ranked) this.starts[rank + 1] = (this.starts[rank + 1] as number) + 1;
    for (let i = 0; i < nodes; i++) this.starts[i + 1] = (this.starts[i + 1] as number) + (this.starts[i] as number);
    this.nodes = Int32Array.from(ranked, ({ rank }) => rank);
    this.limits = Float64Array.from(ranked, ({ spec }) => spec.limit);
    this.senses = Float64Array.from(ranked, ({ spec }) => (spec.relation === 'at-least' ? 1 : -1));
    this.thresholds = this.limits.map((limit, i) => (this.senses[i] as number) * limit - tolerance(limit));
    this.standings = new Int8Array(ranked.length).fill(NO_VALUE);
  }

  /** Notes which of a node's checks turn with its new value; NaN stands for none. */
  update(rank: number, value: number): void {
    const { senses, thresholds, standings } = this;
    const end = this.starts[rank + 1] as number;
    for (let i = this.starts[rank] as number; i < end; i++) {
      const holds = value * (senses[i] as number) >= (thresholds[i] as number);
      const standing = holds ? GOOD : value === value ? BAD : NO_VALUE;
      if (standing !== standings[i]) {
        standings[i] = standing;
        this.turnedChecks.push(i);
      }
    }
  }

  /** Margin of a check at a value of its node: 0 within the tolerance of the limit, negative exactly where it fails. */
  margin(place: number, value: number): number {
    const [limit, sense] = [this.limits[place] as number, this.senses[place] as number];
    const holds = value * sense >= (this.thresholds[place] as number);
    const margin = (value - limit) * sense;
    // The comparison with 0 also turns -0 into 0.
    return holds && margin <= tolerance(limit) ? 0 : margin;
  }

  /** Position of a check by its id. The index is made when first asked for: most models are only asked for turns. */
  place(id: string): number | undefined {
    this.placeOf ??= new Map(this.ids.map((known, i) => [known, i]));
    return this.placeOf.get(id);
  }

  /** Rank of the node that a check is on. */
  nodeOf(place: number): number {
    return this.nodes[place] as number;
  }

  /** How many turns are noted so far. */
  get turns(): number {
    return this.turnedChecks.length;
  }

  /** Ids of the checks noted as turned since `mark`. */
  turnedSince(mark: number): string[] {
    if (this.turnedChecks.length === mark) return [];
    return this.turnedChecks.slice(mark).map((i) => this.ids[i] as string);
  }

  /** Forgets turns noted since `mark`. */
  forgetSince(mark: number): void {
    if (this.turnedChecks.length > mark) this.turnedChecks.length = mark;
  }
}

function tolerance(limit: number): number {
  return Math.abs(limit) * LIMIT_TOLERANCE;
}
