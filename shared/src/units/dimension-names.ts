import { BASE_UNITS, DIMENSIONLESS, type Dimension } from './dimension';
import { rationalText, type Rational } from './rational';
import { unitOf } from './unit';

/** What the trade calls a dimension and which units it writes for it. */
interface NamedDimension {
  readonly words: string;
  /** Coherent SI unit text. */
  readonly si: string;
  /** Choices for pickers, SI first. */
  readonly symbols: readonly string[];
  /** Unit shown when nobody asked for another; common practice, no source. */
  readonly usual: string;
  /** Units to step through so that a number stays readable, small to large. */
  readonly ladder: readonly string[];
}

const named = new Map<Dimension, NamedDimension>();

/** Ladder and further choices are separated by " | "; a symbol with a trailing ! is the usual one (default: the SI one). */
function name(words: string, si: string, ladderText: string, furtherText = ''): void {
  const list = (text: string): string[] =>
    text
      .split(',')
      .map((symbol) => symbol.trim())
      .filter(Boolean);
  const marked = [...list(ladderText), ...list(furtherText)];
  const clean = (symbol: string): string => symbol.replace('!', '');
  const dimension = unitOf(si).dimension;
  if (named.has(dimension)) throw new Error(`The dimension of ${si} is named twice.`);
  named.set(dimension, {
    words,
    si,
    symbols: [...new Set([si, ...marked.map(clean)])],
    usual: clean(marked.find((symbol) => symbol.endsWith('!')) ?? si),
    ladder: list(ladderText).map(clean),
  });
}

name('a plain number', '1', '1', '%, ppm, deg, rad, mrad, arcsec');
name('length', 'm', 'nm, um, mm, m!, km, au, ly', 'cm, Mm, Gm, pc, ft, in');
name('area', 'm^2', 'cm^2, m^2!, km^2', 'mm^2, barn');
name('volume', 'm^3', 'cm^3, m^3!', 'L, km^3');
name('mass', 'kg', 'ug, mg, g, kg!, t', 'u, lb');
name('time', 's', 'ns, us, ms, s, h, d, yr!', 'min, kyr');
name('speed', 'm/s', 'mm/s, m/s, km/s!', 'c, km/h, au/yr, kW/N');
name('acceleration', 'm/s^2', 'um/s^2, mm/s^2, m/s^2!', 'g0, km/s^2, ly/yr^2');
name('force', 'N', 'uN, mN, N!, kN, MN', 'lbf');
name('energy', 'J', 'J, kJ, MJ!, GJ, TJ, PJ', 'eV, keV, MeV, GeV, kWh, Wh, N m');
name('power', 'W', 'mW, W, kW, MW!, GW, TW, PW');
name('pressure', 'Pa', 'Pa, kPa, MPa!, GPa', 'bar, mbar, atm, Torr, psi, J/m^3');
name('temperature', 'K', 'mK, K!', '°C');
name('density', 'kg/m^3', 'kg/m^3!', 'g/cm^3, t/m^3');
name('specific power', 'W/kg', 'mW/kg, W/kg!, kW/kg, MW/kg', 'Gy/s, mSv/h');
name('specific mass', 'kg/W', 'kg/MW, kg/kW!, kg/W');
name('mass flow', 'kg/s', 'ug/s, mg/s, g/s, kg/s!, t/s', 't/h, t/d, kg/d, kg/yr');
name('heat flux', 'W/m^2', 'mW/m^2, W/m^2, kW/m^2!, MW/m^2, GW/m^2', 'W/cm^2');
name('areal mass', 'kg/m^2', 'g/m^2, kg/m^2!', 'g/cm^2');
name('mass per length', 'kg/m', 'g/m, kg/m!', 'kg/km');
name('area per mass', 'm^2/kg', 'm^2/kg!', 'cm^2/g');
name('frequency', 'Hz', 'mHz, Hz!, kHz, MHz, GHz, THz', '1/s, 1/h, 1/d, 1/yr, rpm, Bq, %/d');
name('charge', 'C', 'uC, mC, C!', 'A h');
name('current', 'A', 'uA, mA, A!, kA, MA');
name('voltage', 'V', 'mV, V!, kV, MV');
name('resistance', 'ohm', 'mohm, ohm!, kohm, Mohm');
name('capacitance', 'F', 'pF, nF, uF, mF, F!');
name('inductance', 'H', 'nH, uH, mH, H!');
name('magnetic flux', 'Wb', 'Wb!', 'T m^2');
name('magnetic flux density', 'T', 'nT, uT, mT, T!');
name('electric field', 'V/m', 'V/m!, kV/m, MV/m');
name('momentum', 'N s', 'N s!, kN s, MN s', 'kg m/s');
name('angular momentum', 'J s', 'J s!', 'N m s, kg m^2/s');
name('moment of inertia', 'kg m^2', 'kg m^2!', 't m^2');
name('specific energy', 'J/kg', 'J/kg, kJ/kg, MJ/kg!, GJ/kg, TJ/kg', 'm^2/s^2, km^2/s^2, Gy, mGy, kGy, Sv, mSv');
name('heat capacity', 'J/K', 'J/K, kJ/K!, MJ/K');
name('specific heat capacity', 'J/(kg K)', 'J/(kg K)!, kJ/(kg K)');
name('thermal conductivity', 'W/(m K)', 'W/(m K)!');
name('thermal conductance', 'W/K', 'W/K!, kW/K');
name('thermal resistance', 'K/W', 'K/W!, K/kW');
name('heat transfer coefficient', 'W/(m^2 K)', 'W/(m^2 K)!, kW/(m^2 K)');
name('radiation coefficient', 'W/(m^2 K^4)', 'W/(m^2 K^4)!');
name('power density', 'W/m^3', 'W/m^3, kW/m^3, MW/m^3!, GW/m^3', 'W/cm^3, Pa/s, kPa/d');
name('temperature rate', 'K/s', 'K/s!', 'K/min, K/h');
name('temperature gradient', 'K/m', 'K/m!');
name('thermal expansion coefficient', '1/K', '1/K!', 'ppm/K');
name('inverse length', '1/m', '1/m!', '1/cm');
name('inverse area', '1/m^2', '1/m^2!', '1/cm^2');
name('number density', '1/m^3', '1/m^3!', '1/cm^3');
name('inverse mass', '1/kg', '1/kg!');
name('thrust per power', 'N/W', 'uN/kW, mN/kW!, N/kW, N/W', 'N/MW');
name('stiffness', 'N/m', 'N/m!, kN/m');
name('amount of substance', 'mol', 'mmol, mol!, kmol');
name('molar mass', 'kg/mol', 'g/mol!, kg/mol');
name('molar energy', 'J/mol', 'J/mol, kJ/mol!');
name('molar heat capacity', 'J/(mol K)', 'J/(mol K)!');
name('charge per mass', 'C/kg', 'C/kg!');
name('dynamic viscosity', 'Pa s', 'uPa s, mPa s, Pa s!');
name('kinematic viscosity', 'm^2/s', 'm^2/s!', 'mm^2/s');
name('volume flow', 'm^3/s', 'm^3/s!', 'L/s');
name('gravitational parameter', 'm^3/s^2', 'm^3/s^2!', 'km^3/s^2');
name('gravitational constant', 'm^3/(kg s^2)', 'm^3/(kg s^2)!');
name('power rate', 'W/s', 'W/s!, kW/s', 'MW/s');
name('luminous intensity', 'cd', 'cd!');

