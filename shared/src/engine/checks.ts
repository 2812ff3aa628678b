import type { CheckSpec } from './model';

/** Values this close to a limit, relative to it, count as at the limit: margin 0, on the good side. */
export const LIMIT_TOLERANCE = 1e-9;

/** Standing of a check: on the good side, on the bad side, or without a value. */
const GOOD = 1;
const BAD = 0;
const NO_VALUE = -1;

/** Threshold checks in arrays sorted by node, so that a changed node finds its own side by side. */
export class CheckTable {
  readonly ids: readonly string[];
  /** First check of each node; one more entry than nodes. */
  readonly starts: Int32Array;
  readonly margins: Float64Array;
  private readonly nodes: Int32Array;
  private readonly limits: Float64Array;
  private readonly bands: Float64Array;
  private readonly senses: Float64Array;
  private readonly standings: Int8Array;
  private readonly turnedChecks: number[] = [];
  private readonly placeOf: ReadonlyMap<string, number>;

  constructor(specs: readonly CheckSpec[], rankOf: ReadonlyMap<string, number>, nodes: number) {
    const ranked = specs.map((spec) => ({ spec, rank: rankOf.get(spec.node) ?? -1 })).sort((a, b) => a.rank - b.rank);
    this.ids = ranked.map(({ spec }) => spec.id);
    this.starts = new Int32Array(nodes + 1);
    for (const { rank } of ranked) this.starts[rank + 1] = (this.starts[rank + 1] as number) + 1;
    for (let i = 0; i < nodes; i++) this.starts[i + 1] = (this.starts[i + 1] as number) + (this.starts[i] as number);
    this.nodes = Int32Array.from(ranked, ({ rank }) => rank);
    this.limits = Float64Array.from(ranked, ({ spec }) => spec.limit);
    this.bands = this.limits.map((limit) => Math.abs(limit) * LIMIT_TOLERANCE);
    this.senses = Float64Array.from(ranked, ({ spec }) => (spec.relation === 'at-least' ? 1 : -1));
    this.margins = new Float64Array(ranked.length).fill(NaN);
    this.standings = new Int8Array(ranked.length).fill(NO_VALUE);
    this.placeOf = new Map(this.ids.map((id, i) => [id, i]));
  }

  /** Recomputes the margins of a node's checks, noting those that turn. */
  update(rank: number, value: number): void {
    const { limits, bands, senses, margins, standings } = this;
    const end = this.starts[rank + 1] as number;
    for (let i = this.starts[rank] as number; i < end; i++) {
      const above = value - (limits[i] as number);
      // Adding 0 turns -0 into 0.
      const margin = Math.abs(above) <= (bands[i] as number) ? 0 : above * (senses[i] as number) + 0;
      margins[i] = margin;
      const standing = margin >= 0 ? GOOD : margin < 0 ? BAD : NO_VALUE;
      if (standing !== standings[i]) {
        standings[i] = standing;
        this.turnedChecks.push(i);
      }
    }
  }

  /** Position of a check by its id. */
  place(id: string): number | undefined {
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
    return this.turnedChecks.slice(mark).map((i) => this.ids[i] as string);
  }

  /** Forgets turns noted since `mark`. */
  forgetSince(mark: number): void {
    this.turnedChecks.length = mark;
  }
}
