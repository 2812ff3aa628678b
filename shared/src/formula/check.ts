import {
  DIMENSIONLESS,
  describeDimension,
  divideDimensions,
  multiplyDimensions,
  powerDimension,
  rationalOf,
  siUnitOf,
  type Dimension,
  type TemperatureKind,
} from '@shared/units';
import { evaluateFormula } from './evaluate';
import type { BinaryNode, CallNode, CompareNode, Formula, FormulaError, FormulaErrorCode, FormulaNode } from './ast';
import { FUNCTIONS } from './functions';
import { combineTemperatures, temperatureWords, type Temperature } from './temperature';

/** The type of a name or a result: its dimension and, for temperatures, whether absolute or a difference. */
export interface Typed {
  readonly dimension: Dimension;
  readonly temperature?: TemperatureKind;
}

export type CheckResult =
  { readonly ok: true; readonly type: Typed } | { readonly ok: false; readonly error: FormulaError };

/** A type during the check; `zero` marks the literal 0, which fits any dimension. */
interface Working {
  readonly dimension: Dimension;
  readonly temperature: Temperature;
  readonly zero: boolean;
}

const NUMBER: Working = { dimension: DIMENSIONLESS, temperature: undefined, zero: false };
const LARGEST_EXPONENT = 100;

class Mismatch extends Error {
  constructor(readonly reason: FormulaError) {
    super(reason.message);
  }
}

/**
 * Checks the dimensions of a formula against the types of the names it may use, and gives the type of its result.
 * Errors name the sub-expression with its place, and both dimensions in words.
 */
export function checkFormula(formula: Formula, scope: ReadonlyMap<string, Typed>): CheckResult {
  try {
    const { dimension, temperature } = new Checker(formula, scope).typeOf(formula.root);
    const kind = temperature === 'absolute' || temperature === 'difference' ? temperature : undefined;
    return { ok: true, type: kind ? { dimension, temperature: kind } : { dimension } };
  } catch (error) {
    if (error instanceof Mismatch) return { ok: false, error: error.reason };
    throw error;
  }
}

/** A dimension in words a person knows, with its unit: "a force (N)". */
function words(dimension: Dimension): string {
  if (dimension === DIMENSIONLESS) return 'a plain number';
  const name = describeDimension(dimension);
  const unit = siUnitOf(dimension);
  if (name === unit || !/^[a-z]+([ -][a-z]+)*$/.test(name)) return `a quantity in ${unit}`;
  return `${/^[aeiou]/.test(name) ? 'an' : 'a'} ${name} (${unit})`;
}

class Checker {
  constructor(
    private readonly formula: Formula,
    private readonly scope: ReadonlyMap<string, Typed>,
  ) {}

  typeOf(node: FormulaNode): Working {
    switch (node.kind) {
      case 'number':
        return node.value === 0 ? { ...NUMBER, zero: true } : NUMBER;
      case 'name': {
        const type = this.scope.get(node.name);
        if (!type) return this.fail('undeclared-name', node, `${node.name} is not declared: ${this.declared()}`);
        return { dimension: type.dimension, temperature: type.temperature, zero: false };
      }
      case 'negate': {
        const operand = this.typeOf(node.operand);
        const turned = operand.temperature === 'absolute' ? 'negated' : operand.temperature;
        return { ...operand, temperature: operand.temperature === 'negated' ? 'absolute' : turned };
      }
      case 'binary':
        return this.binary(node);
      case 'compare':
        return this.comparison(node);
      case 'conditional': {
        const condition = this.typeOf(node.condition);
        if (condition.dimension !== DIMENSIONLESS) {
          const found = words(condition.dimension);
          this.fail(
            'dimension',
            node.condition,
            `A condition is a comparison, and ${this.quote(node.condition)} is ${found}`,
          );
        }
        const yes = this.typeOf(node.whenTrue);
        const no = this.typeOf(node.whenFalse);
        return this.alike(node, [yes, no], (a, b) => `${this.quote(node)} gives ${a} or ${b}; both must be alike`);
      }
      case 'call':
        return this.call(node);
    }
  }

  private binary(node: BinaryNode): Working {
    if (node.op === '^') return this.power(node);
    const left = this.typeOf(node.left);
    const right = this.typeOf(node.right);
    if (node.op === '*' || node.op === '/') {
      const combine = node.op === '*' ? multiplyDimensions : divideDimensions;
      const dimension = this.bounded(node, () => combine(left.dimension, right.dimension));
      // Times or over a plain number, a difference of temperatures stays one; an absolute one becomes plain kelvin.
      const keeps = left.temperature === 'difference' && right.dimension === DIMENSIONLESS;
      const takes = node.op === '*' && right.temperature === 'difference' && left.dimension === DIMENSIONLESS;
      return { dimension, temperature: keeps || takes ? 'difference' : undefined, zero: false };
    }
    if (left.zero && right.zero) return left;
    if (!left.zero && !right.zero && left.dimension !== right.dimension) {
      const [a, b] = [words(left.dimension), words(right.dimension)];
      this.fail(
        'dimension',
        node,
        `${this.quote(node)} ${node.op === '+' ? `adds ${b} to ${a}` : `subtracts ${b} from ${a}`}`,
      );
    }
    if (right.zero) return left;
    if (left.zero) return node.op === '+' ? right : this.negated(right);
    const combined = combineTemperatures(node.op, left.temperature, right.temperature);
    if (!combined.ok) return this.fail('temperature', node, `${this.quote(node)} ${combined.message}`);
    return { dimension: left.dimension, temperature: combined.temperature, zero: false };
  }

