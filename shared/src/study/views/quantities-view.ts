import type { QuantitiesView, Quantity, QuantityRow } from '@shared/contract';
import { quantityKind } from '@shared/methods';
import { nameTex } from '@shared/formula';
import { describeDimension } from '@shared/units';
import { knownDimension } from '../analysis-ports';
import { pendingChanges } from '../change-requests';
import { quantityNode } from '../model';
import { requirementsByNode } from './verified-nodes';
import { byKey } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

/** The register of quantities, by key, each with what uses it and which verdicts rest on it. */
export function quantitiesView(context: ViewContext): QuantitiesView {
  const { study } = context.proof;
  const usedBy = usersByQuantity(context);
  const bearing = bearsOn(context);
  const pending = pendingChanges(study);
  const rows = study.all('quantity').map((quantity): QuantityRow => {
    const { id, version, key, symbol, name, kind, unit, temperature, value, uncertainty, basis, source } = quantity;
    return {
      id,
      version,
      key,
      symbol,
      tex: nameTex(symbol),
      name,
      kind,
      kindName: (kind && quantityKind(kind)?.name) ?? '',
      dimension: describeDimension(knownDimension(unit)),
      unit,
      temperature,
      value,
      uncertainty,
      basis,
      source,
      elementId: quantity.elementId,
      element: (quantity.elementId && study.get('element', quantity.elementId)?.key) ?? '',
      owner: personRef(context, quantity.ownerId),
      state: quantity.state,
      usedBy: usedBy.get(id) ?? [],
      bearsOn: bearing(quantity),
      changePending: pending.get(id) ?? [],
    };
  });
  return { rows: rows.sort(byKey) };
}

function usersByQuantity({ proof: { study } }: ViewContext): Map<string, string[]> {
  const users = new Map<string, string[]>();
  for (const analysis of study.all('analysis').sort(byKey)) {
    const ids = new Set(analysis.inputs.flatMap(({ from }) => ('quantityId' in from ? [from.quantityId] : [])));
    for (const id of ids) users.set(id, [...(users.get(id) ?? []), analysis.key]);
  }
  return users;
}

/** For a quantity, keys of the requirements in force whose linked outputs follow from it. */
export function bearsOn(context: Pick<ViewContext, 'proof'>): (quantity: Quantity) => string[] {
  const { study, model } = context.proof;
  const verified = requirementsByNode(study);
  return (quantity) => {
    const node = quantityNode(quantity.id);
    if (!model.has(node)) return [];
    const found = new Set(model.dependantsOf(node).flatMap((below) => verified.get(below) ?? []));
    return [...found].sort(byKey).map(({ key }) => key);
  };
}
