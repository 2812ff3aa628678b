import type { ModelSpec } from './model';

/** An input, a formula, or a function with all its outputs: what is computed at once. */
export interface Item {
  readonly kind: 'input' | 'formula' | 'function';
  /** Position in its list of the specification. */
  readonly index: number;
  /** Ids of the nodes it provides. */
  readonly provides: readonly string[];
  /** Ids of the nodes it reads, in the order in which it reads them. */
  readonly reads: readonly string[];
}

export type OrderResult =
  | { readonly ok: true; readonly items: readonly Item[] }
  | { readonly ok: false; readonly cycle: readonly string[] }
  | { readonly ok: false; readonly unknown: string; readonly in: string };

/**
 * Puts everything in an order in which each item follows what it reads (Kahn's algorithm, first come first served).
 * Refuses unknown ids and names without a binding, and cycles by their path.
 */
export function orderOf(spec: ModelSpec): OrderResult {
  const items: Item[] = spec.inputs.map(({ id }, index) => ({ kind: 'input', index, provides: [id], reads: [] }));
  for (const [index, { id, formula, bind }] of spec.formulas.entries()) {
    const reads: string[] = [];
    for (const name of formula.names) {
      const bound = bind.get(name);
      if (bound === undefined) return { ok: false, unknown: name, in: id };
      reads.push(bound);
    }
    items.push({ kind: 'formula', index, provides: [id], reads });
  }
  for (const [index, { outputs, inputs }] of spec.functions.entries()) {
    items.push({ kind: 'function', index, provides: outputs, reads: inputs });
  }

  const providers = new Map<string, number>();
  for (const [i, item] of items.entries()) {
    for (const id of item.provides) {
      if (providers.has(id)) throw new Error(`Two nodes of the model have the id ${id}`);
      providers.set(id, i);
    }
  }

  const followers: number[][] = items.map(() => []);
  const waitingFor = new Int32Array(items.length);
  for (const [i, item] of items.entries()) {
    for (const id of item.reads) {
      const provider = providers.get(id);
      if (provider === undefined) return { ok: false, unknown: id, in: nameOf(spec, item) };
      followers[provider]?.push(i);
      waitingFor[i] = (waitingFor[i] ?? 0) + 1;
    }
  }

  const queue: number[] = [];
  for (const i of items.keys()) if (waitingFor[i] === 0) queue.push(i);
  for (let head = 0; head < queue.length; head++) {
    for (const follower of followers[queue[head] as number] ?? []) {
      const left = (waitingFor[follower] ?? 0) - 1;
      waitingFor[follower] = left;
      if (left === 0) queue.push(follower);
    }
  }
  if (queue.length < items.length) {
    const stuck = new Set([...items.keys()].filter((i) => (waitingFor[i] ?? 0) > 0));
    return { ok: false, cycle: cycleAmong(stuck, items, providers) };
  }
  return { ok: true, items: queue.map((i) => items[i] as Item) };
}

function nameOf(spec: ModelSpec, item: Item): string {
  const named = item.kind === 'function' ? spec.functions[item.index] : spec.formulas[item.index];
  return named?.id ?? '';
}

/** Walks back from a stuck item to what it waits for until an item comes again; the ids read on the way are the cycle. */
function cycleAmong(
  stuck: ReadonlySet<number>,
  items: readonly Item[],
  providers: ReadonlyMap<string, number>,
): string[] {
  const [start = 0] = stuck;
  const placeOf = new Map<number, number>();
  const path: string[] = [];
  let at = start;
  while (!placeOf.has(at)) {
    placeOf.set(at, path.length);
    const read = items[at]?.reads.find((id) => stuck.has(providers.get(id) ?? -1)) ?? '';
    path.push(read);
    at = providers.get(read) ?? start;
  }
  return path.slice(placeOf.get(at)).reverse();
}
