import * as fc from 'fast-check';
import {
  DIMENSIONLESS,
  dimensionOf,
  dimensionOfKey,
  divideDimensions,
  multiplyDimensions,
  powerDimension,
  type Dimension,
} from './dimension';
import { describeDimension, describeWithArticle, namedDimensions, siUnitOf, unitSymbolsOf } from './dimension-names';
import { rational, rationalOf } from './rational';
import { parseUnit, unitOf } from './unit';

const exponent = fc.record({ n: fc.integer({ min: -6, max: 6 }), d: fc.integer({ min: 1, max: 4 }) });
const dimension: fc.Arbitrary<Dimension> = fc
  .tuple(exponent, exponent, exponent, exponent, exponent)
  .map(([m, kg, s, A, K]) => dimensionOf({ m: m.n / m.d, kg: kg.n / kg.d, s: s.n / s.d, A: A.n / A.d, K: K.n / K.d }));

describe('dimensions', () => {
  it('are one object each, so that === compares them', () => {
    const speed = dimensionOf({ m: 1, s: -1 });
    expect(divideDimensions(dimensionOf({ m: 1 }), dimensionOf({ s: 1 }))).toBe(speed);
    expect(multiplyDimensions(speed, dimensionOf({ s: 1, m: -1 }))).toBe(DIMENSIONLESS);
    expect(powerDimension(dimensionOf({ m: 2, s: -2 }), rational(1, 2))).toBe(speed);
    expect(powerDimension(speed, rational(0))).toBe(DIMENSIONLESS);
  });

  it('obey the laws of exponents and come back from their keys', () => {
    fc.assert(
      fc.property(dimension, dimension, exponent, (a, b, r) => {
        expect(divideDimensions(multiplyDimensions(a, b), b)).toBe(a);
        expect(multiplyDimensions(a, b)).toBe(multiplyDimensions(b, a));
        const power = rational(r.n, r.d);
        expect(powerDimension(multiplyDimensions(a, b), power)).toBe(
          multiplyDimensions(powerDimension(a, power), powerDimension(b, power)),
        );
        expect(dimensionOfKey(a.key)).toBe(a);
      }),
    );
  });

  it('have an SI unit text that reads back as the same dimension with factor 1', () => {
    fc.assert(
      fc.property(dimension, (a) => {
        const unit = unitOf(siUnitOf(a));
        expect(unit.dimension).toBe(a);
        expect(unit.factor).toBe(1);
      }),
    );
  });

  it.each([
    ['kg', 'mass'],
    ['N', 'force'],
    ['m/s', 'speed'],
    ['m/s^2', 'acceleration'],
    ['W/kg', 'specific power'],
    ['kg/kW', 'specific mass'],
    ['kg/s', 'mass flow'],
    ['W/m^2', 'heat flux'],
    ['g/m^2', 'areal mass'],
    ['Pa', 'pressure'],
    ['°C', 'temperature'],
    ['1/s', 'frequency'],
    ['N s', 'momentum'],
    ['deg', 'a plain number'],
    ['kg m^2/s^5', 'kg·m²/s⁵'],
    ['m^(1/2)', 'm^(1/2)'],
  ])('say in words what %s measures', (unit, words) => {
    expect(describeDimension(unitOf(unit).dimension)).toBe(words);
  });

  it('take an article in a sentence', () => {
    expect(describeWithArticle(unitOf('m/s').dimension)).toBe('a speed');
    expect(describeWithArticle(unitOf('J').dimension)).toBe('an energy');
    expect(describeWithArticle(DIMENSIONLESS)).toBe('a plain number');
    expect(describeWithArticle(unitOf('kg m^2/s^5').dimension)).toBe('a value in kg·m²/s⁵');
  });

  it('offer only units of their own, the SI unit first', () => {
    for (const one of namedDimensions()) {
      const symbols = unitSymbolsOf(one);
      expect(symbols[0]).toBe(siUnitOf(one));
      expect(unitOf(siUnitOf(one)).factor).toBe(1);
      for (const symbol of symbols) {
        const unit = parseUnit(symbol);
        expect([symbol, unit.ok && unit.unit.dimension === one]).toEqual([symbol, true]);
      }
    }
  });

  it('refuse exponents that are no small fraction, and keys that are no dimension', () => {
    expect(() => dimensionOf({ m: Math.PI })).toThrow(RangeError);
    expect(() => rational(1, 0)).toThrow(RangeError);
    expect(rationalOf(0.1 + 0.2)).toEqual({ n: 3, d: 10 });
    for (const key of ['', '1,2', '1,0,0,0,0,0,x', '1/0,0,0,0,0,0,0']) expect(dimensionOfKey(key)).toBeUndefined();
  });
});
