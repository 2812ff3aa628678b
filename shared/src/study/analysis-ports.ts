import type { Analysis, BindingSource } from '@shared/contract';
import { constantById } from '@shared/constants';
import { checkFormula, nameTex, parseFormula, type Typed } from '@shared/formula';
import { methodById, quantityKind, type Method, type MethodPort } from '@shared/methods';
import { describeDimension, parseUnit, siUnitOf, type Dimension } from '@shared/units';
import { a, unitDimension } from './measures';
import { Refusal, invalid } from './refusal';
import type { Study } from './study';

/** A named input or output of an analysis with its dimension, display unit and label. */
export interface Port {
  readonly name: string;
  readonly dimension: Dimension;
  readonly temperature: 'absolute' | 'difference' | undefined;
  readonly unit: string;
  readonly label: string;
  readonly tex: string;
}

/** Dimension of a unit that was checked when it was written. */
export function knownDimension(unit: string): Dimension {
  const parsed = parseUnit(unit);
  if (!parsed.ok) throw new Error(`stored unit “${unit}” is unknown: ${parsed.message}`);
  return parsed.unit.dimension;
}

const KELVIN = siUnitOf(knownDimension('K'));

/** Whether a dimension is temperature, for which absolute and difference are kept apart. */
export function isTemperature(dimension: Dimension): boolean {
  return siUnitOf(dimension) === KELVIN;
}

function tagged(
  dimension: Dimension,
  temperature: 'absolute' | 'difference' | undefined,
): 'absolute' | 'difference' | undefined {
  return isTemperature(dimension) ? (temperature ?? 'absolute') : undefined;
}

/** What a binding source provides, or null when it names nothing in the study. */
export function sourcePort(study: Study, from: BindingSource): (Port & { readonly key: string }) | null {
  if ('quantityId' in from) {
    const quantity = study.get('quantity', from.quantityId);
    if (!quantity) return null;
    const dimension = knownDimension(quantity.unit);
    return {
      name: quantity.symbol,
      key: quantity.key,
      dimension,
      temperature: tagged(dimension, quantity.temperature),
      unit: quantity.unit,
      label: quantity.name,
      tex: nameTex(quantity.symbol),
    };
  }
  if ('analysisId' in from) {
    const analysis = study.get('analysis', from.analysisId);
    const port = analysis && outputsOf(study, analysis).find((output) => output.name === from.output);
    return port ? { ...port, key: `${analysis.key} ${port.name}` } : null;
  }
  const constant = constantById(from.constant);
  if (!constant) return null;
  const dimension = knownDimension(constant.unit);
  return {
    name: constant.symbol,
    key: constant.symbol,
    dimension,
    temperature: tagged(dimension, 'absolute'),
    unit: constant.unit,
    label: constant.name,
    tex: constant.tex,
  };
}

/** The library entry that an analysis pins, in the version it pins. */
export function methodOf(analysis: Analysis): Method | undefined {
  return analysis.method ? methodById(analysis.method.id, analysis.method.version) : undefined;
}

/** Input ports of a method for the number of repeated items that an analysis has bound. */
export function methodInputs(method: Method, bound: readonly string[]): readonly MethodPort[] {
  const { group } = method;
  if (!group) return method.inputs;
  let items = group.atLeast;
  for (const name of bound) {
    const match = /^(.*)_(\d+)$/.exec(name);
    if (match && group.ports.some((port) => port.name === match[1])) items = Math.max(items, Number(match[2]));
  }
  const repeated: MethodPort[] = [];
  for (let i = 1; i <= Math.min(items, group.atMost); i++) {
    for (const port of group.ports) {
      repeated.push({ ...port, name: `${port.name}_${i}`, tex: `{${port.tex}}_{${i}}`, label: `${port.label} ${i}` });
    }
  }
  return [...method.inputs, ...repeated];
}

const portCache = new WeakMap<Analysis, readonly Port[]>();

