import { rational, rationalOf, type Rational } from './rational';

/** One symbol of a unit text with its exponent; sign and parentheses are already worked in. */
export interface UnitTerm {
  readonly symbol: string;
  readonly exponent: Rational;
  /** Where the symbol stands in the text, for marking a misspelling. */
  readonly from: number;
  readonly to: number;
}

export type TermsResult = { ok: true; terms: readonly UnitTerm[] } | { ok: false; message: string };

const LONGEST_TEXT = 120;
const DEEPEST_NESTING = 8;
const LARGEST_EXPONENT = 24;
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹';

type Token =
  | { kind: 'symbol'; text: string; from: number; to: number }
  | { kind: 'number'; text: string }
  | { kind: 'exponent'; text: string }
  | { kind: '*' | '/' | '(' | ')' | '^' };

/** Thrown inside the parser only; parseUnitTerms turns it into a result. */
class UnitSyntaxError extends Error {}

/** A symbol is letters (g0 is the one with a digit); digits right after it are an exponent, as in "kg/m3" or "s-1". */
const PATTERNS: readonly [RegExp, (match: RegExpExecArray, from: number) => Token | undefined][] = [
  [/\s+/y, () => undefined],
  [/[*·⋅×]/y, () => ({ kind: '*' })],
  [/[/()^]/y, (match) => ({ kind: match[0] as '/' | '(' | ')' | '^' })],
  [/(?:g_0|g[0₀])(?![\p{L}\d])|[\p{L}°%℃]+/uy, symbolToken],
  [/[⁺⁻]?[⁰¹²³⁴⁵⁶⁷⁸⁹]+/y, (match) => ({ kind: 'exponent', text: plainDigits(match[0]) })],
  [/[+\-−]?\d+(?:\.\d+)?/y, (match) => ({ kind: 'number', text: match[0].replace('−', '-') })],
];

function symbolToken(match: RegExpExecArray, from: number): Token {
  return { kind: 'symbol', text: match[0], from, to: from + match[0].length };
}

function plainDigits(superscript: string): string {
  return [...superscript]
    .map((sign) => (sign === '⁻' ? '-' : sign === '⁺' ? '+' : String(SUPERSCRIPTS.indexOf(sign))))
    .join('');
}

function tokenise(text: string): Token[] {
  const tokens: Token[] = [];
  let at = 0;
  while (at < text.length) {
    const step = nextToken(text, at);
    if (!step) throw new UnitSyntaxError(`“${text[at]}” cannot stand in a unit.`);
    const last = tokens.at(-1);
    if (step.token?.kind === 'number' && last?.kind === 'symbol' && last.to === at) {
      tokens.push({ kind: 'exponent', text: step.token.text });
    } else if (step.token) {
      tokens.push(step.token);
    }
    at = step.end;
  }
  return tokens;
}

function nextToken(text: string, at: number): { token: Token | undefined; end: number } | undefined {
  for (const [pattern, make] of PATTERNS) {
    pattern.lastIndex = at;
    const match = pattern.exec(text);
    if (match) return { token: make(match, at), end: pattern.lastIndex };
  }
  return undefined;
}

/** Recursive descent over the tokens of one unit text. */
class UnitParser {
  private at = 0;

  constructor(
    private readonly text: string,
    private readonly tokens: readonly Token[],
  ) {}

  all(): UnitTerm[] {
    const terms = this.product(0);
    if (this.at < this.tokens.length) throw new UnitSyntaxError(`“${this.text}” has a parenthesis too many.`);
    return terms;
  }

  private peek(): Token | undefined {
    return this.tokens[this.at];
  }

  private accept(kind: Token['kind']): boolean {
    if (this.peek()?.kind !== kind) return false;
    this.at += 1;
    return true;
  }

