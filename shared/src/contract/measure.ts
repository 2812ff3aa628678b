import * as z from 'zod';

/** A number as a person typed it, digits and unit kept verbatim; the server works out the SI value. */
export const MeasureInput = z.strictObject({ text: z.string().trim().min(1).max(60), unit: z.string().trim().max(40) });
export type MeasureInput = z.infer<typeof MeasureInput>;

/** What was typed, with its value in SI units. */
export interface Measure {
  readonly text: string;
  readonly unit: string;
  readonly si: number;
}

/** Uncertainty of an input: a half-width typed with a unit, read through the distribution. */
export const DISTRIBUTIONS = ['normal', 'rectangular', 'triangular'] as const;
export const UncertaintyInput = z.strictObject({
  distribution: z.enum(DISTRIBUTIONS),
  halfWidth: MeasureInput,
  /** Coverage factor of the half-width; only a normal distribution uses it. */
  k: z.number().positive().max(10).default(2),
});
export type UncertaintyInput = z.infer<typeof UncertaintyInput>;
export interface Uncertainty {
  readonly distribution: (typeof DISTRIBUTIONS)[number];
  readonly halfWidth: Measure;
  readonly k: number;
}

export const RELATIONS = ['at least', 'at most', 'between', 'equal within'] as const;
export type Relation = (typeof RELATIONS)[number];

/** The measurable criterion of a requirement as typed. `upper` belongs to "between", `tolerance` to "equal within". */
export const LimitInput = z.strictObject({
  relation: z.enum(RELATIONS),
  value: MeasureInput,
  upper: MeasureInput.optional(),
  tolerance: MeasureInput.optional(),
  /** A limit on a temperature difference is not a limit on a temperature. */
  temperature: z.enum(['absolute', 'difference']).default('absolute'),
  condition: z.string().trim().max(300).default(''),
});
export type LimitInput = z.infer<typeof LimitInput>;
export interface Limit {
  readonly relation: Relation;
  readonly value: Measure;
  readonly upper: Measure | null;
  readonly tolerance: Measure | null;
  readonly temperature: 'absolute' | 'difference';
  readonly condition: string;
}
