import fc from 'fast-check';
import * as mathjs from 'mathjs/number';
import { checkFormula } from './check';
import { evaluateFormula } from './evaluate';
import { HOSTILE_FORMULAS, heavyFormulas } from './hostile-formulas';
import { parseFormula } from './parse';
import type { FormulaNode } from './ast';

const KINDS = new Set(['number', 'name', 'negate', 'binary', 'compare', 'conditional', 'call']);

function nodesOf(node: FormulaNode): FormulaNode[] {
  switch (node.kind) {
    case 'number':
    case 'name':
      return [node];
    case 'negate':
      return [node, ...nodesOf(node.operand)];
    case 'binary':
      return [node, ...nodesOf(node.left), ...nodesOf(node.right)];
    case 'compare':
      return [node, ...node.operands.flatMap(nodesOf)];
    case 'conditional':
      return [node, ...[node.condition, node.whenTrue, node.whenFalse].flatMap(nodesOf)];
    case 'call':
      return [node, ...node.args.flatMap(nodesOf)];
  }
}

describe('hostile formulas', () => {
  const corpus = Object.entries(HOSTILE_FORMULAS).flatMap(([what, texts]) =>
    texts.map((text) => [what, text] as const),
  );

  it('has at least 200 texts', () => {
    expect(new Set(corpus.map(([, text]) => text)).size).toBeGreaterThanOrEqual(200);
  });

  it.each(corpus)('refuses (%s) %j with a message and a place inside the text', (_what, text) => {
    const result = parseFormula(text);
    if (result.ok) throw new Error(`accepted: ${text}`);
    expect(result.error.message.length).toBeGreaterThan(5);
    expect(result.error.from).toBeGreaterThanOrEqual(0);
    expect(result.error.from).toBeLessThanOrEqual(result.error.to);
    expect(result.error.to).toBeLessThanOrEqual(text.length);
  });

  it.each(heavyFormulas().map((text) => [`${text.slice(0, 12)}… (${text.length})`, text]))(
    'refuses %s quickly',
    (_, text) => {
      const started = performance.now();
      expect(parseFormula(text).ok).toBe(false);
      // Demand: p99 ≤ 50 ms, none over 1 s; measured here at well under 5 ms.
      expect(performance.now() - started).toBeLessThan(1000);
    },
  );

  it('reads no name that the scope does not declare, not even those mathjs takes for units or constants', () => {
    for (const name of [
      'm',
      'g',
      'h',
      't',
      'T',
      'K',
      'F',
      'A',
      'V',
      'N',
      'L',
      'W',
      'J',
      's',
      'l',
      'dV',
      'dT',
      'mT',
      'EA',
      'TC',
      'pi',
      'e',
      'i',
      'tau',
      'speedOfLight',
    ]) {
      const parsed = parseFormula(`${name} + 1`);
      if (!parsed.ok) throw new Error(parsed.error.message);
      expect(checkFormula(parsed.formula, new Map())).toMatchObject({ ok: false, error: { code: 'undeclared-name' } });
      expect(evaluateFormula(parsed.formula, new Map())).toMatchObject({ ok: false, failure: { origin: name } });
    }
  });
});

/** What mathjs exports, and the settings and functions that hang on its parser. */
function fingerprint(library: typeof mathjs): string {
  const parser = Object.entries(library.parse).map(([key, value]) => `${key}=${String(value)}`);
  return `${Object.keys(library).join()}|${parser.join('|')}`;
}

describe('fuzz', () => {
  const words = [
    'x',
    'y',
    'I_sp',
    'sqrt',
    'log',
    'min',
    'atan2',
    'constructor',
    '__proto__',
    'toString',
    'pi',
    'e',
    'm',
    'and',
    'to',
    'true',
    '(',
    ')',
    '(',
    ')',
    '(',
    ')',
    ',',
    '+',
    '-',
    '*',
    '/',
    '^',
    '<',
    '<=',
    '==',
    '=',
    '!',
    '?',
    ':',
    '%',
    '.',
    "'",
    '"',
    '[',
    ']',
    '{',
    '}',
    ';',
    '\n',
    '0',
    '1',
    '2',
    '0.5',
    '1e3',
    '1e400',
    '1e-400',
    ' ',
    ' ',
    ' ',
    '.*',
    '1e',
    '0x1',
    'evaluate',
    'import',
    '\u2212',
    '\u2264',
    '\u200b',
    'Infinity',
  ];
  const text = fc.array(fc.constantFrom(...words), { maxLength: 24 }).map((parts) => parts.join(''));
  const scope = new Map([
    ['x', 1.5],
    ['y', -2],
    ['I_sp', 450],
    ['m', 3],
    ['e', 0],
    ['pi', 7],
  ]);

  it('lets nothing through but the allowed nodes, never hangs, throws or touches a global', () => {
    const globals = Object.getOwnPropertyNames(globalThis).length;
    const prototype = Object.getOwnPropertyNames(Object.prototype).join();
    const parser = fingerprint(mathjs);
    const times: number[] = [];
    let accepted = 0;
    const grammar = grammarText();
    fc.assert(
      fc.property(fc.oneof(text, grammar), (formula) => {
        const started = performance.now();
        const result = parseFormula(formula);
        times.push(performance.now() - started);
        if (!result.ok) return;
        accepted += 1;
        const nodes = nodesOf(result.formula.root);
        expect(nodes.length).toBeLessThanOrEqual(300);
        for (const node of nodes) if (!KINDS.has(node.kind)) throw new Error(`escaped: ${formula}`);
        const outcome = evaluateFormula(result.formula, scope);
        if (outcome.ok && !Number.isFinite(outcome.value)) throw new Error(`not finite: ${formula}`);
      }),
      { numRuns: 100_000 },
    );
    times.sort((a, b) => a - b);
    expect(times[Math.floor(times.length * 0.99)]).toBeLessThan(50);
    expect(times.at(-1)).toBeLessThan(1000);
    expect(accepted).toBeGreaterThan(10_000);
    expect(Object.getOwnPropertyNames(globalThis)).toHaveLength(globals);
    expect(Object.getOwnPropertyNames(Object.prototype).join()).toBe(prototype);
    expect(fingerprint(mathjs)).toBe(parser);
  }, 120_000);

  /** Mostly well-formed texts, some with one piece exchanged for something hostile. */
  function grammarText(): fc.Arbitrary<string> {
    const { expression } = fc.letrec<{ expression: string }>((tie) => ({
      expression: fc.oneof(
        { depthSize: 'small', withCrossShrink: true },
        fc.constantFrom('x', 'y', '2', '0.5', '1e-3', '1e300'),
        fc
          .tuple(tie('expression'), fc.constantFrom('+', '-', '*', '/', '^', '<', '%', '='), tie('expression'))
          .map((p) => p.join('')),
        fc
          .tuple(fc.constantFrom('sqrt', 'log', 'exp', 'f', 'toString'), tie('expression'))
          .map(([f, a]) => `${f}(${a})`),
        tie('expression').map((a) => `(${a})`),
        fc.tuple(tie('expression'), tie('expression'), tie('expression')).map(([a, b, c]) => `(${a} ? ${b} : ${c})`),
      ),
    }));
    return expression;
  }
});