  /** Factors joined by products and divisions; a product after a division needs parentheses, as ISO 80000-1 asks. */
  private product(depth: number): UnitTerm[] {
    if (depth > DEEPEST_NESTING) throw new UnitSyntaxError('The unit is nested too deeply.');
    const terms = this.factor(depth);
    let divided = false;
    for (;;) {
      const token = this.peek();
      if (!token || token.kind === ')') return terms;
      if (this.accept('/')) {
        divided = true;
        terms.push(...raised(this.factor(depth), rational(-1)));
        continue;
      }
      if (token.kind === '^' || token.kind === 'exponent')
        throw new UnitSyntaxError(`“${this.text}” has two powers in a row.`);
      if (divided) {
        throw new UnitSyntaxError(
          `“${this.text}” can be read in two ways: put what is divided by in parentheses, as in W/(m^2 K), or the products first.`,
        );
      }
      this.accept('*');
      terms.push(...this.factor(depth));
    }
  }

  private factor(depth: number): UnitTerm[] {
    const token = this.peek();
    this.at += 1;
    if (token?.kind === 'symbol') return this.power([term(token)]);
    if (token?.kind === '(') {
      const inner = this.product(depth + 1);
      if (!this.accept(')')) throw new UnitSyntaxError(`“${this.text}” lacks a closing parenthesis.`);
      return this.power(inner);
    }
    if (token?.kind === 'number') {
      if (token.text === '1') return [];
      throw new UnitSyntaxError(
        `“${token.text}” cannot stand in a unit, where 1 is the only number; write a power as m^2 or m^(1/2).`,
      );
    }
    throw new UnitSyntaxError(
      this.text === '' ? 'There is no unit.' : `“${this.text}” is not a complete unit: a symbol is missing.`,
    );
  }

  private power(terms: UnitTerm[]): UnitTerm[] {
    const token = this.peek();
    if (token?.kind === 'exponent') {
      this.at += 1;
      return raised(terms, exponentOf(token.text));
    }
    return this.accept('^') ? raised(terms, this.exponent()) : terms;
  }

  private exponent(): Rational {
    if (!this.accept('(')) return exponentOf(this.number());
    const numerator = exponentOf(this.number());
    const denominator = this.accept('/') ? exponentOf(this.number()) : rational(1);
    if (!this.accept(')') || denominator.n === 0) throw new UnitSyntaxError(`“${this.text}” has an unreadable power.`);
    return rational(numerator.n * denominator.d, numerator.d * denominator.n);
  }

  private number(): string {
    const token = this.peek();
    if (token?.kind !== 'number') throw new UnitSyntaxError(`“${this.text}” lacks the number of a power.`);
    this.at += 1;
    return token.text;
  }
}

function term(token: Token & { kind: 'symbol' }): UnitTerm {
  return { symbol: token.text, exponent: rational(1), from: token.from, to: token.to };
}

function exponentOf(text: string): Rational {
  const exponent = rationalOf(Number(text));
  if (!exponent || Math.abs(exponent.n / exponent.d) > LARGEST_EXPONENT) {
    throw new UnitSyntaxError(`The power ${text} is not a fraction of at most ${LARGEST_EXPONENT}.`);
  }
  return exponent;
}

function raised(terms: readonly UnitTerm[], by: Rational): UnitTerm[] {
  return terms.map((one) => {
    const exponent = rational(one.exponent.n * by.n, one.exponent.d * by.d);
    if (Math.abs(exponent.n / exponent.d) > LARGEST_EXPONENT) {
      throw new UnitSyntaxError(`The power ${exponent.n / exponent.d} of ${one.symbol} is too large.`);
    }
    return { ...one, exponent };
  });
}

/**
 * Splits a unit text into symbols with exponents: products by space, * or ·; division by /; powers ^2, ², ^-1, ^(1/2).
 * Symbols are not looked up here. Errors: a sentence saying what is malformed.
 */
export function parseUnitTerms(text: string): TermsResult {
  if (text.length > LONGEST_TEXT)
    return { ok: false, message: `A unit of more than ${LONGEST_TEXT} characters is refused.` };
  try {
    return { ok: true, terms: new UnitParser(text, tokenise(text)).all() };
  } catch (error) {
    if (error instanceof UnitSyntaxError) return { ok: false, message: error.message };
    throw error;
  }
}
