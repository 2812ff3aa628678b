import {
  checkFormula,
  evaluateFormula,
  formulaTex,
  isFormulaName,
  nameTex,
  parseFormula,
  type Typed,
} from '@shared/formula';
import { type Dimension, describeDimension, describeWithArticle, parseUnit, siUnitOf } from '@shared/units';
import { type TypedLine, splitLine } from './analysis-text';
import type { Source } from './sources';

/** What the engine says of one line while it is typed. */
export interface CheckedLine {
  readonly id: number;
  readonly name: string;
  /** The line typeset, empty as long as it cannot be read. */
  readonly tex: string;
  readonly result: {
    readonly si: number;
    readonly unit: string;
    readonly temperature: 'absolute' | 'difference';
  } | null;
  /** Why it is refused, with the range of the typed text that it is about. */
  readonly problem: { readonly message: string; readonly from: number; readonly to: number } | null;
  /** A name the line uses that is bound to nothing yet. */
  readonly missing: string;
  readonly unitProblem: string;
  /** Why there is no number although the line is right: an input without value, a division by zero. */
  readonly failure: string;
}

/** An input of the lines with what it is bound to, where that is known. */
export interface BoundInput {
  readonly name: string;
  readonly source: Source | undefined;
}

/** Checks and computes lines from top to bottom, by the same engine as the server; values in SI. */
export function checkLines(lines: readonly TypedLine[], inputs: readonly BoundInput[]): readonly CheckedLine[] {
  const scope = new Map<string, Typed>();
  const values = new Map<string, number>();
  const broken = new Map<string, number>();
  for (const { name, source } of inputs) {
    if (source === undefined) continue;
    scope.set(name, typeOf(source.dimension, source.temperature));
    if (source.si !== null) values.set(name, source.si);
  }
  return lines.map((line, index) => {
    const checked = checkLine(line, index, scope, values, broken);
    if (checked.problem !== null && checked.name !== '') broken.set(checked.name, index + 1);
    return checked;
  });
}

function checkLine(
  line: TypedLine,
  index: number,
  scope: Map<string, Typed>,
  values: Map<string, number>,
  broken: ReadonlyMap<string, number>,
): CheckedLine {
  const { name, expression, at } = splitLine(line.text);
  const plain: CheckedLine = {
    id: line.id,
    name,
    tex: '',
    result: null,
    problem: null,
    missing: '',
    unitProblem: '',
    failure: '',
  };
  if (line.text.trim() === '') return plain;
  const refuse = (message: string, from: number, to: number, more: Partial<CheckedLine> = {}): CheckedLine => ({
    ...plain,
    ...more,
    problem: { message: `Line ${index + 1}: ${message.replace(/\.$/, '')}.`, from, to },
  });
  if (name === '') {
    return refuse('name what it gives, as in m_p = m_0 - m_f', 0, line.text.length);
  }
  const start = line.text.indexOf(name);
  if (!isFormulaName(name)) {
    return refuse(`“${name}” is a word of the formula language; choose another name`, start, start + name.length);
  }
  if (scope.has(name)) {
    return refuse(`${name} is already an input or an earlier line; choose another name`, start, start + name.length);
  }
  const parsed = parseFormula(expression);
  if (!parsed.ok) return refuse(parsed.error.message, at + parsed.error.from, at + parsed.error.to);
  const tex = `${nameTex(name)} = ${formulaTex(parsed.formula)}`;
  const checked = checkFormula(parsed.formula, scope);
  if (!checked.ok) {
    const { code, from, to } = checked.error;
    const unknown = code === 'undeclared-name' ? expression.slice(from, to) : '';
    const culprit = broken.get(unknown);
    const message =
      culprit !== undefined
        ? `${unknown} is not known until line ${culprit} is right`
        : unknown !== ''
          ? `${unknown} is bound to nothing yet: bind it as an input, or write a line that gives it above`
          : checked.error.message;
    return refuse(message, at + from, at + to, { tex, missing: culprit === undefined ? unknown : '' });
  }
  scope.set(name, checked.type);
  const { dimension, temperature = 'absolute' } = checked.type;
  const unit = unitOfLine(line, dimension);
  const outcome = evaluateFormula(parsed.formula, values);
  if (outcome.ok) values.set(name, outcome.value);
  return {
    ...plain,
    tex,
    unitProblem: unit.problem,
    result: outcome.ok ? { si: outcome.value, unit: unit.unit, temperature } : null,
    failure: outcome.ok ? '' : outcome.failure.message,
  };
}

/** The unit that a line is shown in, and what is wrong with the one that was typed. */
function unitOfLine(line: TypedLine, dimension: Dimension): { readonly unit: string; readonly problem: string } {
  const coherent = siUnitOf(dimension);
  const typed = line.unit.trim();
  if (typed === '') return { unit: coherent, problem: '' };
  const parsed = parseUnit(typed);
  if (!parsed.ok) return { unit: coherent, problem: parsed.message };
  if (parsed.unit.dimension === dimension) return { unit: typed, problem: '' };
  const right = coherent === '' || coherent === '1' ? 'none' : coherent;
  return {
    unit: coherent,
    problem: `${typed} is a unit of ${describeDimension(parsed.unit.dimension)}; the line is ${describeWithArticle(dimension)}, right would be ${right}.`,
  };
}

function typeOf(dimension: Dimension, temperature: 'absolute' | 'difference'): Typed {
  return siUnitOf(dimension) === 'K' ? { dimension, temperature } : { dimension };
}
