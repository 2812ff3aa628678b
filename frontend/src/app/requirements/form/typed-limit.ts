import {
  DIMENSIONLESS,
  type Dimension,
  type MeasureResult,
  type TemperatureKind,
  describeWithArticle,
  parseMeasure,
  parseUnit,
} from '@shared/units';

/** Reads "38 km/s" where any dimension is right: the unit itself says which. A bare number is dimensionless. Errors: those of parseMeasure. */
export function readAny(typed: string, temperature: TemperatureKind = 'absolute'): MeasureResult {
  return parseMeasure(typed, { dimension: dimensionTyped(typed) ?? DIMENSIONLESS, temperature });
}

/** Dimension of the unit at the end of what was typed; null when there is none that is known. */
export function dimensionTyped(typed: string): Dimension | null {
  for (const start of typed.matchAll(/[\p{L}°%‰]/gu)) {
    const unit = parseUnit(typed.slice(start.index).trim());
    if (unit.ok) return unit.unit.dimension;
  }
  return null;
}

/** How a typed number was understood, beside the field: "Read as a speed". Empty while it cannot be read. */
export function understood(typed: string): string {
  if (!readAny(typed).ok) return '';
  const dimension = dimensionTyped(typed);
  return dimension === null ? 'Read as a plain number, without unit.' : `Read as ${describeWithArticle(dimension)}.`;
}

/** True when what was typed is a temperature, so that it must be said whether it is one or a difference of two. */
export function isTypedTemperature(typed: string): boolean {
  const kelvin = parseUnit('K');
  return kelvin.ok && dimensionTyped(typed) === kelvin.unit.dimension;
}
