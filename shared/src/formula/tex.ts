import type { CallNode, CompareOperator, Formula, FormulaNode } from './ast';
import type { FunctionName } from './functions';
import { nameTex as defaultNameTex } from './name-tex';

/** How tightly a piece of TeX holds together; a piece looser than its place asks for gets parentheses. */
enum Tightness {
  Condition,
  Comparison,
  Sum,
  Sign,
  Product,
  Power,
  Atom,
}

interface Piece {
  readonly tex: string;
  readonly tightness: Tightness;
}

const COMPARE_TEX: Readonly<Record<CompareOperator, string>> = {
  '<': '<',
  '<=': '\\le',
  '>': '>',
  '>=': '\\ge',
  '==': '=',
  '!=': '\\ne',
};

const FUNCTION_TEX: Readonly<Partial<Record<FunctionName, string>>> = {
  exp: '\\exp',
  log: '\\ln',
  log10: '\\log_{10}',
  log2: '\\log_{2}',
  sin: '\\sin',
  cos: '\\cos',
  tan: '\\tan',
  asin: '\\arcsin',
  acos: '\\arccos',
  atan: '\\arctan',
  sinh: '\\sinh',
  cosh: '\\cosh',
  tanh: '\\tanh',
  min: '\\min',
  max: '\\max',
  sign: '\\operatorname{sgn}',
  asinh: '\\operatorname{arsinh}',
  acosh: '\\operatorname{arcosh}',
  atanh: '\\operatorname{artanh}',
};

/** The formula as TeX with its names, safe for KaTeX with trust off. */
export function formulaTex(formula: Formula, nameTex: (name: string) => string = defaultNameTex): string {
  const name = (text: string): Piece => ({ tex: nameTex(text), tightness: Tightness.Atom });
  return new Typesetter(name).piece(formula.root).tex;
}

/** The formula as TeX with values in place of names; `valueTex` gives each value with its unit. */
export function formulaTexWithValues(formula: Formula, valueTex: (name: string) => string): string {
  const name = (text: string): Piece => {
    const tex = valueTex(text);
    const plain = /^[0-9.]+$/.test(tex);
    const negative = /^\s*[-\u2212]/.test(tex);
    return { tex, tightness: plain ? Tightness.Atom : negative ? Tightness.Sum : Tightness.Product };
  };
  return new Typesetter(name).piece(formula.root).tex;
}

class Typesetter {
  constructor(private readonly name: (name: string) => Piece) {}

  piece(node: FormulaNode): Piece {
    switch (node.kind) {
      case 'number':
        return numberPiece(node.digits);
      case 'name':
        return this.name(node.name);
      case 'negate':
        return { tex: `-${this.at(node.operand, Tightness.Product)}`, tightness: Tightness.Sign };
      case 'binary':
        return this.binary(node.op, node.left, node.right);
      case 'compare': {
        const links = node.operands.map((operand, i) => {
          const sign = i === 0 ? '' : ` ${COMPARE_TEX[node.ops[i - 1] ?? '==']} `;
          return sign + this.at(operand, Tightness.Sum);
        });
        return { tex: links.join(''), tightness: Tightness.Comparison };
      }
      case 'conditional': {
        const yes = `${this.piece(node.whenTrue).tex} & \\text{if } ${this.piece(node.condition).tex}`;
        const no = `${this.piece(node.whenFalse).tex} & \\text{otherwise}`;
        return { tex: `\\begin{cases} ${yes} \\\\ ${no} \\end{cases}`, tightness: Tightness.Condition };
      }
      case 'call':
        return this.call(node);
    }
  }

  /** The TeX of a node where `least` tightness is needed, in parentheses when it holds less tightly. */
  private at(node: FormulaNode, least: Tightness): string {
    const { tex, tightness } = this.piece(node);
    return tightness >= least ? tex : `\\left(${tex}\\right)`;
  }

  private binary(op: string, left: FormulaNode, right: FormulaNode): Piece {
    switch (op) {
      case '+':
        return {
          tex: `${this.at(left, Tightness.Sum)} + ${this.at(right, Tightness.Product)}`,
          tightness: Tightness.Sum,
        };
      case '-':
        return {
          tex: `${this.at(left, Tightness.Sum)} - ${this.at(right, Tightness.Product)}`,
          tightness: Tightness.Sum,
        };
      case '*': {
        const tex = `${this.at(left, Tightness.Sign)} \\cdot ${this.at(right, Tightness.Product)}`;
        return { tex, tightness: Tightness.Product };
      }
      case '/':
        return { tex: `\\frac{${this.piece(left).tex}}{${this.piece(right).tex}}`, tightness: Tightness.Product };
      default:
        return { tex: `${this.at(left, Tightness.Atom)}^{${this.exponent(right)}}`, tightness: Tightness.Power };
    }
  }

  /** Fractions in an exponent stand on the line: x^{1/4}. */
  private exponent(node: FormulaNode): string {
    if (node.kind !== 'binary' || node.op !== '/') return this.piece(node).tex;
    return `${this.at(node.left, Tightness.Product)}/${this.at(node.right, Tightness.Power)}`;
  }

  private call(node: CallNode): Piece {
    const [first, second] = node.args;
    const inner = first ? this.piece(first).tex : '';
    const atom = (tex: string): Piece => ({ tex, tightness: Tightness.Atom });
    switch (node.fn) {
      case 'sqrt':
        return atom(`\\sqrt{${inner}}`);
      case 'cbrt':
        return atom(`\\sqrt[3]{${inner}}`);
      case 'abs':
        return atom(`\\left|${inner}\\right|`);
      case 'floor':
        return atom(`\\left\\lfloor ${inner} \\right\\rfloor`);
      case 'ceil':
        return atom(`\\left\\lceil ${inner} \\right\\rceil`);
      case 'hypot':
        return atom(`\\sqrt{${node.args.map((argument) => `${this.at(argument, Tightness.Atom)}^{2}`).join(' + ')}}`);
      case 'log1p':
        return this.function('\\ln', `1 + ${first ? this.at(first, Tightness.Product) : ''}`);
      case 'expm1':
        return { tex: `\\exp\\left(${inner}\\right) - 1`, tightness: Tightness.Sum };
      case 'atan2':
        return this.function('\\operatorname{atan2}', `${inner},\\, ${second ? this.piece(second).tex : ''}`);
      default: {
        const name = FUNCTION_TEX[node.fn] ?? `\\operatorname{${node.fn}}`;
        return this.function(name, node.args.map((argument) => this.piece(argument).tex).join(',\\, '));
      }
    }
  }

  private function(name: string, inside: string): Piece {
    // Looser than an atom: under a power the whole call is put in parentheses.
    return { tex: `${name}\\left(${inside}\\right)`, tightness: Tightness.Power };
  }
}

function numberPiece(digits: string): Piece {
  const [mantissa = '', exponent] = digits.split(/[eE]/);
  if (exponent === undefined) return { tex: mantissa, tightness: Tightness.Atom };
  const power = `10^{${Number(exponent)}}`;
  if (Number(mantissa) === 1) return { tex: power, tightness: Tightness.Power };
  return { tex: `${mantissa} \\cdot ${power}`, tightness: Tightness.Product };
}
