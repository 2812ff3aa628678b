import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { toSi } from './convert';
import { namedDimensions, siUnitOf, unitSymbolsOf } from './dimension-names';
import { unitOf } from './unit';
import { UNIT_TABLE } from './unit-table';

/**
 * Every factor of the curated table and of every picker choice against GNU Units (Debian package `units`, an independent
 * table). Tolerance: relative 4e-15, a few roundings of a double, except where TOLERANCE gives another with its reason.
 */
const PROGRAM = '/usr/bin/units';

/** Our symbols by their GNU names; its `year` is tropical and its `h` is the Planck constant. */
const GNU_NAME: Readonly<Record<string, string>> = {
  m: 'meter',
  au: 'astronomicalunit',
  ly: 'lightyear',
  pc: 'parsec',
  in: 'inch',
  ft: 'foot',
  L: 'liter',
  l: 'liter',
  barn: 'barn',
  g: 'gram',
  t: 'tonne',
  u: 'atomicmassunit',
  Da: 'dalton',
  lb: 'pound',
  s: 'second',
  min: 'minute',
  h: 'hour',
  d: 'day',
  day: 'day',
  yr: 'julianyear',
  Hz: 'hertz',
  Bq: 'becquerel',
  rpm: 'rpm',
  c: 'c',
  g0: 'gravity',
  g_0: 'gravity',
  'g₀': 'gravity',
  N: 'newton',
  lbf: 'lbf',
  Pa: 'pascal',
  bar: 'bar',
  atm: 'atm',
  Torr: 'torr',
  psi: 'psi',
  J: 'joule',
  eV: 'electronvolt',
  Wh: 'watt hour',
  W: 'watt',
  K: 'kelvin',
  '°C': 'degC',
  degC: 'degC',
  '℃': 'degC',
  A: 'ampere',
  C: 'coulomb',
  V: 'volt',
  ohm: 'ohm',
  '\u03a9': 'ohm',
  '\u2126': 'ohm',
  F: 'farad',
  H: 'henry',
  Wb: 'weber',
  T: 'tesla',
  mol: 'mole',
  cd: 'candela',
  Gy: 'gray',
  Sv: 'sievert',
  rad: 'radian',
  deg: 'degree',
  '°': 'degree',
  arcmin: 'arcmin',
  arcsec: 'arcsec',
  mas: 'milliarcsec',
  sr: 'steradian',
  '%': 'percent',
  ppm: 'ppm',
  ppb: 'ppb',
};

const GNU_PREFIX: Readonly<Record<string, string>> = {
  f: 'femto',
  p: 'pico',
  n: 'nano',
  u: 'micro',
  '\u00b5': 'micro',
  '\u03bc': 'micro',
  m: 'milli',
  c: 'centi',
  h: 'hecto',
  k: 'kilo',
  M: 'mega',
  G: 'giga',
  T: 'tera',
  P: 'peta',
  E: 'exa',
};

const USUAL_TOLERANCE = 4e-15;
const TOLERANCE: readonly { symbol: RegExp; relative: number; reason: string }[] = [
  {
    symbol: /^(u|Da)$/,
    relative: 2e-9,
    reason: 'GNU Units has CODATA 2018 (1.66053906660e-27), here CODATA 2022 (…892e-27)',
  },
  {
    symbol: /pc$/i,
    relative: 1e-11,
    reason: 'GNU Units has au/tan(1″), the IAU 2015 definition is au/(1″ in rad): (1″)²/3 = 8e-12',
  },
];

const toleranceOf = (symbol: string): number =>
  TOLERANCE.find((row) => row.symbol.test(symbol))?.relative ?? USUAL_TOLERANCE;

function gnuName(symbol: string): string {
  const direct = GNU_NAME[symbol];
  if (direct !== undefined) return direct;
  const prefix = GNU_PREFIX[symbol.charAt(0)];
  const base = GNU_NAME[symbol.slice(1)];
  if (prefix === undefined || base === undefined) throw new Error(`The table of GNU names lacks ${symbol}.`);
  return prefix + base;
}

