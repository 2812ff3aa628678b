import { dimensionOf, DIMENSIONLESS } from './dimension';
import { formatNumber, formatSi, plainNumber } from './format';
import { engineeringUnit, preferredUnit } from './preferences';
import { unitOf } from './unit';

describe('formatNumber', () => {
  it.each([
    [39.08, undefined, '39.1'],
    [39.08, 5, '39.08'],
    [0.88, undefined, '0.88'],
    [6500, undefined, '6\u2009500'],
    [6543, undefined, '6\u2009543'],
    [123_456.789, undefined, '123\u2009457'],
    [2e14, undefined, '2.0 · 10¹⁴'],
    [1_234_567, undefined, '1.23 · 10⁶'],
    [999_999.7, undefined, '1.0 · 10⁶'],
    [-4.2, undefined, '\u22124.2'],
    [-1.5e-9, undefined, '\u22121.5 · 10⁻⁹'],
    [0.001, undefined, '0.001'],
    [0.00012, undefined, '1.2 · 10⁻⁴'],
    [9.999, undefined, '10'],
    [99.95, undefined, '100'],
    [0.09999, undefined, '0.1'],
    [0, undefined, '0'],
    [-0, undefined, '0'],
    [2e14, 1, '2 · 10¹⁴'],
    [NaN, undefined, 'not computable'],
    [Infinity, undefined, 'not computable'],
  ])('writes %d (digits %s) as %s', (x, digits, text) => {
    expect(formatNumber(x, digits)).toBe(text);
  });
});

describe('formatSi', () => {
  it('writes value and unit', () => {
    expect(formatSi(39_080, 'km/s')).toBe('39.1 km/s');
    expect(formatSi(39_080, 'km/s', { digits: 4 })).toBe('39.08 km/s');
    expect(formatSi(39_080, 'km/s', { withUnit: false })).toBe('39.1');
    expect(formatSi(0.05, '%')).toBe('5 %');
    expect(formatSi(0.88, '1')).toBe('0.88');
    expect(formatSi(5.67e-8, 'W/(m^2 K^4)')).toBe('5.67 · 10⁻⁸ W/(m² K⁴)');
  });

  it('keeps absolute temperatures and differences apart', () => {
    expect(formatSi(293.15, '°C')).toBe('20 °C');
    expect(formatSi(20, '°C', { temperature: 'difference' })).toBe('20 °C');
    expect(formatSi(812, 'K')).toBe('812 K');
  });
});

describe('plainNumber', () => {
  it.each([
    [39.08, '39.08'],
    [-4.2, '-4.2'],
    [0.1 + 0.2, '0.3'],
    [2e25, '2e25'],
    [1e-9, '1e-9'],
    [-0, '0'],
    [NaN, ''],
  ])('writes %d as %s', (x, text) => {
    expect(plainNumber(x)).toBe(text);
  });
});

describe('units to show', () => {
  const speed = dimensionOf({ m: 1, s: -1 });
  const power = unitOf('W').dimension;

  it('follow the preference where it fits, else the trade, else SI', () => {
    expect(preferredUnit(speed, {})).toBe('km/s');
    expect(preferredUnit(speed, { [speed.key]: 'c' })).toBe('c');
    expect(preferredUnit(speed, { [speed.key]: 'kg' })).toBe('km/s');
    expect(preferredUnit(speed, { [speed.key]: 'nonsense' })).toBe('km/s');
    expect(preferredUnit(power, {})).toBe('MW');
    expect(preferredUnit(unitOf('yr').dimension, {})).toBe('yr');
    expect(preferredUnit(DIMENSIONLESS, {})).toBe('1');
    expect(preferredUnit(dimensionOf({ m: 7 }), {})).toBe('m^7');
  });

  it.each([
    [3.02e6, 'W', 'MW'],
    [-3.02e6, 'W', 'MW'],
    [999, 'W', 'W'],
    [1e-9, 'W', 'mW'],
    [1000, 'm', 'km'],
    [5e-7, 'm', 'nm'],
    [120_000, 'kg', 't'],
    [0, 'm/s', 'km/s'],
    [4, 'm^7', 'm^7'],
  ])('keep %d %s readable in %s', (si, unit, chosen) => {
    expect(engineeringUnit(si, unitOf(unit).dimension)).toBe(chosen);
  });
});
