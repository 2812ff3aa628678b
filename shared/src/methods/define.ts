import { formatSi } from '@shared/units';
import { checkBounds } from './bounds';
import type { Method, MethodGroup, MethodPort, MethodResult, ProofLine } from './types';

/** A refusal of a method: which input is at fault and what would be right. */
export class Refusal {
  constructor(
    readonly message: string,
    readonly input?: string,
  ) {}
}

/** Refuses to compute, naming the input port at fault in a sentence that says what would be right. */
export function refuse(input: string, message: string): Refusal {
  return new Refusal(message, input);
}

type PortSpec = Omit<MethodPort, 'name'>;
type Values<Names extends string> = Readonly<Record<Names, number>>;

interface Aids<Item extends string> {
  /** Repeated inputs, one record an item, in order. */
  items: readonly Values<Item>[];
  /** Adds a sentence to the warnings of the result. */
  warn(text: string): void;
}

interface MethodSpec<In extends string, Out extends string, Item extends string> extends Omit<
  Method,
  'inputs' | 'outputs' | 'group' | 'compute'
> {
  inputs: Record<In, PortSpec>;
  outputs: Record<Out, PortSpec>;
  group?: Omit<MethodGroup, 'ports'> & { ports: Record<Item, PortSpec> };
  solve(inputs: Values<In>, aids: Aids<Item>): Record<NoInfer<Out>, number> | Refusal;
}

/**
 * Makes a method of the library from its declaration. The resulting compute() fills in optional inputs, refuses missing,
 * non-finite and out-of-bound values naming the port, runs `solve`, and refuses results beyond double precision.
 */
export function defineMethod<In extends string, Out extends string, Item extends string = never>(
  spec: MethodSpec<In, Out, Item>,
): Method {
  const { inputs, outputs, group, solve, ...card } = spec;
  const inputPorts = named(inputs);
  const outputPorts = named(outputs);
  const itemPorts = group ? named(group.ports) : [];

  function compute(given: Readonly<Record<string, number>>): MethodResult {
    const read = readPorts(inputPorts, given, '');
    if (read instanceof Refusal) return failure(read);
    const items: Values<Item>[] = [];
    if (group) {
      const count = countItems(itemPorts, given, group.atMost);
      if (count < group.atLeast) {
        const first = itemPorts[0]?.name ?? '';
        return failure(
          refuse(`${first}_${count + 1}`, `${group.label}: give at least ${group.atLeast}, ${count} given.`),
        );
      }
      for (let index = 1; index <= count; index += 1) {
        const item = readPorts(itemPorts, given, `_${index}`);
        if (item instanceof Refusal) return failure(item);
        items.push(item as Values<Item>);
      }
    }
    const warnings: string[] = [];
    const solved = solve(read as Values<In>, { items, warn: (text) => void warnings.push(text) });
    if (solved instanceof Refusal) return failure(solved);
    for (const port of outputPorts) {
      if (!Number.isFinite(solved[port.name as Out])) {
        return { ok: false, message: `The ${port.label} leaves the range of double precision with these inputs.` };
      }
    }
    return { ok: true, outputs: solved, warnings };
  }

  const method: Method = { ...card, inputs: inputPorts, outputs: outputPorts, compute };
  if (group) method.group = { ...group, ports: itemPorts };
  return method;
}

/** One line of a proof. */
export function line(name: string, tex: string, expression: string, unit: string): ProofLine {
  return { name, tex, expression, unit };
}

function named(ports: Record<string, PortSpec>): MethodPort[] {
  return Object.entries(ports).map(([name, port]) => ({ name, ...port }));
}

function failure(refusal: Refusal): MethodResult {
  return refusal.input === undefined
    ? { ok: false, message: refusal.message }
    : { ok: false, input: refusal.input, message: refusal.message };
}

function readPorts(
  ports: readonly MethodPort[],
  given: Readonly<Record<string, number>>,
  suffix: string,
): Record<string, number> | Refusal {
  const values: Record<string, number> = {};
  for (const port of ports) {
    const name = port.name + suffix;
    const value = given[name] ?? port.default;
    if (value === undefined)
      return refuse(name, `The ${port.label} (${name}) is missing; bind a value in ${port.unit}.`);
    if (!Number.isFinite(value)) return refuse(name, `The ${port.label} (${name}) must be a finite number.`);
    const broken = port.bounds ? checkBounds(value, port.bounds, (si) => show(si, port.unit)) : null;
    if (broken !== null) return refuse(name, `The ${port.label} (${name}) is ${show(value, port.unit)}: it ${broken}.`);
    values[port.name] = value;
  }
  return values;
}

/** A value in SI shown in a unit, for messages. */
export function show(si: number, unit: string): string {
  return formatSi(si, unit);
}

function countItems(ports: readonly MethodPort[], given: Readonly<Record<string, number>>, atMost: number): number {
  let count = 0;
  for (let index = 1; index <= atMost; index += 1) {
    if (ports.some((port) => given[`${port.name}_${index}`] !== undefined)) count = index;
  }
  return count;
}
