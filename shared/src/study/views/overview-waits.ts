import { mayGive, type ChangeRequest, type OverviewView } from '@shared/contract';
import { isOpen } from '../change-requests';
import { isChecked } from './analyses-view';
import { isInConflict } from './proposed-edits';
import { byKey, provenOf, requirementsInForce } from './verdict-view';
import { personRef, type ViewContext } from './view-context';

type Wait = OverviewView['waits'][number];

/** What waits for this person, by role and state: votes and decisions first, then signatures, then own requirements and requests. */
export function waitsFor(context: ViewContext): Wait[] {
  return [
    ...votes(context),
    ...dispositions(context),
    ...departures(context),
    ...checks(context),
    ...ownRequirements(context),
    ...ownChanges(context),
  ];
}

function changes({ proof }: ViewContext): ChangeRequest[] {
  return proof.study.all('change').filter(isOpen).sort(byKey);
}

function dueNote({ due }: ChangeRequest): string {
  return due ? `due ${due}` : 'no due day';
}

function votes(context: ViewContext): Wait[] {
  if (!mayGive('change.vote', context.roles)) return [];
  return changes(context)
    .filter(({ state, authorId }) => state === 'before the board' && authorId !== context.me.id)
    .filter((change) => !change.votes.some(({ personId }) => personId === context.me.id))
    .map((change) => ({
      key: change.key,
      what: `Vote: ${change.title}`,
      note: dueNote(change),
      route: `changes/${change.key}`,
    }));
}

function dispositions(context: ViewContext): Wait[] {
  if (!mayGive('change.dispose', context.roles)) return [];
  const { quorum } = context.proof.study.settings;
  return changes(context)
    .filter(({ state, authorId }) => state === 'before the board' && authorId !== context.me.id)
    .filter((change) => change.votes.filter(({ vote }) => vote === 'for').length >= quorum)
    .map((change) => ({
      key: change.key,
      what: `Dispose of: ${change.title}`,
      note: `${change.votes.length} voted, quorum of ${quorum} reached`,
      route: `changes/${change.key}`,
    }));
}

function departures(context: ViewContext): Wait[] {
  if (!mayGive('departure.decide', context.roles)) return [];
  const { study } = context.proof;
  return study
    .all('departure')
    .filter(({ state, requestedBy }) => state === 'requested' && requestedBy !== context.me.id)
    .sort(byKey)
    .flatMap((departure) => {
      const requirement = study.get('requirement', departure.requirementId);
      if (!requirement) return [];
      const what = `Decide on ${departure.kind} from ${requirement.key}: ${departure.title}`;
      const note = `asked by ${personRef(context, departure.requestedBy).name}`;
      return { key: departure.key, what, note, route: `requirements/${requirement.key}` };
    });
}

function checks(context: ViewContext): Wait[] {
  if (!context.roles.includes('analyst')) return [];
  const { study } = context.proof;
  return study
    .all('analysis')
    .filter((analysis) => !isChecked(analysis) && analysis.authorId !== context.me.id)
    .filter(({ id }) => study.find('verification', 'analysisId', id).length > 0)
    .sort(byKey)
    .map(({ key, name, authorId }) => ({
      key,
      what: `Check signature on ${name}`,
      note: `written by ${personRef(context, authorId).name}`,
      route: `analyses/${key}`,
    }));
}

function ownRequirements(context: ViewContext): Wait[] {
  if (!mayGive('requirement.revise', context.roles)) return [];
  const mine = requirementsInForce(context).filter(
    ({ ownerId, coOwnerIds }) => ownerId === context.me.id || coOwnerIds.includes(context.me.id),
  );
  const wait = (key: string, what: string, note: string): Wait => ({ key, what, note, route: `requirements/${key}` });
  return [
    ...mine
      .filter(({ id }) => provenOf(context, id).verdict === 'no evidence')
      .map(({ key, title }) => wait(key, `Plan the verification: ${title}`, 'no evidence')),
    ...mine.filter(({ state }) => state === 'in review').map(({ key, title }) => wait(key, title, 'in review')),
  ];
}

function ownChanges(context: ViewContext): Wait[] {
  return changes(context)
    .filter(({ authorId }) => authorId === context.me.id)
    .flatMap((change) => {
      const { key, title, state, disposition } = change;
      const route = `changes/${key}`;
      if (isInConflict(context.proof.study, change))
        return { key, what: `Resolve the conflict: ${title}`, note: 'what it edits has moved since', route };
      if (state !== 'deferred') return [];
      return { key, what: `Supply what is awaited: ${title}`, note: disposition?.reason || 'deferred', route };
    });
}