const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

/** An exponent in superscript digits; a fraction as ^(1/2), for which there are no legible digits. */
export function superscript(r: Rational): string {
  if (r.d !== 1) return `^(${rationalText(r)})`;
  return [...String(r.n)].map((sign) => (sign === '-' ? '⁻' : (SUPERSCRIPTS[Number(sign)] ?? ''))).join('');
}

/** Base units joined as a quotient, e.g. "kg m^2/s^3" or, pretty, "kg·m²/s³". */
function baseUnitsText(d: Dimension, pretty: boolean): string {
  const side = (sign: 1 | -1): string[] =>
    // The kilogram is written first, as in kg m^2/s^3.
    [1, 0, 2, 3, 4, 5, 6].flatMap((i) => {
      const exponent = d.exponents[i];
      if (!exponent || exponent.n * sign <= 0) return [];
      const size = { n: Math.abs(exponent.n), d: exponent.d };
      const power =
        size.n === 1 && size.d === 1
          ? ''
          : pretty
            ? superscript(size)
            : `^${size.d === 1 ? size.n : `(${rationalText(size)})`}`;
      return [`${BASE_UNITS[i]}${power}`];
    });
  const joint = pretty ? '·' : ' ';
  const above = side(1).join(joint) || '1';
  const below = side(-1);
  if (below.length === 0) return above;
  return `${above}/${below.length > 1 ? `(${below.join(joint)})` : below.join('')}`;
}

/** The trade's data on a dimension, where it has a name. */
export function namedDimension(d: Dimension): NamedDimension | undefined {
  return named.get(d);
}

/** Words a person knows ("mass", "specific power", "a plain number"); without a name the SI symbols, "kg·m²/s⁵". */
export function describeDimension(d: Dimension): string {
  return named.get(d)?.words ?? baseUnitsText(d, true);
}

/** The same with its article, for a sentence: "a speed", "an energy", "a value in kg·m²/s⁵". */
export function describeWithArticle(d: Dimension): string {
  const entry = named.get(d);
  if (!entry) return `a value in ${baseUnitsText(d, true)}`;
  if (d === DIMENSIONLESS) return entry.words;
  return `${/^[aeiou]/.test(entry.words) ? 'an' : 'a'} ${entry.words}`;
}

/** Coherent SI unit text that parseUnit reads with factor 1: "m/s", "W", "1", or base units such as "kg m^2/s^5". */
export function siUnitOf(d: Dimension): string {
  return named.get(d)?.si ?? baseUnitsText(d, false);
}

/** Curated choices for a unit picker, the SI unit first. */
export function unitSymbolsOf(d: Dimension): readonly string[] {
  return named.get(d)?.symbols ?? [siUnitOf(d)];
}

/** Every dimension that has a name. */
export function namedDimensions(): readonly Dimension[] {
  return [...named.keys()];
}
