import type { Analysis, Binding, ProofLine, Shown } from '@shared/contract';
import { constantById } from '@shared/constants';
import type { Outcome } from '@shared/engine';
import { evaluateFormula, formulaTex, formulaTexWithValues, nameTex, parseFormula } from '@shared/formula';
import type { Method, MethodPort, ProofLine as MethodLine } from '@shared/methods';
import type { TemperatureKind } from '@shared/units';
import { methodInputs, methodOf } from '../analysis-ports';
import { sourceNode } from '../model';
import type { Proof } from '../prove';
import { typedTex, valueTex, withUnitTex } from './number-tex';
import { chainBehind, constantTex, gapTex, linesBehind, outcomeOf, portOf, sourceTex } from './proof-sources';

/** A line before it is numbered. */
type Line = Omit<ProofLine, 'number'>;

/** Numbered proof lines of some outputs of an analysis, beginning with the analyses that feed it. */
export function proofLines(proof: Proof, analysis: Analysis, outputs: readonly string[]): ProofLine[] {
  return numbered(chainBehind(proof, analysis, outputs).flatMap((step) => linesOf(proof, step.analysis, step.outputs)));
}

/** Numbered proof lines of all outputs of one analysis, without what feeds it. */
export function ownProofLines(proof: Proof, analysis: Analysis): ProofLine[] {
  const outputs = new Set(
    analysis.kind === 'method'
      ? (methodOf(analysis)?.outputs ?? []).map(({ name }) => name)
      : [...analysis.lines, ...analysis.results].map(({ name }) => name),
  );
  return numbered(linesOf(proof, analysis, outputs));
}

function numbered(lines: readonly Line[]): ProofLine[] {
  return lines.map((line, index) => ({ number: index + 1, ...line }));
}

function linesOf(proof: Proof, analysis: Analysis, outputs: ReadonlySet<string>): Line[] {
  switch (analysis.kind) {
    case 'formula':
      return formulaLines(proof, analysis, outputs);
    case 'method':
      return methodLines(proof, analysis, outputs);
    case 'external':
      return analysis.results.filter(({ name }) => outputs.has(name)).map((result) => externalLine(analysis, result));
  }
}

function formulaLines(proof: Proof, analysis: Analysis, outputs: ReadonlySet<string>): Line[] {
  const bound = new Map(analysis.inputs.map(({ name, from }) => [name, from]));
  const numberOf = (name: string): string => {
    const from = bound.get(name) ?? { analysisId: analysis.id, output: name };
    return sourceTex(proof, from);
  };
  return linesBehind(analysis.lines, outputs).map((line) => {
    const port = portOf(proof, analysis, line.name);
    const outcome = outcomeOf(proof, analysis, line.name);
    return {
      label: line.label,
      ...typeset(nameTex(line.name), line.expression, nameTex, numberOf),
      ...resultOf(outcome, port?.unit ?? line.unit, port?.temperature),
      analysis: analysis.key,
    };
  });
}

/** A formula with its symbols and with numbers in their place. Factors stand side by side as symbols, with × as numbers. */
function typeset(
  left: string,
  expression: string,
  symbolOf: (name: string) => string,
  numberOf: (name: string) => string,
): Pick<Line, 'symbols' | 'numbers'> {
  const parsed = parseFormula(expression);
  if (!parsed.ok) return { symbols: left, numbers: '' };
  const symbols = formulaTex(parsed.formula, symbolOf).replace(/ \\cdot (?=[^0-9])/g, '\\,');
  const numbers = formulaTexWithValues(parsed.formula, numberOf).replaceAll(' \\cdot ', ' \\times ');
  return { symbols: `${left} = ${symbols}`, numbers: numbers === symbols ? '' : numbers };
}

function resultOf(
  outcome: Outcome,
  unit: string,
  temperature: TemperatureKind | undefined,
): Pick<Line, 'result' | 'failure'> {
  return outcome.ok
    ? { result: shown(outcome.value, unit, temperature), failure: '' }
    : { result: null, failure: outcome.failure.message };
}

function shown(si: number, unit: string, temperature: TemperatureKind | undefined): Shown {
  return temperature === 'difference' ? { si, unit, difference: true } : { si, unit };
}

function externalLine(analysis: Analysis, result: Analysis['results'][number]): Line {
  const { text, unit, si } = result.value;
  const typed = typedTex(text);
  return {
    label: `${result.label || result.name}, from ${result.document}`,
    symbols: nameTex(result.name),
    numbers: typed ? withUnitTex(typed, unit) : valueTex(si, unit),
    result: { si, unit },
    failure: '',
    analysis: analysis.key,
  };
}

