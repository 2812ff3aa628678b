import * as fc from 'fast-check';
import { fromSi, toSi } from './convert';
import { dimensionOf, DIMENSIONLESS } from './dimension';
import { prettyUnit } from './pretty-unit';
import { parseUnit, unitOf } from './unit';
import { UNIT_TABLE } from './unit-table';

function refusal(text: string): { message: string; suggestion?: string } {
  const result = parseUnit(text);
  if (result.ok) throw new Error(`${text} was accepted.`);
  return result;
}

describe('parseUnit', () => {
  it.each([
    ['km/s', 1000],
    ['W/(m^2 K)', 1],
    ['W/m^2/K^4', 1],
    ['W m-2 K-4', 1],
    ['kg/kW', 0.001],
    ['kg/m3', 1],
    ['g/cm^3', 1000],
    ['cm^-3', 1e6],
    ['m²', 1],
    ['m s⁻²', 1],
    ['J/(kg·K)', 1],
    ['N*m', 1],
    ['1/m', 1],
    ['1/(m s)', 1],
    ['((km))^2', 1e6],
    ['mm^(1/2)', Math.sqrt(0.001)],
    ['km^0.5', Math.sqrt(1000)],
    ['µm', 1e-6],
    ['\u03bcm', 1e-6],
    ['kΩ', 1000],
    ['\u2126', 1],
    ['%', 0.01],
    ['%/day', 0.01 / 86_400],
    [' t ', 1000],
    ['mT', 0.001],
    ['', 1],
    ['1', 1],
  ])('reads “%s”', (text, factor) => {
    expect(unitOf(text).factor).toBeCloseTo(factor, 15);
  });

  it('keeps symbols apart that differ only in case', () => {
    expect(unitOf('t').dimension).toBe(dimensionOf({ kg: 1 }));
    expect(unitOf('T').dimension).toBe(dimensionOf({ kg: 1, s: -2, A: -1 }));
    expect(unitOf('mN').factor).toBe(1e-3);
    expect(unitOf('MN').factor).toBe(1e6);
    expect(unitOf('h').dimension).toBe(dimensionOf({ s: 1 }));
    expect(unitOf('H').dimension).not.toBe(unitOf('h').dimension);
  });

  it.each([
    ['KN', 'kN'],
    ['Km/s', 'km/s'],
    ['km/S', 'km/s'],
    ['pa', 'Pa'],
    ['Mpa', 'MPa'],
    ['mev', 'MeV'],
    ['kw/kg', 'kW/kg'],
    ['AU', 'au'],
    ['LY', 'ly'],
    ['KG', 'kg'],
    ['hz', 'Hz'],
    ['Nm', 'N m'],
    ['J/kgK', 'J/(kg K)'],
    ['metres/s', 'm/s'],
    ['years', 'yr'],
    ['kps', 'km/s'],
    ['kps/yr', '(km/s)/yr'],
    ['kg/kWe', 'kg/kW'],
    ['MWth', 'MW'],
    ['arcsecs', 'arcsec'],
    ['Tor', 'Torr'],
  ])('refuses “%s” and suggests “%s”', (text, suggestion) => {
    const refused = refusal(text);
    expect(refused.suggestion).toBe(suggestion);
    expect(parseUnit(suggestion).ok).toBe(true);
  });

  it.each([
    ['dB', /decibel is a ratio/],
    ['dBW', /decibel is a ratio/],
    ['kt', /TNT/],
    ['°F', /K or °C/],
    ['Ci', /Bq/],
    ['W/m^2 K', /two ways/],
    ['kg/s*m', /two ways/],
    ['m^1/2', /m\^\(1\/2\)/],
    ['5', /1 is the only number/],
    ['m/', /symbol is missing/],
    ['/s', /symbol is missing/],
    ['kg)', /parenthesis too many/],
    ['(kg', /closing parenthesis/],
    ['m^^2', /number of a power/],
    ['m^2^3', /two powers/],
    ['m^99', /fraction of at most/],
    ['(m^20)^20', /too large/],
    ['m^(1/0)', /unreadable power/],
    ['m;DROP', /“;” cannot stand/],
    ['qwertyuiop', /not a unit known here\.$/],
    ['m '.repeat(100), /120 characters/],
    ['('.repeat(50) + 'm' + ')'.repeat(50), /nested too deeply/],
    ['ly^24 ly^24', /too large or too small/],
    ['constructor', /not a unit known here/],
    ['__proto__', /cannot stand/],
  ])('refuses “%s”', (text, message) => {
    expect(refusal(text).message).toMatch(message);
  });

  it('never throws, whatever is typed', () => {
    fc.assert(
      fc.property(fc.oneof(fc.string(), fc.stringMatching(/^[a-zA-Z0-9/^*()·² %°µ-]{0,24}$/)), (text) => {
        const result = parseUnit(text);
        expect(result.ok || result.message.length > 0).toBe(true);
      }),
      { numRuns: 3000 },
    );
  });

  it('answers the same object for the same text', () => {
    expect(parseUnit('kN m/s')).toBe(parseUnit('kN m/s'));
  });
});

