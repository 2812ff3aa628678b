/**
 * What a function does to dimensions:
 * number: dimensionless in, dimensionless out · same: all arguments alike, result like them ·
 * root: the exponent of every base dimension is divided by `root` · sign: anything in, dimensionless out ·
 * ratio: two alike arguments in, dimensionless out.
 */
export type DimensionRule = 'number' | 'same' | 'root' | 'sign' | 'ratio';

interface FunctionSpec {
  readonly least: number;
  readonly most: number;
  readonly rule: DimensionRule;
  readonly root?: number;
}

const one = (rule: DimensionRule, root?: number): FunctionSpec => ({ least: 1, most: 1, rule, root });

const TABLE = {
  sqrt: one('root', 2),
  cbrt: one('root', 3),
  exp: one('number'),
  expm1: one('number'),
  log: one('number'),
  log10: one('number'),
  log2: one('number'),
  log1p: one('number'),
  sin: one('number'),
  cos: one('number'),
  tan: one('number'),
  asin: one('number'),
  acos: one('number'),
  atan: one('number'),
  atan2: { least: 2, most: 2, rule: 'ratio' },
  sinh: one('number'),
  cosh: one('number'),
  tanh: one('number'),
  asinh: one('number'),
  acosh: one('number'),
  atanh: one('number'),
  hypot: { least: 2, most: 20, rule: 'same' },
  abs: one('same'),
  min: { least: 2, most: 20, rule: 'same' },
  max: { least: 2, most: 20, rule: 'same' },
  floor: one('number'),
  ceil: one('number'),
  round: one('number'),
  sign: one('sign'),
} as const satisfies Record<string, FunctionSpec>;

export type FunctionName = keyof typeof TABLE;

/** The functions a formula may call. A Map, so that no name of Object.prototype is ever found in it. */
export const FUNCTIONS: ReadonlyMap<string, FunctionSpec> = new Map<string, FunctionSpec>(Object.entries(TABLE));

/** Names people bring from elsewhere, and what they are called here. */
const ALIASES: ReadonlyMap<string, string> = new Map([
  ['ln', 'log'],
  ['lg', 'log10'],
  ['arcsin', 'asin'],
  ['arccos', 'acos'],
  ['arctan', 'atan'],
  ['arsinh', 'asinh'],
  ['arcosh', 'acosh'],
  ['artanh', 'atanh'],
  ['tg', 'tan'],
  ['sgn', 'sign'],
  ['pow', '^'],
  ['power', '^'],
  ['square', '^2'],
  ['cube', '^3'],
  ['mod', 'floor'],
]);

export function isFunctionName(name: string): name is FunctionName {
  return FUNCTIONS.has(name);
}

/** What to write instead of an unknown function, when that can be guessed. */
export function functionSuggestion(name: string): string | undefined {
  const known = ALIASES.get(name.toLowerCase());
  if (known) return known;
  const lower = name.toLowerCase();
  return FUNCTIONS.has(lower) ? lower : undefined;
}
