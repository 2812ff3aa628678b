import type { Patch } from '@shared/contract';
import { usersOf } from './apply/quantities';
import { Refusal } from './refusal';
import type { Study } from './study';

/** Refuses a patch that removes something which other entities still refer to. */
export function refuseDangling(study: Study, patch: Patch): void {
  for (const entry of patch) {
    if (entry.after !== null) continue;
    const users = referrersOf(study, entry.kind, entry.id);
    if (users.length > 0) {
      const label = entry.before && 'key' in entry.before ? entry.before.key : `the ${entry.kind}`;
      throw new Refusal('in-use', `${label} is still used by ${users.join(', ')}. Unlink it there first.`, {
        field: 'id',
        value: entry.id,
        expected: 'something that nothing refers to',
      });
    }
  }
}

function referrersOf(study: Study, kind: string, id: string): string[] {
  switch (kind) {
    case 'element':
      return [
        ...study.find('element', 'parentId', id).map((child) => child.key),
        ...study.find('requirement', 'elementId', id).map((requirement) => requirement.key),
        ...study.find('quantity', 'elementId', id).map((quantity) => quantity.key),
      ];
    case 'requirement':
      return [
        ...study
          .find('trace', 'parentId', id)
          .map((trace) => study.get('requirement', trace.childId)?.key ?? 'a trace'),
        ...study
          .find('trace', 'childId', id)
          .map((trace) => study.get('requirement', trace.parentId)?.key ?? 'a trace'),
        ...study.find('verification', 'requirementId', id).map(() => 'its verification'),
        ...study.find('departure', 'requirementId', id).map((departure) => departure.key),
      ];
    case 'quantity':
      return usersOf(study, id);
    case 'analysis':
      return [
        ...study
          .all('analysis')
          .filter((user) => user.inputs.some((input) => 'analysisId' in input.from && input.from.analysisId === id))
          .map((user) => user.key),
        ...study
          .find('verification', 'analysisId', id)
          .map((verification) => study.get('requirement', verification.requirementId)?.key ?? 'a verification'),
      ];
    default:
      return [];
  }
}
