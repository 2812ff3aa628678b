import type { EntityKinds, Patch } from '@shared/contract';
import { checkAnalysis, knownDimension } from '../analysis-ports';
import { Refusal } from '../refusal';
import type { Study } from '../study';
import { refuseBrokenUsers } from './analyses';
import { usersOf } from './quantities';
import { pathUp } from './requirements';
import { refuseUnfit } from './verifications';

/**
 * Refuses what taking an edit back would bring back into a study that has moved on without it: a reference to something
 * removed, a circle, a pair or code used twice, a dimension that others no longer expect.
 */
export function refuseUnsound(study: Study, entries: Patch): void {
  for (const entry of entries) {
    switch (entry.kind) {
      case 'element':
        elementHolds(study, study.get('element', entry.id));
        break;
      case 'requirement':
        requirementHolds(study, study.get('requirement', entry.id));
        break;
      case 'trace':
        traceHolds(study, study.get('trace', entry.id));
        break;
      case 'quantity':
        quantityHolds(study, study.get('quantity', entry.id), entry.after);
        break;
      case 'analysis':
        analysisHolds(study, study.get('analysis', entry.id), entry.after);
        break;
      case 'verification':
        verificationHolds(study, study.get('verification', entry.id));
        break;
      case 'policy':
        policyHolds(study, study.get('policy', entry.id));
        break;
      default:
        break;
    }
  }
}

function unsound(sentence: string): Refusal {
  return new Refusal('conflict', `${sentence} Edit by hand what should be as before.`, {
    field: 'revision',
    expected: 'an edit that nothing was built on',
  });
}

function allocationHolds(study: Study, key: string, elementId: string | null): void {
  if (elementId && !study.get('element', elementId))
    throw unsound(`${key} was allocated to an element that has been removed since.`);
}

function elementHolds(study: Study, element: EntityKinds['element'] | undefined): void {
  if (!element) return;
  if (study.find('element', 'key', element.key).length > 1)
    throw unsound(`The code ${element.key} has been given to another element since.`);
  const above = new Set([element.id]);
  for (let parentId = element.parentId; parentId; parentId = study.get('element', parentId)?.parentId ?? null) {
    if (!study.get('element', parentId))
      throw unsound(`${element.key} was part of an element that has been removed since.`);
    if (above.has(parentId)) throw unsound(`${element.key} would come to lie below itself in the product tree.`);
    above.add(parentId);
  }
}

function requirementHolds(study: Study, requirement: EntityKinds['requirement'] | undefined): void {
  if (!requirement) return;
  allocationHolds(study, requirement.key, requirement.elementId);
  if (requirement.budget && !requirement.limit)
    throw unsound(`${requirement.key} has been given a budget since, which needs its limit.`);
  for (const verification of study.find('verification', 'requirementId', requirement.id))
    verificationHolds(study, verification);
}

function traceHolds(study: Study, trace: EntityKinds['trace'] | undefined): void {
  if (!trace) return;
  const parent = study.get('requirement', trace.parentId);
  const child = study.get('requirement', trace.childId);
  if (!parent || !child || parent.state === 'withdrawn' || child.state === 'withdrawn')
    throw unsound('One end of the link in the flow-down has been withdrawn since.');
  if (study.find('trace', 'parentId', parent.id).filter(({ childId }) => childId === child.id).length > 1)
    throw unsound(`${child.key} has been linked below ${parent.key} again since.`);
  if (pathUp(study, parent.id, child.id)) throw unsound(`${parent.key} lies below ${child.key} in the flow-down now.`);
}

/** `until` is the state that is taken back, which others may have come to rest on. */
function quantityHolds(
  study: Study,
  quantity: EntityKinds['quantity'] | undefined,
  until: EntityKinds['quantity'] | null,
): void {
  if (!quantity) return;
  allocationHolds(study, quantity.key, quantity.elementId);
  if (!until) return;
  const same =
    knownDimension(until.unit) === knownDimension(quantity.unit) && until.temperature === quantity.temperature;
  const users = same ? [] : usersOf(study, quantity.id);
  if (users.length > 0)
    throw unsound(`${quantity.key} has come to be used by ${users.join(', ')} in the dimension it has now.`);
}

function analysisHolds(
  study: Study,
  analysis: EntityKinds['analysis'] | undefined,
  until: EntityKinds['analysis'] | null,
): void {
  if (!analysis) return;
  allocationHolds(study, analysis.key, analysis.elementId);
  orUnsound(`${analysis.key} would no longer hold together`, () => {
    checkAnalysis(study, analysis);
    if (until) refuseBrokenUsers(study, until, analysis);
  });
}

function orUnsound(sentence: string, check: () => void): void {
  try {
    check();
  } catch (error) {
    if (!(error instanceof Refusal)) throw error;
    throw unsound(`${sentence}: ${error.message}`);
  }
}

function verificationHolds(study: Study, verification: EntityKinds['verification'] | undefined): void {
  if (!verification) return;
  const requirement = study.get('requirement', verification.requirementId);
  if (!requirement || requirement.state === 'withdrawn')
    throw unsound('The requirement of the verification has been withdrawn since.');
  const linked = study.find('verification', 'requirementId', requirement.id);
  const same = linked.filter(
    ({ analysisId, output }) =>
      analysisId !== null && analysisId === verification.analysisId && output === verification.output,
  );
  if (same.length > 1) throw unsound(`The same output has been linked to ${requirement.key} again since.`);
  if (linked.filter(({ deciding }) => deciding).length > 1)
    throw unsound(`Another verification of ${requirement.key} has been marked as deciding since.`);
  // A link to a requirement that has lost its limit decides nothing, and its verdict says so.
  if (requirement.limit)
    orUnsound(`A verification of ${requirement.key} would no longer hold`, () => refuseUnfit(study, verification));
}

function policyHolds(study: Study, policy: EntityKinds['policy'] | undefined): void {
  if (!policy) return;
  const rows = study
    .all('policy')
    .filter(({ parameter, maturity }) => parameter === policy.parameter && maturity === policy.maturity);
  if (rows.length > 1)
    throw unsound(`Another margin policy has been written for ${policy.parameter} at ${policy.maturity} since.`);
}