  private negated(type: Working): Working {
    return { ...type, temperature: type.temperature === 'absolute' ? 'negated' : type.temperature };
  }

  private power(node: BinaryNode): Working {
    const base = this.typeOf(node.left);
    const exponent = this.typeOf(node.right);
    if (exponent.dimension !== DIMENSIONLESS) {
      const found = words(exponent.dimension);
      this.fail('dimension', node.right, `An exponent is a plain number, and ${this.quote(node.right)} is ${found}`);
    }
    if (base.dimension === DIMENSIONLESS) return NUMBER;
    const value = constantValue(node.right);
    if (value === undefined) {
      const found = words(base.dimension);
      const message = `${this.quote(node.left)} is ${found}; it can only be raised to a constant written as a number`;
      return this.fail('exponent', node.right, message);
    }
    const rational = rationalOf(value);
    if (!rational)
      return this.fail('exponent', node.right, 'The exponent of a quantity is a simple fraction such as 1/4 or 0.6');
    return { ...NUMBER, dimension: this.bounded(node, () => powerDimension(base.dimension, rational)) };
  }

  private comparison(node: CompareNode): Working {
    const types = node.operands.map((operand) => this.typeOf(operand));
    this.alike(node, types, (a, b) => `${this.quote(node)} compares ${a} with ${b}`);
    return NUMBER;
  }

  private call(node: CallNode): Working {
    const spec = FUNCTIONS.get(node.fn);
    const types = node.args.map((argument) => this.typeOf(argument));
    const first = types[0] ?? NUMBER;
    switch (spec?.rule) {
      case 'sign':
        return NUMBER;
      case 'same':
        return this.alike(
          node,
          types,
          (a, b) => `${this.quote(node)}: ${node.fn} takes quantities alike, not ${a} and ${b}`,
        );
      case 'ratio':
        this.alike(node, types, (a, b) => `${this.quote(node)}: ${node.fn} takes quantities alike, not ${a} and ${b}`);
        return NUMBER;
      case 'root': {
        const root = { n: 1, d: spec.root ?? 1 };
        return { ...NUMBER, dimension: this.bounded(node, () => powerDimension(first.dimension, root)) };
      }
      default: {
        const wrong = types.findIndex((type) => type.dimension !== DIMENSIONLESS);
        const argument = node.args[wrong];
        if (!argument) return NUMBER;
        const found = words((types[wrong] ?? NUMBER).dimension);
        return this.fail(
          'dimension',
          argument,
          `${node.fn} takes a plain number, and ${this.quote(argument)} is ${found}`,
        );
      }
    }
  }

  /** The common type of several values; the literal 0 goes with anything. */
  private alike(node: FormulaNode, types: readonly Working[], say: (a: string, b: string) => string): Working {
    let common = types[0] ?? NUMBER;
    for (const type of types.slice(1)) {
      if (type.zero) continue;
      if (common.zero) {
        common = type;
        continue;
      }
      if (type.dimension !== common.dimension) {
        this.fail('dimension', node, say(words(common.dimension), words(type.dimension)));
      }
      if (type.temperature !== common.temperature) {
        if (type.temperature && common.temperature) {
          this.fail('temperature', node, say(temperatureWords(common.temperature), temperatureWords(type.temperature)));
        }
        common = { ...common, temperature: common.temperature ?? type.temperature };
      }
    }
    return common;
  }

  /** Keeps exponents small, so that no formula can make ever new dimensions. */
  private bounded(node: FormulaNode, make: () => Dimension): Dimension {
    let dimension: Dimension | undefined;
    try {
      dimension = make();
    } catch (error) {
      if (!(error instanceof RangeError)) throw error;
    }
    if (dimension?.exponents.every((e) => Math.abs(e.n) <= LARGEST_EXPONENT && e.d <= LARGEST_EXPONENT))
      return dimension;
    return this.fail('exponent', node, `${this.quote(node)} has a unit with exponents beyond ${LARGEST_EXPONENT}`);
  }

  private declared(): string {
    const names = [...this.scope.keys()];
    if (names.length === 0) return 'no names are declared here';
    const shown = names.slice(0, 12).join(', ');
    return `the declared names are ${shown}${names.length > 12 ? ' …' : ''}`;
  }

  private quote(node: FormulaNode): string {
    const text = this.formula.text.slice(node.from, node.to);
    return `"${text.length > 60 ? `${text.slice(0, 57)}…` : text}"`;
  }

  private fail(code: FormulaErrorCode, node: FormulaNode, message: string): never {
    throw new Mismatch({ code, message, from: node.from, to: node.to });
  }
}

/** The value of an exponent that reads no name, such as -1/4. */
function constantValue(node: FormulaNode): number | undefined {
  const outcome = evaluateFormula({ text: '', root: node, names: [] }, new Map());
  return outcome.ok ? outcome.value : undefined;
}