describe('conversion', () => {
  it('rounds once, so that decimals stay decimals', () => {
    expect(toSi(4.35, unitOf('mm'))).toBe(0.00435);
    expect(toSi(39.1, unitOf('km/s'))).toBe(39_100);
    expect(fromSi(39_100, unitOf('km/s'))).toBe(39.1);
    expect(toSi(0.7, unitOf('g/cm^3'))).toBe(700);
  });

  it('applies the Celsius offset only to an absolute temperature standing alone', () => {
    expect(toSi(20, unitOf('°C'))).toBe(293.15);
    expect(toSi(20, unitOf('°C'), 'difference')).toBe(20);
    expect(toSi(20, unitOf('W/°C'))).toBe(20);
    expect(unitOf('°C').display).toBe('temperature');
    expect(unitOf('deg').display).toBe('angle');
    expect(unitOf('deg').dimension).toBe(DIMENSIONLESS);
    expect(unitOf('deg/s').display).toBe('plain');
  });

  it('goes to SI and back within 4 units in the last place', () => {
    const symbol = fc.constantFrom(...[...UNIT_TABLE.keys()].filter((key) => unitOf(key).offset === 0));
    const value = fc.double({ min: -1e200, max: 1e200, noNaN: true }).filter((x) => x === 0 || Math.abs(x) > 1e-200);
    fc.assert(
      fc.property(symbol, symbol, value, (a, b, x) => {
        const unit = unitOf(`${a}/${b}`);
        const back = fromSi(toSi(x, unit), unit);
        expect(Math.abs(back - x)).toBeLessThanOrEqual(4 * Number.EPSILON * Math.abs(x));
      }),
    );
  });
});

describe('prettyUnit', () => {
  it.each([
    ['W/(m^2 K)', 'W/(m² K)'],
    ['kg/m3', 'kg/m³'],
    ['m2/kg2', 'm²/kg²'],
    ['cm^-3', 'cm⁻³'],
    ['N*m', 'N·m'],
    ['um', 'µm'],
    ['ug/s', 'µg/s'],
    ['u', 'u'],
    ['MeV/u', 'MeV/u'],
    ['degC', '°C'],
    ['kohm m', 'kΩ m'],
    ['g0', 'g₀'],
    ['g_0^2', 'g₀²'],
    ['m^(1/2)', 'm^(1/2)'],
    ['1', ''],
    ['', ''],
  ])('shows %s as %s', (unit, pretty) => {
    expect(prettyUnit(unit)).toBe(pretty);
  });

  it('shows a text that reads as the same unit', () => {
    for (const symbol of UNIT_TABLE.keys()) {
      expect([symbol, unitOf(prettyUnit(symbol)).factor]).toEqual([symbol, unitOf(symbol).factor]);
    }
  });
});
