import type { Element, ElementRow, ProductTreeView, Requirement, Verdict } from '@shared/contract';
import { firstToRead } from './reading-order';
import { byKey, provenOf, requirementsInForce } from './verdict-view';
import type { ViewContext } from './view-context';

/** The product tree from the top down, each element with what is allocated to it and the worst verdict at or below it. */
export function productTreeView(context: ViewContext): ProductTreeView {
  const { study } = context.proof;
  const allocated = new Map<string | null, Requirement[]>();
  for (const requirement of requirementsInForce(context)) {
    const list = allocated.get(requirement.elementId) ?? [];
    list.push(requirement);
    allocated.set(requirement.elementId, list);
  }
  const held = (elementId: string | null): ElementRow['requirements'] =>
    (allocated.get(elementId) ?? []).map(({ id, key, title }) => ({
      key,
      title,
      verdict: provenOf(context, id).verdict,
    }));
  const rows = study
    .find('element', 'parentId', null)
    .sort(byKey)
    .flatMap((element) => branch(element, 0));
  return { rows, unallocated: held(null) };

  /** Rows of an element and everything below it; the first row is the element's own. */
  function branch(element: Element, depth: number): ElementRow[] {
    const { id, version, key, name, description, parentId } = element;
    const below = study
      .find('element', 'parentId', id)
      .sort(byKey)
      .map((child) => branch(child, depth + 1));
    const requirements = held(id);
    const verdicts = [...requirements.map(({ verdict }) => verdict), ...below.flatMap(([child]) => child?.worst ?? [])];
    const row: ElementRow = {
      id,
      version,
      key,
      name,
      description,
      parentId,
      depth,
      requirements,
      quantities: study.find('quantity', 'elementId', id).length,
      worst: verdicts.reduce<Verdict | null>((worst, verdict) => (worst ? firstToRead(worst, verdict) : verdict), null),
    };
    return [row, ...below.flat()];
  }
}
