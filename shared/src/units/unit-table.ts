import { dimensionOf, DIMENSIONLESS, type BaseUnit, type Dimension } from './dimension';

/**
 * One symbol of the curated table. Its size in SI is numerator/denominator, kept apart because both are exact doubles
 * for nearly every unit: 1/100 is exact as a pair where 0.01 is not.
 */
export interface UnitEntry {
  readonly symbol: string;
  readonly dimension: Dimension;
  readonly numerator: number;
  readonly denominator: number;
  /** Zero of the scale in SI, for a temperature scale that does not start at absolute zero. */
  readonly offset: number;
  readonly display: 'plain' | 'angle' | 'temperature';
}

const PREFIX: Readonly<Record<string, readonly [numerator: number, denominator: number]>> = {
  f: [1, 1e15],
  p: [1, 1e12],
  n: [1, 1e9],
  u: [1, 1e6],
  m: [1, 1e3],
  c: [1, 1e2],
  d: [1, 10],
  h: [1e2, 1],
  k: [1e3, 1],
  M: [1e6, 1],
  G: [1e9, 1],
  T: [1e12, 1],
  P: [1e15, 1],
  E: [1e18, 1],
};

/** Both code points of the Greek mu that keyboards give stand for the prefix u. */
const MICRO_SIGNS = ['\u00b5', '\u03bc'];

const table = new Map<string, UnitEntry>();

interface Definition {
  /** Prefixes that the trade uses with this unit, one letter each. */
  prefixes?: string;
  /** Other spellings of the same unit, taken with the same prefixes. */
  aliases?: readonly string[];
  denominator?: number;
  offset?: number;
  display?: UnitEntry['display'];
}

function define(symbol: string, base: Dimension, numerator: number, definition: Definition = {}): void {
  const { prefixes = '', aliases = [], denominator = 1, offset = 0, display = 'plain' } = definition;
  for (const name of [symbol, ...aliases]) {
    add(name, { symbol, dimension: base, numerator, denominator, offset, display });
    for (const letter of prefixes) {
      const [up, down] = PREFIX[letter] ?? [1, 1];
      const entry = {
        symbol: letter + symbol,
        dimension: base,
        numerator: numerator * up,
        denominator: denominator * down,
        offset,
        display,
      };
      add(letter + name, entry);
      if (letter === 'u') for (const micro of MICRO_SIGNS) add(micro + name, entry);
    }
  }
}

function add(name: string, entry: UnitEntry): void {
  if (table.has(name)) throw new Error(`The unit symbol ${name} is defined twice.`);
  table.set(name, Object.freeze(reduced(entry)));
}

/** Cancels powers of ten between the two parts where that stays exact (kg = 1000/1000 of the gram's 1/1000 → 1/1). */
function reduced(entry: UnitEntry): UnitEntry {
  const { numerator, denominator } = entry;
  if (denominator > 1 && Number.isSafeInteger(numerator) && numerator % denominator === 0) {
    return { ...entry, numerator: numerator / denominator, denominator: 1 };
  }
  return entry;
}

const dimension = (exponents: Partial<Record<BaseUnit, number>>): Dimension => dimensionOf(exponents);
const LENGTH = dimension({ m: 1 });
const MASS = dimension({ kg: 1 });
const TIME = dimension({ s: 1 });
const FORCE = dimension({ kg: 1, m: 1, s: -2 });
const PRESSURE = dimension({ kg: 1, m: -1, s: -2 });
const ENERGY = dimension({ kg: 1, m: 2, s: -2 });
const POWER = dimension({ kg: 1, m: 2, s: -3 });
const TEMPERATURE = dimension({ K: 1 });
const SPECIFIC_ENERGY = dimension({ m: 2, s: -2 });

// Numbers marked "exact" are so by definition. The atomic mass unit is CODATA 2022; it alone has an uncertainty.
define('m', LENGTH, 1, { prefixes: 'pnumckMG' });
define('au', LENGTH, 149_597_870_700); // exact, IAU 2012 B2
define('ly', LENGTH, 9_460_730_472_580_800); // exact: c × Julian year
define('pc', LENGTH, (648_000 / Math.PI) * 149_597_870_700, { prefixes: 'k' }); // IAU 2015 B2: 648 000/π au
define('in', LENGTH, 254, { denominator: 10_000 }); // exact, international inch
define('ft', LENGTH, 3048, { denominator: 10_000 }); // exact, international foot
define('L', dimension({ m: 3 }), 1, { prefixes: 'm', aliases: ['l'], denominator: 1000 });
define('barn', dimension({ m: 2 }), 1, { denominator: 1e28 });

