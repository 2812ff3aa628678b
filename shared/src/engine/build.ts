import { CheckTable } from './checks';
import { TapeCompiler } from './compile';
import type { BuildResult, FormulaSpec, ModelSpec } from './model';
import { orderOf, type Item } from './order';
import { Kind, Propagation, type FunctionNode, type Program } from './propagation';
import { TapeModel } from './tape-model';

/** Orders, compiles and computes a model. Formulas come parsed; nothing is parsed here. */
export function buildModel(spec: ModelSpec): BuildResult {
  const order = orderOf(spec);
  if (!order.ok) return order;
  const ids = order.items.flatMap((item) => item.provides);
  const rankOf = new Map(ids.map((id, rank) => [id, rank]));
  for (const check of spec.checks ?? []) {
    if (!rankOf.has(check.node)) return { ok: false, unknown: check.node, in: check.id };
  }

  const { program, slots, constants } = compileProgram(spec, order.items, ids, rankOf);
  const values = new Float64Array(slots).fill(NaN);
  values.set(constants, ids.length);
  const checks = new CheckTable(spec.checks ?? [], rankOf, ids.length);
  const propagation = new Propagation(program, values, checks);
  for (const { id, value } of spec.inputs) propagation.write(rankOf.get(id) ?? -1, value);
  propagation.recompute();
  return { ok: true, model: new TapeModel(program, rankOf, propagation, checks) };
}

interface Compiled {
  readonly program: Program;
  readonly slots: number;
  readonly constants: readonly number[];
}

function compileProgram(
  spec: ModelSpec,
  items: readonly Item[],
  ids: readonly string[],
  rankOf: ReadonlyMap<string, number>,
): Compiled {
  const nodes = ids.length;
  const compiler = new TapeCompiler(nodes);
  const kinds = new Uint8Array(nodes);
  const codeStarts = new Int32Array(nodes + 1);
  const readStarts = new Int32Array(nodes + 1);
  const reads: number[] = [];
  const formulas: (FormulaSpec | undefined)[] = [];
  const functions = new Map<number, FunctionNode>();
  const inputLabels: string[] = [];

  let rank = 0;
  for (const item of items) {
    const first = reads.length;
    for (const id of item.reads) reads.push(rankOf.get(id) as number);
    const formula = item.kind === 'formula' ? spec.formulas[item.index] : undefined;
    const fn = item.kind === 'function' ? spec.functions[item.index] : undefined;
    const input = item.kind === 'input' ? spec.inputs[item.index] : undefined;
    if (formula) {
      const { names, root } = formula.formula;
      formulas[rank] = formula;
      compiler.compile(root, rank, (name) => reads[first + names.indexOf(name)] as number);
    }
    if (fn && fn.outputs.length > 0) {
      functions.set(rank, { id: fn.id, label: fn.label ?? fn.id, outputs: fn.outputs.length, compute: fn.compute });
    }
    if (input) inputLabels[rank] = input.label ?? input.id;
    for (let k = 0; k < item.provides.length; k++) {
      kinds[rank + k] = formula ? Kind.Formula : !fn ? Kind.Input : k === 0 ? Kind.Function : Kind.FurtherOutput;
      codeStarts[rank + k + 1] = compiler.length;
      readStarts[rank + k + 1] = reads.length;
    }
    rank += item.provides.length;
  }

  const tape = compiler.finish();
  const readRanks = Int32Array.from(reads);
  const { starts, targets } = transpose(readStarts, readRanks, nodes);
  const program: Program = {
    ids,
    kinds,
    code: tape.code,
    codeStarts,
    readStarts,
    reads: readRanks,
    dependantStarts: starts,
    dependants: targets,
    formulas,
    functions,
    inputLabels,
  };
  return { program, slots: nodes + tape.constants.length + tape.temporaries, constants: tape.constants };
}

/** From "which ranks each rank reads" to "which ranks read each rank", both in compressed rows. */
function transpose(starts: Int32Array, reads: Int32Array, nodes: number): { starts: Int32Array; targets: Int32Array } {
  const counted = new Int32Array(nodes + 1);
  for (const source of reads) counted[source + 1] = (counted[source + 1] as number) + 1;
  for (let i = 0; i < nodes; i++) counted[i + 1] = (counted[i + 1] as number) + (counted[i] as number);
  const next = counted.slice();
  const targets = new Int32Array(reads.length);
  for (let reader = 0; reader < nodes; reader++) {
    for (let i = starts[reader] as number; i < (starts[reader + 1] as number); i++) {
      const source = reads[i] as number;
      targets[next[source] as number] = reader;
      next[source] = (next[source] as number) + 1;
    }
  }
  return { starts: counted, targets };
}