/** Rewrites a unit text symbol by symbol; products, divisions and powers mean the same to GNU Units. */
const gnuText = (text: string): string => text.replace(/g0|[\p{L}°%]+/gu, (symbol) => `(${gnuName(symbol)})`);

/** One run of the program for all conversions: lines of "from", "to" in, one factor each out. */
function convertAll(pairs: readonly (readonly [from: string, to: string])[]): number[] {
  const input = pairs.map(([from, to]) => `${from}\n${to}\n`).join('');
  const output = execFileSync(PROGRAM, ['-q', '-s', '-1', '--compact', '-o', '%.17g'], {
    input,
    encoding: 'utf8',
    env: { LC_ALL: 'C.UTF-8' },
  });
  const lines = output.trim().split('\n');
  if (lines.length !== pairs.length)
    throw new Error(`GNU Units answered ${lines.length} lines to ${pairs.length} questions:\n${output}`);
  return lines.map((line, i) => {
    const factor = Number(line);
    if (Number.isNaN(factor)) throw new Error(`GNU Units on ${pairs[i]?.join(' → ')}: ${line}`);
    return factor;
  });
}

describe('units against GNU Units', () => {
  beforeAll(() => {
    if (!existsSync(PROGRAM))
      throw new Error(`${PROGRAM} is missing: install the Debian package "units" (apt-get install units).`);
  });

  it('agrees on every symbol of the table', () => {
    const symbols = [...UNIT_TABLE.keys()];
    expect(symbols.length).toBeGreaterThan(200);
    const factors = convertAll(symbols.map((symbol) => [gnuName(symbol), gnuText(siUnitOf(unitOf(symbol).dimension))]));
    symbols.forEach((symbol, i) => {
      const expected = factors[i] ?? NaN;
      const difference = Math.abs(unitOf(symbol).factor / expected - 1);
      expect({ symbol, close: difference <= toleranceOf(symbol), difference }).toEqual({
        symbol,
        close: true,
        difference,
      });
    });
  });

  it('agrees on every unit that a picker offers', () => {
    const choices = namedDimensions().flatMap((dimension) =>
      unitSymbolsOf(dimension).map((symbol) => ({ symbol, si: siUnitOf(dimension) })),
    );
    const factors = convertAll(choices.map(({ symbol, si }) => [gnuText(symbol), gnuText(si)]));
    choices.forEach(({ symbol }, i) => {
      const difference = Math.abs(unitOf(symbol).factor / (factors[i] ?? NaN) - 1);
      expect({ symbol, close: difference <= toleranceOf(symbol), difference }).toEqual({
        symbol,
        close: true,
        difference,
      });
    });
  });

  it.each([-273.15, -40, 0, 20, 812])('agrees on the Celsius scale at %d °C', (celsius) => {
    const [kelvin = NaN] = convertAll([[`tempC(${celsius})`, 'K']]);
    // The sum with 273.15 is rounded once: at most 1e-13 K here.
    expect(Math.abs(toSi(celsius, unitOf('°C')) - kelvin)).toBeLessThanOrEqual(1.2e-13);
  });

  it.each([
    ['kg/kW', USUAL_TOLERANCE],
    ['W/m^2/K^4', USUAL_TOLERANCE],
    ['kW h/kg', USUAL_TOLERANCE],
    ['mN/kW', USUAL_TOLERANCE],
    ['au/yr', USUAL_TOLERANCE],
    ['km^2/s^2', USUAL_TOLERANCE],
    ['t/yr', USUAL_TOLERANCE],
    ['g/cm^3', USUAL_TOLERANCE],
    ['cm^2/g', USUAL_TOLERANCE],
    ['W/(cm^2 K)', USUAL_TOLERANCE],
    ['kPa L/(mol K)', USUAL_TOLERANCE],
    ['lbf s/lb', USUAL_TOLERANCE],
    ['MeV/u', toleranceOf('u')],
  ])('agrees on %s, composed the way people type it', (text, relative) => {
    const [factor = NaN] = convertAll([[gnuText(text), gnuText(siUnitOf(unitOf(text).dimension))]]);
    expect(Math.abs(unitOf(text).factor / factor - 1)).toBeLessThanOrEqual(relative);
  });
});