/** Outputs of an analysis that was accepted: lines, method outputs or external results. Cached by the entity: dimensions of what is in use cannot change. */
export function outputsOf(study: Study, analysis: Analysis): readonly Port[] {
  const cached = portCache.get(analysis);
  if (cached) return cached;
  const ports = deriveOutputs(study, analysis);
  portCache.set(analysis, ports);
  return ports;
}

function deriveOutputs(study: Study, analysis: Analysis): readonly Port[] {
  if (analysis.kind === 'external') {
    return analysis.results.map((result) => {
      const dimension = knownDimension(result.value.unit);
      return {
        name: result.name,
        dimension,
        temperature: tagged(dimension, 'absolute'),
        unit: result.value.unit,
        label: result.label || result.name,
        tex: nameTex(result.name),
      };
    });
  }
  if (analysis.kind === 'method') {
    const method = methodOf(analysis);
    return (method?.outputs ?? []).map((port) => {
      const dimension = knownDimension(port.unit);
      return {
        name: port.name,
        dimension,
        temperature: tagged(dimension, port.temperature),
        unit: port.unit,
        label: port.label,
        tex: port.tex,
      };
    });
  }
  return checkedLines(study, analysis);
}

/** Scope that the lines of a formula analysis see: its bound inputs. Refuses a binding to nothing and a name bound twice. */
function scopeOf(study: Study, analysis: Analysis): Map<string, Typed> {
  const scope = new Map<string, Typed>();
  analysis.inputs.forEach((binding, index) => {
    const field = `inputs[${index}]`;
    const source = sourcePort(study, binding.from);
    if (!source)
      throw invalid(
        `${field}.from`,
        binding.name,
        'it must be a quantity, an analysis output or a constant of this study.',
      );
    if (scope.has(binding.name)) throw invalid(`${field}.name`, binding.name, 'each input name can be bound once.');
    scope.set(
      binding.name,
      source.temperature
        ? { dimension: source.dimension, temperature: source.temperature }
        : { dimension: source.dimension },
    );
  });
  return scope;
}

function checkedLines(study: Study, analysis: Analysis): readonly Port[] {
  const scope = scopeOf(study, analysis);
  return analysis.lines.map((line, index) => {
    const field = `lines[${index}].expression`;
    if (scope.has(line.name))
      throw invalid(
        `lines[${index}].name`,
        line.name,
        'the name is already an input or an earlier line; choose another.',
      );
    const parsed = parseFormula(line.expression);
    if (!parsed.ok)
      throw new Refusal('invalid', `Line ${index + 1}: ${parsed.error.message}`, {
        field,
        value: line.expression,
        range: parsed.error,
      });
    const checked = checkFormula(parsed.formula, scope);
    if (!checked.ok)
      throw new Refusal('invalid', `Line ${index + 1}: ${checked.error.message}`, {
        field,
        value: line.expression,
        range: checked.error,
      });
    const { dimension, temperature } = checked.type;
    if (line.unit && unitDimension(`lines[${index}].unit`, line.unit) !== dimension) {
      throw invalid(
        `lines[${index}].unit`,
        line.unit,
        `line ${index + 1} is ${a(describeDimension(dimension))}; choose a unit of that, such as ${siUnitOf(dimension) || 'none'}.`,
      );
    }
    scope.set(line.name, checked.type);
    return {
      name: line.name,
      dimension,
      temperature: tagged(dimension, temperature),
      unit: line.unit || siUnitOf(dimension),
      label: line.label || line.name,
      tex: nameTex(line.name),
    };
  });
}

/** Refuses an analysis whose definition does not hold together: names, formulas, dimensions, method inputs, cycles. */
export function checkAnalysis(study: Study, analysis: Analysis): void {
  if (analysis.kind === 'formula') {
    if (analysis.lines.length === 0) throw invalid('lines', '', 'a formula analysis needs at least one line.');
    checkedLines(study, analysis);
  } else if (analysis.kind === 'method') {
    checkMethodInputs(study, analysis);
  } else {
    scopeOf(study, analysis);
    if (analysis.results.length === 0) throw invalid('results', '', 'an external analysis needs at least one result.');
    const names = analysis.results.map((result) => result.name);
    const twice = names.find((name, index) => names.indexOf(name) !== index);
    if (twice) throw invalid('results', twice, 'each result name can be used once.');
  }
  refuseCycle(study, analysis);
}

