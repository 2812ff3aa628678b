import type { Baseline } from '@shared/contract';
import { type Apply, freshId, nextKey, referred, revised } from '../edit-context';
import { Refusal, invalid } from '../refusal';

/**
 * Takes a baseline: the chosen requirements become baselined and the chosen quantities controlled. The digest of the
 * snapshot is filled in by the commit, which alone knows the derived state.
 */
export const takeBaseline: Apply<'baseline.take'> = (study, command, context) => {
  for (const id of command.requirementIds) {
    const requirement = referred(study, 'requirement', 'requirementIds', id);
    if (requirement.state === 'withdrawn')
      throw new Refusal('state', `${requirement.key} is withdrawn and cannot be baselined.`, {
        field: 'requirementIds',
        value: requirement.key,
        expected: 'requirements in force',
      });
    if (requirement.state === 'in preparation')
      throw new Refusal(
        'state',
        `${requirement.key} is in preparation; submit it for review first, or leave it out of the baseline.`,
        { field: 'requirementIds', value: requirement.key, expected: 'a requirement in review' },
      );
    if (requirement.openItem && command.openItems === 'refused') {
      throw invalid(
        'requirementIds',
        requirement.key,
        `${requirement.key} is still to be resolved; resolve it, leave it out, or list open items in the baseline.`,
      );
    }
    if (requirement.state !== 'baselined') revised(study, 'requirement', requirement, { state: 'baselined' });
  }
  for (const id of command.quantityIds) {
    const quantity = referred(study, 'quantity', 'quantityIds', id);
    if (quantity.state !== 'controlled') revised(study, 'quantity', quantity, { state: 'controlled' });
  }
  const baseline: Baseline = {
    id: freshId(study, 'baseline', command, context),
    version: 1,
    key: nextKey(study, 'B'),
    name: command.name,
    review: command.review,
    note: command.note,
    takenBy: context.actorId,
    at: context.at,
    revision: context.revision,
    digest: '',
    openItems: command.openItems,
  };
  study.put('baseline', baseline);
};
