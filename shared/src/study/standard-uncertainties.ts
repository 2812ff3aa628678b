import type { Model } from '@shared/engine';

/** Above this many nodes it is quicker to go through all uncertain inputs than to look up what is upstream of each node. */
const FEW_NODES = 64;

/**
 * Standard uncertainties in SI of several nodes: first order over their independent uncertain inputs (JCGM 100:2008,
 * 5.1.2); null for a node that rests on no uncertain input. One sweep of the model an input, whatever the number of
 * nodes; a node's figure is the same to the bit whatever other nodes are asked with it.
 */
export function standardsOf(
  model: Model,
  uncertain: ReadonlyMap<string, number>,
  nodes: readonly string[],
): Map<string, number | null> {
  const variances = new Map<string, number | null>(nodes.map((node) => [node, null]));
  const add = (node: string, slope: number, standard: number): void => {
    variances.set(node, (variances.get(node) ?? 0) + (slope * standard) ** 2);
  };
  for (const input of relevantInputs(model, uncertain, nodes)) {
    const standard = uncertain.get(input);
    if (standard === undefined) continue;
    // An external result is an input itself.
    if (variances.has(input)) add(input, 1, standard);
    const reached = model.dependantsOf(input).filter((node) => variances.has(node));
    if (reached.length === 0) continue;
    model.slopes(reached, input).forEach((slope, i) => {
      if (slope !== null) add(reached[i] as string, slope, standard);
    });
  }
  return new Map([...variances].map(([node, variance]) => [node, variance === null ? null : Math.sqrt(variance)]));
}

/** Uncertain inputs that may bear on the nodes, sorted, so that sums are always formed in the same order. */
function relevantInputs(model: Model, uncertain: ReadonlyMap<string, number>, nodes: readonly string[]): string[] {
  if (nodes.length > FEW_NODES) return [...uncertain.keys()].filter((input) => model.has(input)).sort();
  const upstream = new Set(nodes.flatMap((node) => [node, ...model.inputsOf(node)]));
  return [...upstream].filter((input) => uncertain.has(input)).sort();
}
