import * as fc from 'fast-check';
import { dimensionOf, DIMENSIONLESS } from './dimension';
import { formatNumber, plainNumber } from './format';
import { makeMeasure, parseMeasure, type MeasureResult } from './measure';
import { unitOf } from './unit';

const SPEED = dimensionOf({ m: 1, s: -1 });
const MASS = dimensionOf({ kg: 1 });
const TIME = dimensionOf({ s: 1 });
const LENGTH = dimensionOf({ m: 1 });
const TEMPERATURE = dimensionOf({ K: 1 });

function measureOf(result: MeasureResult): { text: string; unit: string; si: number } {
  if (!result.ok) throw new Error(result.message);
  return result.measure;
}

describe('parseMeasure', () => {
  it.each([
    ['38 km/s', SPEED, '38', 'km/s', 38_000],
    ['38km/s', SPEED, '38', 'km/s', 38_000],
    ['0.12 c', SPEED, '0.12', 'c', 0.12 * 299_792_458],
    ['−4.2 m/s', SPEED, '−4.2', 'm/s', -4.2],
    ['+4.2 m/s', SPEED, '+4.2', 'm/s', 4.2],
    ['6 500 s', TIME, '6 500', 's', 6500],
    ['6\u2009500 s', TIME, '6\u2009500', 's', 6500],
    ['6\u202f500\u00a0s', TIME, '6\u202f500', 's', 6500],
    ['5 yr', TIME, '5', 'yr', 5 * 31_557_600],
    ['1.2e3 kg', MASS, '1.2e3', 'kg', 1200],
    ['1.2E+3kg', MASS, '1.2E+3', 'kg', 1200],
    ['1.2×10^3 kg', MASS, '1.2×10^3', 'kg', 1200],
    ['1.2 x 10^-3 kg', MASS, '1.2 x 10^-3', 'kg', 0.0012],
    ['1.2·10³ kg', MASS, '1.2·10³', 'kg', 1200],
    ['2.0 · 10⁻⁴ kg', MASS, '2.0 · 10⁻⁴', 'kg', 2e-4],
    ['10^-6 kg', MASS, '10^-6', 'kg', 1e-6],
    ['.5 m', LENGTH, '.5', 'm', 0.5],
    ['120.0 t', MASS, '120.0', 't', 120_000],
    ['5 1/m', dimensionOf({ m: -1 }), '5', '1/m', 5],
    ['12 %', DIMENSIONLESS, '12', '%', 0.12],
    ['0.88', DIMENSIONLESS, '0.88', '', 0.88],
    ['0 kg', MASS, '0', 'kg', 0],
    ['5 EJ', dimensionOf({ kg: 1, m: 2, s: -2 }), '5', 'EJ', 5e18],
    ['5 eV', dimensionOf({ kg: 1, m: 2, s: -2 }), '5', 'eV', 5 * 1.602_176_634e-19],
  ])('reads “%s”', (input, dimension, text, unit, si) => {
    const measure = measureOf(parseMeasure(input, { dimension }));
    expect({ text: measure.text, unit: measure.unit }).toEqual({ text, unit });
    expect(Math.abs(measure.si - si)).toBeLessThanOrEqual(1e-15 * Math.abs(si));
  });

  it.each([
    ['', SPEED, 'empty', 'a speed is needed here, for example 38 km/s'],
    ['abc', SPEED, 'not-a-number', 'does not start with a readable number'],
    ['Infinity m/s', SPEED, 'not-a-number', 'readable number'],
    ['5 5 kg', MASS, 'not-a-number', 'readable number'],
    ['12 34 m', LENGTH, 'not-a-number', 'readable number'],
    ['1 0000 m', LENGTH, 'not-a-number', 'readable number'],
    ['1.2.3 kg', MASS, 'not-a-number', 'readable number'],
    ['38,5 km/s', SPEED, 'not-a-number', 'Write a point for decimals, as in 38.5'],
    ['1,000,000 kg', MASS, 'not-a-number', 'as in 1 000 000'],
    ['1e400 kg', MASS, 'out-of-range', 'too large'],
    ['1e-400 kg', MASS, 'out-of-range', 'too close to zero'],
    ['4e-320 kg', MASS, 'out-of-range', 'too close to zero'],
    ['1e300 ly', LENGTH, 'out-of-range', '“1e300 ly” is too large'],
    ['1e-300 nm', LENGTH, 'out-of-range', '“1e-300 nm” is too close to zero'],
    ['9'.repeat(300), SPEED, 'not-a-number', '200 characters'],
    ['38', SPEED, 'no-unit', '“38” has no unit; a speed is needed here, for example 38 km/s.'],
    ['38 kg', SPEED, 'wrong-dimension', '“38 kg” is a mass; a speed is needed here, for example 38 km/s.'],
    [
      '38 km/s',
      DIMENSIONLESS,
      'wrong-dimension',
      '“38 km/s” is a speed; a plain number is needed here, for example 38.',
    ],
    ['20 C', TEMPERATURE, 'wrong-dimension', 'Did you mean 20 °C?'],
    ['120 T', MASS, 'wrong-dimension', 'Did you mean 120 t?'],
    ['38 Km/s', SPEED, 'unknown-unit', 'Did you mean km?'],
    ['3 dB', DIMENSIONLESS, 'unknown-unit', 'decibel'],
  ])('refuses “%s”', (input, dimension, code, message) => {
    const result = parseMeasure(input, { dimension });
    expect(result).toMatchObject({ ok: false, code });
    expect(result.ok ? '' : result.message).toContain(message);
  });

  it('reads a temperature by what the field expects', () => {
    expect(measureOf(parseMeasure('20 °C', { dimension: TEMPERATURE })).si).toBe(293.15);
    expect(measureOf(parseMeasure('20 °C', { dimension: TEMPERATURE, temperature: 'difference' })).si).toBe(20);
    expect(measureOf(parseMeasure('-273.15 degC', { dimension: TEMPERATURE })).si).toBe(0);
  });

  it('uses a default unit only when none is typed', () => {
    const expected = { dimension: SPEED, defaultUnit: 'km/s' };
    expect(measureOf(parseMeasure('38', expected))).toEqual({ text: '38', unit: 'km/s', si: 38_000 });
    expect(measureOf(parseMeasure('38 m/s', expected)).si).toBe(38);
    expect(measureOf(parseMeasure('30', { dimension: DIMENSIONLESS, defaultUnit: 'deg' })).si).toBeCloseTo(
      Math.PI / 6,
      15,
    );
  });

  it('keeps what was typed, so that reading it again gives the same value', () => {
    const unit = fc.constantFrom('km/s', 'c', 'm/s', 'km/h');
    fc.assert(
      fc.property(fc.double({ noNaN: true, min: -1e100, max: 1e100 }), unit, (x, symbol) => {
        fc.pre(x === 0 || Math.abs(x) > 1e-100);
        const typed = measureOf(parseMeasure(`${x} ${symbol}`, { dimension: SPEED }));
        expect(typed.text).toBe(String(x));
        const again = measureOf(makeMeasure(typed.text, typed.unit));
        expect(again).toEqual(typed);
      }),
    );
  });

  it('reads what formatNumber and plainNumber write', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, min: -1e100, max: 1e100 }), (x) => {
        fc.pre(x === 0 || Math.abs(x) > 1e-100);
        expect(Math.abs(measureOf(makeMeasure(formatNumber(x, 17), '')).si - x)).toBeLessThanOrEqual(
          4e-16 * Math.abs(x),
        );
        expect(measureOf(makeMeasure(plainNumber(x, 17), '')).si).toBe(x + 0);
      }),
    );
  });

  it('never throws, whatever is typed', () => {
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.stringMatching(/^[0-9eE .,·×x^⁰-⁹−+-]{0,12}[a-zA-Z/ ]{0,6}$/)), (input) => {
        const result = parseMeasure(input, { dimension: SPEED });
        expect(result.ok ? Number.isFinite(result.measure.si) : result.message.length > 0).toBe(true);
      }),
      { numRuns: 3000 },
    );
  });
});

describe('makeMeasure', () => {
  it('takes digits and unit apart', () => {
    expect(measureOf(makeMeasure(' 39.10 ', 'km/s'))).toEqual({ text: '39.10', unit: 'km/s', si: 39_100 });
    expect(measureOf(makeMeasure('20', '°C')).si).toBe(293.15);
    expect(measureOf(makeMeasure('20', '°C', 'difference')).si).toBe(20);
    expect(measureOf(makeMeasure('0.5', '')).si).toBe(0.5);
    expect(unitOf('').dimension).toBe(DIMENSIONLESS);
  });

  it.each([
    ['', 'kg', 'empty'],
    ['5 kg', 'kg', 'not-a-number'],
    ['5', 'kgs', 'unknown-unit'],
    ['1e999', 'kg', 'out-of-range'],
  ])('refuses “%s” with “%s”', (text, unit, code) => {
    expect(makeMeasure(text, unit)).toMatchObject({ ok: false, code });
  });
});
