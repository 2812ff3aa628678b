import type { Element, Measure, MeasureInput } from '@shared/contract';
import { type Apply, freshId, given, labelOf, referred, revised, target } from '../edit-context';
import { readMeasure } from '../measures';
import { Refusal, invalid } from '../refusal';
import { refuseReservedPrefix } from './requirements';

/** Changes the study's settings. */
export const configureStudy: Apply<'study.configure'> = (study, command) => {
  const settings = target(study, 'study', command);
  revised(study, 'study', settings, given(command.changes));
};

/** Adds a row to the margin policy; one row per parameter and maturity. */
export const createPolicy: Apply<'policy.create'> = (study, command, context) => {
  const { type: _type, id: _id, absolute, ...fields } = command;
  const same = study
    .all('policy')
    .find((row) => row.parameter === fields.parameter && row.maturity === fields.maturity);
  if (same)
    throw invalid(
      'parameter',
      fields.parameter,
      `there is already a row for ${fields.parameter} at maturity ${fields.maturity}; revise that one.`,
    );
  study.put('policy', {
    id: freshId(study, 'policy', command, context),
    version: 1,
    ...fields,
    absolute: readAbsoluteMargin(absolute),
  });
};

/** Changes a row of the margin policy. */
export const revisePolicy: Apply<'policy.revise'> = (study, command) => {
  const { percent, definition, source } = command;
  const absolute = readAbsoluteMargin(command.absolute);
  revised(study, 'policy', target(study, 'policy', command), { percent, absolute, definition, source });
};

/** Reads a required margin: a difference above zero. Commands kept from before there were absolute margins have none. */
function readAbsoluteMargin(input: MeasureInput | null | undefined): Measure | null {
  if (!input) return null;
  const absolute = readMeasure('absolute', input, null, 'difference');
  if (!(absolute.si > 0))
    throw invalid('absolute', `${input.text} ${input.unit}`.trim(), 'a margin above zero is needed, or none.');
  return absolute;
}

/** Removes a row of the margin policy. */
export const removePolicy: Apply<'policy.remove'> = (study, command) => {
  study.remove('policy', target(study, 'policy', command).id);
};

/** Adds an element to the product tree. */
export const createElement: Apply<'element.create'> = (study, command, context) => {
  refuseReservedPrefix(command.key, 'key');
  if (study.byKey('element', command.key))
    throw invalid('key', command.key, 'the code is taken by another element; choose one that is free.');
  if (command.parentId) referred(study, 'element', 'parentId', command.parentId);
  study.put('element', {
    id: freshId(study, 'element', command, context),
    version: 1,
    key: command.key,
    name: command.name,
    parentId: command.parentId,
    description: command.description,
  });
};

/** Renames or moves an element; it cannot come to lie below itself. */
export const reviseElement: Apply<'element.revise'> = (study, command) => {
  const element = target(study, 'element', command);
  const changes = given(command.changes);
  if (changes.parentId) {
    let above: Element | undefined = referred(study, 'element', 'changes.parentId', changes.parentId);
    while (above) {
      if (above.id === element.id) {
        throw new Refusal(
          'cycle',
          `${element.key} cannot be moved below ${labelOf(study, 'element', study.held('element', changes.parentId))}, which is part of it.`,
          {
            field: 'changes.parentId',
            value: changes.parentId,
            expected: 'an element outside the part that is moved',
          },
        );
      }
      above = above.parentId ? study.get('element', above.parentId) : undefined;
    }
  }
  revised(study, 'element', element, changes);
};

/** Removes an element that nothing is below or allocated to. */
export const removeElement: Apply<'element.remove'> = (study, command) => {
  const element = target(study, 'element', command);
  const users = [
    ...study.find('element', 'parentId', element.id).map((child) => child.key),
    ...study.find('requirement', 'elementId', element.id).map((requirement) => requirement.key),
    ...study.find('quantity', 'elementId', element.id).map((quantity) => quantity.key),
    ...study
      .all('analysis')
      .filter((analysis) => analysis.elementId === element.id)
      .map((analysis) => analysis.key),
  ];
  if (users.length > 0) {
    throw new Refusal(
      'in-use',
      `${element.key} still holds ${users.slice(0, 8).join(', ')}${users.length > 8 ? ' …' : ''}. Move or remove these first.`,
      {
        field: 'id',
        value: element.key,
        expected: 'an element that nothing is allocated to',
      },
    );
  }
  study.remove('element', element.id);
};
