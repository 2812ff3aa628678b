import { fromSi } from './convert';
import type { Dimension } from './dimension';
import { namedDimension, siUnitOf } from './dimension-names';
import { parseUnit, unitOf } from './unit';

/**
 * The unit to show a dimension in: the preference under the dimension's key where it is a unit of that dimension, else
 * the usual unit of the trade (common practice, no source), else SI.
 */
export function preferredUnit(dimension: Dimension, preferences: Readonly<Record<string, string>>): string {
  const wished = Object.hasOwn(preferences, dimension.key) ? preferences[dimension.key] : undefined;
  if (wished !== undefined) {
    const unit = parseUnit(wished);
    if (unit.ok && unit.unit.dimension === dimension) return wished;
  }
  return namedDimension(dimension)?.usual ?? siUnitOf(dimension);
}

/** The unit that keeps an SI value readable: the largest of the trade's steps in which it is at least 1, else the smallest. */
export function engineeringUnit(si: number, dimension: Dimension): string {
  const entry = namedDimension(dimension);
  if (!entry) return siUnitOf(dimension);
  if (!Number.isFinite(si) || si === 0) return entry.usual;
  const [smallest = entry.si] = entry.ladder;
  // A value that rounds to 1 of the next step is shown in it, so 999.9999999999999 m becomes 1 km.
  return entry.ladder.findLast((symbol) => Math.abs(fromSi(si, unitOf(symbol), 'difference')) >= 1 - 1e-12) ?? smallest;
}