function methodLines(proof: Proof, analysis: Analysis, outputs: ReadonlySet<string>): Line[] {
  const method = methodOf(analysis);
  if (!method) {
    const [output = ''] = outputs;
    const { result, failure } = resultOf(outcomeOf(proof, analysis, output), '', undefined);
    return [{ label: analysis.name, symbols: nameTex(output), numbers: '', result, failure, analysis: analysis.key }];
  }
  const ports = methodInputs(
    method,
    analysis.inputs.map(({ name }) => name),
  );
  const written = writtenLines(method, ports);
  const missing = [...outputs].some((output) => !written.some(({ name }) => name === output));
  return written.length === 0 || missing
    ? equationLines(proof, analysis, method, ports, outputs)
    : readableLines(proof, analysis, method, ports, linesBehind(written, outputs));
}

/** The readable lines that a method brings, for the number of repeated items that are bound. */
function writtenLines(method: Method, ports: readonly MethodPort[]): readonly MethodLine[] {
  if (!method.group || !method.proofFor) return method.proof ?? [];
  return method.proofFor((ports.length - method.inputs.length) / method.group.ports.length);
}

function readableLines(
  proof: Proof,
  analysis: Analysis,
  method: Method,
  ports: readonly MethodPort[],
  lines: readonly MethodLine[],
): Line[] {
  const symbols = new Map<string, string>();
  const numbers = new Map<string, string>();
  const values = new Map<string, number>();
  for (const port of ports) {
    const value = inputValue(proof, analysis.inputs, port);
    if (value !== undefined) values.set(port.name, value);
    symbols.set(port.name, port.tex);
    numbers.set(port.name, inputTex(proof, analysis.inputs, port));
  }
  for (const id of method.constants ?? []) {
    const constant = constantById(id);
    if (!constant) continue;
    symbols.set(constant.symbol, constant.tex);
    numbers.set(constant.symbol, constantTex(id));
    values.set(constant.symbol, constant.value);
  }
  return lines.map((line) => {
    const port = method.outputs.find(({ name }) => name === line.name);
    const unit = port?.unit ?? line.unit;
    const outcome = port ? outcomeOf(proof, analysis, line.name) : evaluated(line.expression, values);
    const set = typeset(
      line.tex,
      line.expression,
      (name) => symbols.get(name) ?? nameTex(name),
      (name) => numbers.get(name) ?? nameTex(name),
    );
    symbols.set(line.name, line.tex);
    if (outcome.ok) values.set(line.name, outcome.value);
    const { temperature } = port ?? {};
    numbers.set(line.name, outcome.ok ? valueTex(outcome.value, unit, { temperature }) : gapTex(outcome));
    return { label: port?.label ?? '', ...set, ...resultOf(outcome, unit, temperature), analysis: analysis.key };
  });
}

function evaluated(expression: string, values: ReadonlyMap<string, number>): Outcome {
  const parsed = parseFormula(expression);
  if (parsed.ok) return evaluateFormula(parsed.formula, values);
  return { ok: false, failure: { code: 'refused', message: parsed.error.message, origin: '' } };
}

/** Value of a method's input as TeX; what is not bound has the method's own default. */
function inputTex(proof: Proof, inputs: readonly Binding[], port: MethodPort): string {
  const binding = inputs.find(({ name }) => name === port.name);
  if (binding) return sourceTex(proof, binding.from);
  return port.default === undefined ? '' : valueTex(port.default, port.unit, { temperature: port.temperature });
}

function inputValue({ model }: Proof, inputs: readonly Binding[], port: MethodPort): number | undefined {
  const binding = inputs.find(({ name }) => name === port.name);
  if (!binding) return port.default;
  const outcome = model.outcome(sourceNode(binding.from));
  return outcome.ok ? outcome.value : undefined;
}

/** A method without readable lines: its inputs, its equation, its outputs. */
function equationLines(
  proof: Proof,
  analysis: Analysis,
  method: Method,
  ports: readonly MethodPort[],
  outputs: ReadonlySet<string>,
): Line[] {
  const plain = { result: null, failure: '', analysis: analysis.key };
  return [
    ...ports.map((port) => ({
      label: port.label,
      symbols: port.tex,
      numbers: inputTex(proof, analysis.inputs, port),
      ...plain,
    })),
    { label: method.name, symbols: method.equation, numbers: '', ...plain },
    ...method.outputs
      .filter(({ name }) => outputs.has(name))
      .map((port) => ({
        ...plain,
        label: port.label,
        symbols: port.tex,
        numbers: '',
        ...resultOf(outcomeOf(proof, analysis, port.name), port.unit, port.temperature),
      })),
  ];
}
