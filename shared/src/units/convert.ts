import type { Unit } from './unit';

/** Whether a temperature is a reading on a scale or the difference of two; other dimensions do not need to say. */
export type TemperatureKind = 'absolute' | 'difference';

function offsetOf(unit: Unit, temperature: TemperatureKind): number {
  return temperature === 'absolute' ? unit.offset : 0;
}

/** Value in SI. The scale's offset is applied only to an absolute temperature in a bare temperature unit. */
export function toSi(value: number, unit: Unit, temperature: TemperatureKind = 'absolute'): number {
  const { numerator, denominator } = unit;
  const scaled = denominator === 1 ? value * numerator : (value * numerator) / denominator;
  // The product may overflow on the way to a result that fits; the rounded factor then serves.
  return (Number.isFinite(scaled) ? scaled : value * unit.factor) + offsetOf(unit, temperature);
}

/** Value in the unit of an SI value; the inverse of toSi within a few units in the last place. */
export function fromSi(si: number, unit: Unit, temperature: TemperatureKind = 'absolute'): number {
  const { numerator, denominator } = unit;
  const shifted = si - offsetOf(unit, temperature);
  const scaled = (shifted * denominator) / numerator;
  return Number.isFinite(scaled) ? scaled : shifted / unit.factor;
}
