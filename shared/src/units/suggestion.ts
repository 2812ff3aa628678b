import { UNIT_TABLE } from './unit-table';

/** Words and habits that people type for a unit, in lower case, with the symbol that is meant. */
const WORDS: Readonly<Record<string, string>> = {
  ...spelled('m', 'meter meters metre metres mtr'),
  ...spelled('km', 'kilometer kilometers kilometre kilometres'),
  ...spelled('um', 'micron microns'),
  ...spelled('au', 'ua'),
  ...spelled('ly', 'lightyear lightyears lyr'),
  ...spelled('pc', 'parsec parsecs'),
  ...spelled('in', 'inch inches'),
  ...spelled('ft', 'foot feet'),
  ...spelled('kg', 'kilogram kilograms kilo kilos kgs'),
  ...spelled('g', 'gram grams gr gm'),
  ...spelled('t', 'ton tons tonne tonnes'),
  ...spelled('lb', 'lbs lbm pound pounds'),
  ...spelled('u', 'amu'),
  ...spelled('s', 'sec secs second seconds'),
  ...spelled('min', 'mins minute minutes'),
  ...spelled('h', 'hr hrs hour hours'),
  ...spelled('d', 'days'),
  ...spelled('yr', 'y a yrs year years annum'),
  ...spelled('N', 'newton newtons'),
  ...spelled('J', 'joule joules'),
  ...spelled('W', 'watt watts'),
  ...spelled('kW', 'kilowatt kilowatts'),
  ...spelled('MW', 'megawatt megawatts'),
  ...spelled('K', 'kelvin kelvins degk °k'),
  ...spelled('°C', 'celsius centigrade'),
  ...spelled('Pa', 'pascal pascals'),
  ...spelled('Hz', 'hertz cps'),
  ...spelled('V', 'volt volts'),
  ...spelled('A', 'amp amps ampere amperes'),
  ...spelled('C', 'coulomb coulombs'),
  ...spelled('T', 'tesla teslas'),
  ...spelled('mol', 'mole moles'),
  ...spelled('deg', 'degree degrees degs'),
  ...spelled('rad', 'radian radians'),
  ...spelled('%', 'percent pct'),
  ...spelled('Sv', 'sievert sieverts'),
  ...spelled('Gy', 'gray grays'),
  ...spelled('Bq', 'becquerel becquerels'),
  ...spelled('bar', 'bars'),
  ...spelled('atm', 'atmosphere atmospheres'),
  ...spelled('eV', 'electronvolt electronvolts'),
  ...spelled('L', 'liter liters litre litres'),
  ...spelled('g0', 'gee gees'),
  ...spelled('km/s', 'kps'),
  ...spelled('m/s', 'mps'),
  ...spelled('km/h', 'kph kmh'),
  ...spelled('ft/s', 'fps'),
  ...spelled('m^2', 'sqm'),
  ...spelled('cm^3', 'cc ccm'),
};

function spelled(symbol: string, words: string): Record<string, string> {
  return Object.fromEntries(words.split(' ').map((word) => [word, symbol]));
}

/** Symbols refused on purpose, with the sentence that says what to write instead. */
const REFUSED: readonly [RegExp, (symbol: string) => { message: string; suggestion?: string }][] = [
  [
    /^dB[a-zA-Z]*$/,
    () => ({
      message:
        'The decibel is a ratio on a logarithmic scale, not a unit: enter the ratio itself, for example 2 for 3 dB.',
    }),
  ],
  [
    /^([mkMGT]?W)(e|el|th|t)$/,
    (symbol) => {
      const watt = symbol.replace(/(e|el|th|t)$/, '');
      return {
        message: `“${symbol}” carries a remark in the unit: write ${watt}, and say electrical or thermal in the name of the quantity.`,
        suggestion: watt,
      };
    },
  ],
  [
    /^[kMG]t$/,
    (symbol) => ({
      message: `“${symbol}” may mean mass or the energy of that much TNT: write 1e3 t for a mass, or TJ for an energy.`,
    }),
  ],
  [/^(°F|degF|°R|degR)$/, (symbol) => ({ message: `“${symbol}” is not used here: write the temperature in K or °C.` })],
  [/^Ci$/, () => ({ message: 'The curie is not used here: write the activity in Bq (1 Ci = 3.7e10 Bq).' })],
  [/^rem$/, () => ({ message: 'The rem is not used here: write the dose in Sv (100 rem = 1 Sv).' })],
];

/** First parts of products that people write without the space, such as Nm for N m. */
const JOINED = /^(m?N|[kM]N|Pa|m?A|J|V|kg)(m|s|h|K)$/;

function rankByCase(token: string, candidate: string): number {
  let differing = 0;
  for (let i = 0; i < token.length; i += 1) {
    // Lower-case m for mega is the commonest slip, so the first letter decides between them only by what follows.
    if (token[i] !== candidate[i] && !(i === 0 && /^m$/i.test(candidate.charAt(0)))) differing += 1;
  }
  return differing * 2 + (candidate.startsWith('m') && token.length > 1 ? 1 : 0);
}

/** Least number of single-character edits, swaps of neighbours included, that turn one text into the other. */
export function editDistance(a: string, b: string): number {
  let before: number[] = [];
  let previous = Array.from({ length: b.length + 1 }, (_, j) => j);
  for (let i = 1; i <= a.length; i += 1) {
    const row = [i];
    for (let j = 1; j <= b.length; j += 1) {
      const cost = a[i - 1] === b[j - 1] ? 0 : 1;
      let best = Math.min((previous[j] ?? 0) + 1, (row[j - 1] ?? 0) + 1, (previous[j - 1] ?? 0) + cost);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        best = Math.min(best, (before[j - 2] ?? 0) + 1);
      row.push(best);
    }
    before = previous;
    previous = row;
  }
  return previous[b.length] ?? 0;
}

function nearSymbols(token: string): string[] {
  const folded = token.toLowerCase();
  const sameLetters = [...UNIT_TABLE.keys()].filter((symbol) => symbol.toLowerCase() === folded);
  if (sameLetters.length > 0) return sameLetters.sort((a, b) => rankByCase(token, a) - rankByCase(token, b));
  const reach = token.length >= 5 ? 2 : 1;
  if (token.length < 2) return [];
  return [...UNIT_TABLE.keys()]
    .map((symbol) => ({ symbol, distance: Math.min(editDistance(token, symbol), editDistance(folded, symbol) + 0.5) }))
    .filter(({ symbol, distance }) => distance <= reach && symbol.length > 1)
    .sort((a, b) => a.distance - b.distance)
    .map(({ symbol }) => symbol);
}

/** What to tell somebody who typed an unknown symbol: a refusal sentence, or up to two symbols that may be meant. */
export function explainUnknownSymbol(token: string): { message: string; suggestions: readonly string[] } {
  for (const [pattern, explain] of REFUSED) {
    if (!pattern.test(token)) continue;
    const { message, suggestion } = explain(token);
    return { message, suggestions: suggestion === undefined ? [] : [suggestion] };
  }
  const joined = JOINED.exec(token);
  const word = Object.hasOwn(WORDS, token.toLowerCase()) ? WORDS[token.toLowerCase()] : undefined;
  const near = joined ? [`${joined[1]} ${joined[2]}`] : word !== undefined ? [word] : nearSymbols(token).slice(0, 2);
  const question = near.length > 0 ? ` Did you mean ${near.join(' or ')}?` : '';
  return { message: `“${token}” is not a unit known here.${question}`, suggestions: near };
}
