import type { CommandOf, Patch } from '@shared/contract';
import type { Study } from '../study';
import { CHAIR, OWNER, edit } from './small-study';

/** Sends those of the requirements that are in preparation to review, as their owner. */
export function sendToReview(study: Study, ...requirementIds: readonly string[]): void {
  for (const id of requirementIds) {
    const requirement = study.get('requirement', id);
    if (requirement?.state === 'in preparation')
      edit(study, OWNER, { type: 'requirement.submit', id, version: requirement.version });
  }
}

/** Reviews requirements, then takes a baseline of them as the chair; gives the patch of the taking. */
export function takeBaseline(
  study: Study,
  requirementIds: readonly string[],
  more: Partial<CommandOf<'baseline.take'>> = {},
): Patch {
  sendToReview(study, ...requirementIds);
  return edit(study, CHAIR, {
    type: 'baseline.take',
    name: 'Concept',
    review: 'Concept review',
    note: '',
    requirementIds: [...requirementIds],
    quantityIds: [],
    openItems: 'listed',
    ...more,
  });
}
