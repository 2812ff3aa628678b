/** A number in SI, or a number with the unit in which its source prints it. */
export type Given = number | readonly [value: number, unit: string];

/**
 * How far the expected value was seen: `published` in the source itself or a public copy, `published-memory` recalled and
 * recomputed, `computed` by two independent routes, `arithmetic` by one evaluation, `common-practice` by definition.
 */
export type Provenance = 'published' | 'published-memory' | 'computed' | 'arithmetic' | 'common-practice';

/** A reference value that a method of the library must reproduce. */
export interface Check {
  id: string;
  method: string;
  inputs: Readonly<Record<string, Given>>;
  output: string;
  expected: Given;
  /** Relative. */
  tolerance: number;
  provenance: Provenance;
  source: string;
}
