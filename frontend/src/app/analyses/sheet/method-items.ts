import type { MethodGroup } from '@shared/methods';
import type { TypedInput } from '../text/analysis-text';

/** Number of the repeated item that an input belongs to: 2 for mass_2; 0 when it is none of the group. */
function itemOf(name: string, group: MethodGroup): number {
  const [, base, number] = /^(.*)_(\d+)$/.exec(name) ?? [];
  return group.ports.some((port) => port.name === base) ? Number(number) : 0;
}

/** The highest repeated item that is bound. */
export function repeatedPorts(group: MethodGroup, names: readonly string[]): number {
  return Math.max(0, ...names.map((name) => itemOf(name, group)));
}

/** Inputs without those of one repeated item. */
export function withoutItem(inputs: readonly TypedInput[], group: MethodGroup, item: number): readonly TypedInput[] {
  return inputs.filter(({ name }) => itemOf(name, group) !== item);
}

/** Moves the items behind a removed one up by one: mass_3 becomes mass_2. */
export function renumbered(inputs: readonly TypedInput[], group: MethodGroup, removed: number): readonly TypedInput[] {
  return inputs.map((input) => {
    const item = itemOf(input.name, group);
    return item > removed ? { ...input, name: input.name.replace(/_\d+$/, `_${item - 1}`) } : input;
  });
}
