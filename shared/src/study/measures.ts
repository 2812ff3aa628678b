import type { Limit, LimitInput, Measure, MeasureInput, Uncertainty, UncertaintyInput } from '@shared/contract';
import { type Dimension, describeDimension, makeMeasure, parseUnit, siUnitOf } from '@shared/units';
import { invalid } from './refusal';

type Temperature = 'absolute' | 'difference';

/** Dimension of a unit as typed; refuses an unknown unit and names the nearest known one. */
export function unitDimension(field: string, unit: string): Dimension {
  const parsed = parseUnit(unit);
  if (!parsed.ok) {
    throw invalid(
      field,
      unit,
      parsed.suggestion ? `${parsed.message} Did you mean ${parsed.suggestion}?` : parsed.message,
    );
  }
  return parsed.unit.dimension;
}

/** Reads a typed number with its unit into SI; refuses an unknown unit, a wrong dimension, and what is not a number. */
export function readMeasure(
  field: string,
  input: MeasureInput,
  dimension: Dimension | null,
  temperature: Temperature = 'absolute',
): Measure {
  const result = makeMeasure(input.text, input.unit, temperature);
  if (!result.ok) throw invalid(field, `${input.text} ${input.unit}`.trim(), result.message);
  const actual = unitDimension(field, input.unit);
  if (dimension && actual !== dimension) {
    throw invalid(
      field,
      `${input.text} ${input.unit}`.trim(),
      `that is ${a(describeDimension(actual))}; ${a(describeDimension(dimension))} is needed here, for example in ${siUnitOf(dimension) || 'plain numbers'}.`,
    );
  }
  return result.measure;
}

/** "mass" → "a mass", "energy" → "an energy"; what already has an article or is a unit stays. */
export function a(noun: string): string {
  if (/^(a|an) /.test(noun) || !/^[a-z]/i.test(noun) || /[·/^²³⁴]/.test(noun)) return noun;
  return /^[aeiou]/i.test(noun) ? `an ${noun}` : `a ${noun}`;
}

/** Reads an uncertainty; its half-width is a difference of the quantity's dimension and above zero. */
export function readUncertainty(
  field: string,
  input: UncertaintyInput | null | undefined,
  dimension: Dimension,
): Uncertainty | null {
  if (!input) return null;
  const halfWidth = readMeasure(`${field}.halfWidth`, input.halfWidth, dimension, 'difference');
  if (!(halfWidth.si > 0))
    throw invalid(`${field}.halfWidth`, input.halfWidth.text, 'a half-width above zero is needed.');
  return { distribution: input.distribution, halfWidth, k: input.k };
}

/** Standard uncertainty in SI: half-width over k, √3 or √6 by distribution (JCGM 100:2008, 4.3). */
export function standardUncertainty(uncertainty: Uncertainty | null): number {
  if (!uncertainty) return 0;
  switch (uncertainty.distribution) {
    case 'normal':
      return uncertainty.halfWidth.si / uncertainty.k;
    case 'rectangular':
      return uncertainty.halfWidth.si / Math.sqrt(3);
    case 'triangular':
      return uncertainty.halfWidth.si / Math.sqrt(6);
  }
}

/** Reads a limit: every value in one dimension, the upper end above the lower, the tolerance above zero. */
export function readLimit(field: string, input: LimitInput | null | undefined): Limit | null {
  if (!input) return null;
  const dimension = unitDimension(`${field}.value`, input.value.unit);
  const value = readMeasure(`${field}.value`, input.value, dimension, input.temperature);
  let upper: Measure | null = null;
  let tolerance: Measure | null = null;
  if (input.relation === 'between') {
    if (!input.upper) throw invalid(`${field}.upper`, '', 'a limit "between" needs its upper end as well.');
    upper = readMeasure(`${field}.upper`, input.upper, dimension, input.temperature);
    if (!(upper.si > value.si))
      throw invalid(
        `${field}.upper`,
        `${input.upper.text} ${input.upper.unit}`,
        'the upper end must lie above the lower end.',
      );
  }
  if (input.relation === 'equal within') {
    if (!input.tolerance)
      throw invalid(`${field}.tolerance`, '', 'a limit "equal within" needs its tolerance as well.');
  }
  // On a one-sided limit a tolerance is a note on the measurement: it is kept and never loosens the limit.
  if (input.tolerance) {
    tolerance = readMeasure(`${field}.tolerance`, input.tolerance, dimension, 'difference');
    if (!(tolerance.si > 0))
      throw invalid(`${field}.tolerance`, input.tolerance.text, 'a tolerance above zero is needed.');
  }
  return {
    relation: input.relation,
    value,
    upper,
    tolerance,
    temperature: input.temperature,
    condition: input.condition,
  };
}
