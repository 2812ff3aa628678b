import type { CommandOf, Quantity } from '@shared/contract';
import { describeDimension } from '@shared/units';
import { checkBounds } from '@shared/methods';
import { boundsOf, knownDimension } from '../analysis-ports';
import {
  type Apply,
  type EditContext,
  freshId,
  given,
  nextKey,
  referred,
  refuseControlled,
  revised,
  target,
} from '../edit-context';
import { a, readMeasure, readUncertainty, unitDimension } from '../measures';
import { Refusal, invalid } from '../refusal';
import type { Study } from '../study';

/** Adds a quantity with its unit, and its value if it has one. */
export const createQuantity: Apply<'quantity.create'> = (study, command, context) => {
  const { type: _type, id: _id, value, uncertainty, ...fields } = command;
  if (fields.elementId) referred(study, 'element', 'elementId', fields.elementId);
  const dimension = unitDimension('unit', fields.unit);
  const quantity: Quantity = {
    ...fields,
    id: freshId(study, 'quantity', command, context),
    version: 1,
    key: nextKey(study, 'Q'),
    value: value ? readMeasure('value', value, dimension, fields.temperature) : null,
    uncertainty: readUncertainty('uncertainty', uncertainty, dimension),
    ownerId: context.actorId,
    state: 'working',
  };
  refuseOutOfBounds(quantity);
  study.put('quantity', quantity);
};

/** Refuses a value outside the physical bounds of the quantity's kind, and a kind of another dimension. */
function refuseOutOfBounds(quantity: Quantity): void {
  if (!quantity.kind) return;
  const found = boundsOf(quantity.kind);
  if (!found) throw invalid('kind', quantity.kind, 'choose a kind from the list, or none.');
  const expected = knownDimension(found.kind.unit);
  if (expected !== knownDimension(quantity.unit)) {
    throw invalid(
      'unit',
      quantity.unit,
      `${found.name} is ${a(describeDimension(expected))}; choose a unit of that, such as ${found.kind.unit}.`,
    );
  }
  if (!quantity.value || !found.kind.bounds) return;
  const problem = checkBounds(quantity.value.si, found.kind.bounds);
  if (problem) throw invalid('value', `${quantity.value.text} ${quantity.value.unit}`, `${found.name}: ${problem}`);
}

function refuseUnlessEditable(quantity: Quantity, context: EditContext): void {
  if (quantity.state === 'controlled') refuseControlled(context, quantity.key, 'is controlled');
}

/** Sets value, uncertainty, basis or source of a quantity. */
export const setQuantity: Apply<'quantity.set'> = (study, command, context) => {
  const quantity = target(study, 'quantity', command);
  refuseUnlessEditable(quantity, context);
  const dimension = knownDimension(quantity.unit);
  const next: Quantity = {
    ...quantity,
    value: command.value ? readMeasure('value', command.value, dimension, quantity.temperature) : null,
    uncertainty:
      command.uncertainty === undefined
        ? quantity.uncertainty
        : readUncertainty('uncertainty', command.uncertainty, dimension),
    basis: command.basis ?? quantity.basis,
    source: command.source ?? quantity.source,
  };
  refuseOutOfBounds(next);
  revised(study, 'quantity', quantity, next);
};

/** Changes what a quantity is; its dimension stays as long as an analysis uses it. */
export const reviseQuantity: Apply<'quantity.revise'> = (study, command, context) => {
  const quantity = target(study, 'quantity', command);
  refuseUnlessEditable(quantity, context);
  const { value, uncertainty, ...changes } = command.changes as Partial<CommandOf<'quantity.create'>>;
  if (changes.elementId) referred(study, 'element', 'changes.elementId', changes.elementId);
  const unit = changes.unit ?? quantity.unit;
  const dimension = unitDimension('changes.unit', unit);
  const temperature = changes.temperature ?? quantity.temperature;
  const moved = dimension !== knownDimension(quantity.unit) || temperature !== quantity.temperature;
  const users = usersOf(study, quantity.id);
  if (moved && users.length > 0)
    throw invalid(
      'changes.unit',
      unit,
      `${quantity.key} is ${a(describeDimension(knownDimension(quantity.unit)))} and is used by ${users.join(', ')}; its dimension cannot change while it is.`,
    );
  const kept = value === undefined ? quantity.value && { text: quantity.value.text, unit: quantity.value.unit } : value;
  const next: Quantity = {
    ...quantity,
    ...given(changes as Partial<Quantity>),
    value: kept ? readMeasure('changes.value', kept, dimension, temperature) : null,
    uncertainty:
      uncertainty === undefined
        ? moved
          ? null
          : quantity.uncertainty
        : readUncertainty('changes.uncertainty', uncertainty, dimension),
  };
  refuseOutOfBounds(next);
  revised(study, 'quantity', quantity, next);
};

/** Keys of the analyses that use a quantity. */
export function usersOf(study: Study, quantityId: string): string[] {
  return study
    .all('analysis')
    .filter((analysis) =>
      analysis.inputs.some((input) => 'quantityId' in input.from && input.from.quantityId === quantityId),
    )
    .map((analysis) => analysis.key);
}

/** Removes a quantity that no analysis uses. */
export const removeQuantity: Apply<'quantity.remove'> = (study, command, context) => {
  const quantity = target(study, 'quantity', command);
  refuseUnlessEditable(quantity, context);
  const users = usersOf(study, quantity.id);
  if (users.length > 0)
    throw new Refusal('in-use', `${quantity.key} is used by ${users.join(', ')}. Bind these to something else first.`, {
      field: 'id',
      value: quantity.key,
      expected: 'a quantity that no analysis uses',
    });
  study.remove('quantity', quantity.id);
};
