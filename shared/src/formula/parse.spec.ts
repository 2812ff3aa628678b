import type { FormulaNode } from './ast';
import { parseFormula } from './parse';

function parsed(text: string): FormulaNode {
  const result = parseFormula(text);
  if (!result.ok) throw new Error(`${text}: ${result.error.message}`);
  return result.formula.root;
}

/** The tree in prefix form, to see what holds with what. */
function shape(node: FormulaNode): string {
  switch (node.kind) {
    case 'number':
      return node.digits;
    case 'name':
      return node.name;
    case 'negate':
      return `(- ${shape(node.operand)})`;
    case 'binary':
      return `(${node.op} ${shape(node.left)} ${shape(node.right)})`;
    case 'compare':
      return `(${node.ops.join(' ')} ${node.operands.map(shape).join(' ')})`;
    case 'conditional':
      return `(? ${shape(node.condition)} ${shape(node.whenTrue)} ${shape(node.whenFalse)})`;
    case 'call':
      return `(${node.fn} ${node.args.map(shape).join(' ')})`;
  }
}

describe('parseFormula', () => {
  it.each([
    ['a + b*c', '(+ a (* b c))'],
    ['a - b - c', '(- (- a b) c)'],
    ['-2^2', '(- (^ 2 2))'],
    ['2^-1', '(^ 2 (- 1))'],
    ['2^3^2', '(^ 2 (^ 3 2))'],
    ['+x', 'x'],
    ['a/b/c', '(/ (/ a b) c)'],
    ['sqrt(a^2 + b^2)', '(sqrt (+ (^ a 2) (^ b 2)))'],
    ['max(a, b, 3)', '(max a b 3)'],
    ['a > b ? a : b > c ? b : c', '(? (> a b) a (? (> b c) b c))'],
    ['0 < a <= 1', '(< <= 0 a 1)'],
    ['a == b', '(== a b)'],
    ['a != b ? 1 : 2', '(? (!= a b) 1 2)'],
    ['a \u2212 b \u00d7 c \u00f7 2 \u00b7 d', '(- a (* (/ (* b c) 2) d))'],
    ['a \u2264 b', '(<= a b)'],
    ['  .5*x ', '(* .5 x)'],
    ['1e-8 + 1E+3', '(+ 1e-8 1E+3)'],
    ['sqrt (x)', '(sqrt x)'],
  ])('reads %s', (text, expected) => {
    expect(shape(parsed(text))).toBe(expected);
  });

  it('knows every listed function', () => {
    const single =
      'sqrt cbrt exp expm1 log log10 log2 log1p sin cos tan asin acos atan sinh cosh tanh asinh acosh atanh abs floor ceil round sign';
    for (const fn of single.split(' ')) expect(shape(parsed(`${fn}(x)`))).toBe(`(${fn} x)`);
    for (const fn of ['atan2', 'hypot', 'min', 'max']) expect(shape(parsed(`${fn}(x, y)`))).toBe(`(${fn} x y)`);
  });

  it('lists names once, in the order of the text, without functions', () => {
    const result = parseFormula('I_sp * g_0 * log(m_0 / m_f) + 0*I_sp');
    expect(result.ok && result.formula.names).toEqual(['I_sp', 'g_0', 'm_0', 'm_f']);
  });

  it('places every node, parentheses included', () => {
    const text = 'a * (b + sqrt(c))';
    const root = parsed(text);
    if (root.kind !== 'binary' || root.right.kind !== 'binary') throw new Error('shape');
    expect(text.slice(root.from, root.to)).toBe(text);
    expect(text.slice(root.right.from, root.right.to)).toBe('(b + sqrt(c))');
    expect(text.slice(root.right.right.from, root.right.right.to)).toBe('sqrt(c)');
  });

  it.each([
    ['a + ln(b)', 'unknown-function', 'ln', 'write log'],
    ['2 + 6 500', 'implicit-multiplication', '6 500', 'multiplication sign'],
    ['a = 3', 'construct', '=', 'assignment'],
    ['1 + 1e400', 'number-range', '1e400', 'too large'],
    ['x + 1e-400', 'number-range', '1e-400', 'too small'],
    ['a and b', 'construct', 'and', 'and'],
    ['log(2, 3)', 'argument-count', 'log(2, 3)', '1 argument'],
    ['a ≥ b % c', 'construct', '%', 'percent'],
    ['x.y', 'construct', '.', 'dot'],
    ['(a + b', 'syntax', '(', 'never closed'],
    ['a + * b', 'syntax', '*', 'missing here'],
  ])('marks the place in %s', (text, code, marked, words) => {
    const result = parseFormula(text);
    if (result.ok) throw new Error('accepted');
    expect(result.error.code).toBe(code);
    expect(text.slice(result.error.from, result.error.to)).toBe(marked);
    expect(result.error.message).toContain(words);
  });

  it('accepts what lies just within the limits', () => {
    expect(parseFormula('('.repeat(30) + '1' + ')'.repeat(30)).ok).toBe(true);
    expect(parseFormula('1' + '^1'.repeat(20)).ok).toBe(true);
    expect(parseFormula(Array.from({ length: 30 }, (_, i) => `a${i}`).join(' + ')).ok).toBe(true);
    expect(parseFormula('9'.repeat(300)).ok).toBe(true);
  });

  it('keeps 0 and small numbers that a double can hold', () => {
    expect(parsed('0.000')).toMatchObject({ value: 0 });
    expect(parsed('1e-300')).toMatchObject({ value: 1e-300 });
    expect(parsed('0e-999')).toMatchObject({ value: 0 });
  });

  it('gives the same object for the same text', () => {
    expect(parseFormula('a + 4711')).toBe(parseFormula('a + 4711'));
  });
});