/** "a temperature" or "a temperature difference", which share a dimension and are kept apart. */
export function temperatureInWords(temperature: Port['temperature']): string {
  return temperature === 'difference' ? 'a temperature difference' : 'a temperature';
}

function checkMethodInputs(study: Study, analysis: Analysis): void {
  if (!analysis.method) throw invalid('method', '', 'choose a method of the library.');
  const method = methodOf(analysis);
  if (!method)
    throw invalid(
      'method',
      `${analysis.method.id} ${analysis.method.version}`,
      'choose a method and version of the library.',
    );
  const ports = methodInputs(
    method,
    analysis.inputs.map((binding) => binding.name),
  );
  const scope = scopeOf(study, analysis);
  analysis.inputs.forEach((binding, index) => {
    const port = ports.find((candidate) => candidate.name === binding.name);
    if (!port)
      throw invalid(
        `inputs[${index}].name`,
        binding.name,
        `${method.name} takes ${ports.map((p) => p.name).join(', ')}.`,
      );
    const source = scope.get(binding.name);
    if (!source) throw new Error(`the input ${binding.name} was bound and is not in scope`);
    const { dimension: given, temperature } = source;
    const needed = knownDimension(port.unit);
    if (given !== needed) {
      throw invalid(
        `inputs[${index}].from`,
        sourcePort(study, binding.from)?.key,
        `that is ${a(describeDimension(given))}; ${port.label} (${port.name}) needs ${a(describeDimension(needed))}.`,
      );
    }
    const wanted = tagged(needed, port.temperature);
    if (wanted !== temperature) {
      throw invalid(
        `inputs[${index}].from`,
        sourcePort(study, binding.from)?.key,
        `that is ${temperatureInWords(temperature)}; ${port.label} (${port.name}) needs ${temperatureInWords(wanted)}.`,
      );
    }
  });
  const missing = ports.find((port) => port.default === undefined && !scope.has(port.name));
  if (missing)
    throw invalid(
      `inputs.${missing.name}`,
      '',
      `bind ${missing.label} (${missing.name}) to ${a(describeDimension(knownDimension(missing.unit)))}.`,
    );
}

function refuseCycle(study: Study, analysis: Analysis): void {
  const feeds = (node: Analysis): string[] =>
    node.inputs.flatMap((binding) => ('analysisId' in binding.from ? [binding.from.analysisId] : []));
  const path: Analysis[] = [];
  const seen = new Set<string>();
  const visit = (node: Analysis): void => {
    if (path.some((step) => step.id === node.id)) {
      const loop = [...path.slice(path.findIndex((step) => step.id === node.id)), node];
      throw new Refusal(
        'cycle',
        `This would make a circle: ${loop.map((step) => step.key).join(' needs ')}. An analysis cannot rest on its own result.`,
        {
          field: 'inputs',
          value: loop.map((step) => step.key).join(' → '),
          expected: 'inputs that do not depend on this analysis',
        },
      );
    }
    if (seen.has(node.id)) return;
    path.push(node);
    for (const id of feeds(node)) {
      const next = id === analysis.id ? analysis : study.get('analysis', id);
      if (next) visit(next);
    }
    path.pop();
    seen.add(node.id);
  };
  visit(analysis);
}

/** The physical bounds that belong to a quantity's kind, with the kind's name. */
export function boundsOf(
  kind: string | null,
): { name: string; kind: NonNullable<ReturnType<typeof quantityKind>> } | null {
  const found = kind ? quantityKind(kind) : undefined;
  return found ? { name: found.name, kind: found } : null;
}
