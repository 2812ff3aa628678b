/**
 * The study that is measured: layered, 2,000 inputs, 20,000 formulas in 12 layers that read 4 values each, 50,000
 * threshold checks. Written once in terms of node numbers and put into words for each engine by a dialect.
 */
export interface Dialect {
  ref(node: number): string;
  call(fn: 'sqrt' | 'exp' | 'log', argument: string): string;
  power(base: string, exponent: string): string;
}

export interface StudyFormula {
  readonly node: number;
  readonly reads: readonly number[];
  text(dialect: Dialect): string;
}

export interface Study {
  readonly inputs: readonly number[];
  readonly formulas: readonly StudyFormula[];
  readonly checks: readonly {
    readonly node: number;
    readonly relation: 'at-least' | 'at-most';
    readonly limit: number;
  }[];
}

export const LAYERS = 12;
const INPUTS = 2000;
const FORMULAS = 20_000;
const CHECKS = 50_000;
/** Inputs read by the first layer; the others come in late and so have small cones. */
const EARLY = 1666;
/** How far each of the four values read lies to the side, so that a first-layer input reaches about 1,000 formulas. */
const OFFSETS = [0, 5, 12, 21];

/** The dialect of our formulas, which mathjs shares. */
export const FORMULA_DIALECT: Dialect = {
  ref: nameOf,
  call: (fn, argument) => `${fn}(${argument})`,
  power: (base, exponent) => `${base}^${exponent}`,
};

export function nameOf(node: number): string {
  return `q${node}`;
}

/** Five kinds of formulas that keep values near those they read; `k` makes each text its own. */
function textOf(kind: number, k: string, reads: readonly number[], d: Dialect): string {
  const [a, b, c, e] = reads.map((node) => d.ref(node)) as [string, string, string, string];
  switch (kind) {
    case 0:
      return `${k} * (${a} + ${b}) * ${c} / (${c} + ${e})`;
    case 1:
      return `${d.call('sqrt', `${a} * ${b}`)} * ${k} + 0.01 * (${c} - ${e})`;
    case 2:
      return `0.5 * (${a} + ${b}) + 0.1 * ${k} * (${c} - ${e})`;
    case 3:
      return `${a} * ${d.call('exp', `-${b} / 10`)} + 0.2 * ${k} * ${c} * ${e} / (${c} + ${e})`;
    default:
      return `${d.call('log', `1 + ${d.power(a, '2')}`)} * ${k} + 0.3 * ${b} * ${c} / ${e}`;
  }
}

function formulaOf(node: number, reads: readonly number[], kind = node % 5): StudyFormula {
  const k = (1 + (node % 977) * 1e-5 + node * 1e-9).toString();
  return { node, reads, text: (dialect) => textOf(kind, k, reads, dialect) };
}

/** Makes the layered study; always the same. */
export function layeredStudy(): Study {
  const inputs = Array.from({ length: INPUTS }, (_, i) => i);
  const formulas: StudyFormula[] = [];
  let below = inputs.slice(0, EARLY);
  for (let layer = 0; layer < LAYERS; layer++) {
    const width = Math.round((FORMULAS * (layer + 1)) / LAYERS) - Math.round((FORMULAS * layer) / LAYERS);
    const nodes: number[] = [];
    for (let i = 0; i < width; i++) {
      const reads = OFFSETS.map((offset) => below[(i + offset) % below.length] as number);
      // Each late input is read by two formulas of the last layer but one.
      const late = EARLY + (i >> 1);
      if (layer === LAYERS - 2 && late < INPUTS) reads[3] = late;
      const node = INPUTS + formulas.length;
      formulas.push(formulaOf(node, reads));
      nodes.push(node);
    }
    below = nodes;
  }
  const checks = Array.from({ length: CHECKS }, (_, i) => ({
    node: INPUTS + ((i * 7919) % FORMULAS),
    relation: i % 2 === 0 ? ('at-least' as const) : ('at-most' as const),
    limit: 0.5 + (i % 100) / 50,
  }));
  return { inputs, formulas, checks };
}

/** One input read by n formulas. */
export function wideStudy(n: number): Study {
  const formulas = Array.from({ length: n }, (_, i) => formulaOf(i + 1, [0, 0, 0, 0]));
  return { inputs: [0], formulas, checks: [] };
}

/** n formulas, each reading the one before; kind 2 hands the value on, so that it neither grows nor fades. */
export function deepStudy(n: number): Study {
  const formulas = Array.from({ length: n }, (_, i) => formulaOf(i + 1, [i, i, i, i], 2));
  return { inputs: [0], formulas, checks: [] };
}

/** The value that input number i starts with. */
export function startValue(i: number): number {
  return 1 + ((i * 7919) % 1000) / 1000;
}