define('g', MASS, 1, { prefixes: 'npumkM', denominator: 1000 });
define('t', MASS, 1000);
define('u', MASS, 1.660_539_068_92e-27, { aliases: ['Da'] }); // CODATA 2022
define('lb', MASS, 45_359_237, { denominator: 1e8 }); // exact, avoirdupois pound

define('s', TIME, 1, { prefixes: 'fpnum' });
define('min', TIME, 60);
define('h', TIME, 3600);
define('d', TIME, 86_400, { aliases: ['day'] });
define('yr', TIME, 31_557_600, { prefixes: 'kM' }); // Julian year, exact
define('Hz', dimension({ s: -1 }), 1, { prefixes: 'mkMGT' });
define('Bq', dimension({ s: -1 }), 1, { prefixes: 'kMGTP' });
define('rpm', dimension({ s: -1 }), Math.PI, { denominator: 30 }); // 2π/60 rad/s, the radian counting as 1

define('c', dimension({ m: 1, s: -1 }), 299_792_458); // speed of light, exact
define('g0', dimension({ m: 1, s: -2 }), 980_665, { denominator: 100_000, aliases: ['g_0', 'g₀'] }); // standard gravity, exact (CGPM 1901)

define('N', FORCE, 1, { prefixes: 'numkMG' });
define('lbf', FORCE, 4.448_221_615_260_5, { prefixes: 'k' }); // exact: 0.45359237 × 9.80665
define('Pa', PRESSURE, 1, { prefixes: 'numhkMG' });
define('bar', PRESSURE, 1e5, { prefixes: 'um' });
define('atm', PRESSURE, 101_325); // exact
define('Torr', PRESSURE, 101_325, { denominator: 760 }); // exact
define('psi', PRESSURE, 4.448_221_615_260_5 / 0.000_645_16); // lbf/in²

define('J', ENERGY, 1, { prefixes: 'numkMGTPE' });
define('eV', ENERGY, 1.602_176_634e-19, { prefixes: 'mkMGT' }); // exact
define('Wh', ENERGY, 3600, { prefixes: 'kMGT' });
define('W', POWER, 1, { prefixes: 'numkMGTPE' });

define('K', TEMPERATURE, 1, { prefixes: 'umkM', display: 'temperature' });
define('°C', TEMPERATURE, 1, { aliases: ['degC', '℃'], offset: 273.15, display: 'temperature' });

define('A', dimension({ A: 1 }), 1, { prefixes: 'numkM' });
define('C', dimension({ A: 1, s: 1 }), 1, { prefixes: 'numk' });
define('V', dimension({ kg: 1, m: 2, s: -3, A: -1 }), 1, { prefixes: 'umkM' });
define('ohm', dimension({ kg: 1, m: 2, s: -3, A: -2 }), 1, { prefixes: 'umkM', aliases: ['\u03a9', '\u2126'] });
define('F', dimension({ kg: -1, m: -2, s: 4, A: 2 }), 1, { prefixes: 'pnum' });
define('H', dimension({ kg: 1, m: 2, s: -2, A: -2 }), 1, { prefixes: 'num' });
define('Wb', dimension({ kg: 1, m: 2, s: -2, A: -1 }), 1);
define('T', dimension({ kg: 1, s: -2, A: -1 }), 1, { prefixes: 'num' });

define('mol', dimension({ mol: 1 }), 1, { prefixes: 'mk' });
define('cd', dimension({ cd: 1 }), 1);
define('Gy', SPECIFIC_ENERGY, 1, { prefixes: 'umkM' });
define('Sv', SPECIFIC_ENERGY, 1, { prefixes: 'um' });

define('rad', DIMENSIONLESS, 1, { prefixes: 'num', display: 'angle' });
define('deg', DIMENSIONLESS, Math.PI, { denominator: 180, aliases: ['°'], display: 'angle' });
define('arcmin', DIMENSIONLESS, Math.PI, { denominator: 10_800, display: 'angle' });
define('arcsec', DIMENSIONLESS, Math.PI, { denominator: 648_000, display: 'angle' });
define('mas', DIMENSIONLESS, Math.PI, { denominator: 648_000_000, display: 'angle' });
define('sr', DIMENSIONLESS, 1, { display: 'angle' });
define('%', DIMENSIONLESS, 1, { denominator: 100 });
define('ppm', DIMENSIONLESS, 1, { denominator: 1e6 });
define('ppb', DIMENSIONLESS, 1, { denominator: 1e9 });

/** Every symbol that can be typed, aliases and prefixed forms included, with its entry. */
export const UNIT_TABLE: ReadonlyMap<string, UnitEntry> = table;
