export { addRationals, multiplyRationals, rational, rationalOf, rationalText, type Rational } from './rational';
export {
  BASE_UNITS,
  DIMENSIONLESS,
  dimensionOf,
  dimensionOfKey,
  divideDimensions,
  multiplyDimensions,
  powerDimension,
  type BaseUnit,
  type Dimension,
} from './dimension';
export { describeDimension, describeWithArticle, siUnitOf, unitSymbolsOf } from './dimension-names';
export { parseUnit, unitOf, type Unit, type UnitResult } from './unit';
export { fromSi, toSi, type TemperatureKind } from './convert';
export {
  makeMeasure,
  parseMeasure,
  type ExpectedMeasure,
  type Measure,
  type MeasureProblem,
  type MeasureResult,
} from './measure';
export { formatNumber, formatSi, plainNumber, type FormatOptions } from './format';
export { prettyUnit } from './pretty-unit';
export { engineeringUnit, preferredUnit } from './preferences';
