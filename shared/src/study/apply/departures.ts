import type { Departure } from '@shared/contract';
import { type Apply, freshId, nextKey, referred, revised, target } from '../edit-context';
import { Refusal, invalid } from '../refusal';

/** Asks for permission not to meet a requirement; it must be limited in time or to items. */
export const requestDeparture: Apply<'departure.request'> = (study, command, context) => {
  const { type: _type, id: _id, ...fields } = command;
  const requirement = referred(study, 'requirement', 'requirementId', fields.requirementId);
  if (requirement.state !== 'baselined')
    throw invalid(
      'requirementId',
      requirement.key,
      'only a baselined requirement can be departed from; revise this one instead.',
    );
  if (!fields.effectivity && !fields.expires)
    throw invalid('effectivity', '', 'limit the departure to items, or give the day it expires.');
  const departure: Departure = {
    ...fields,
    id: freshId(study, 'departure', command, context),
    version: 1,
    key: nextKey(study, fields.kind === 'deviation' ? 'DEV' : 'WAV'),
    state: 'requested',
    requestedBy: context.actorId,
    decision: null,
  };
  study.put('departure', departure);
};

/** The chair's decision on a departure; not by who asked for it. */
export const decideDeparture: Apply<'departure.decide'> = (study, command, context) => {
  const departure = target(study, 'departure', command);
  if (departure.state !== 'requested')
    throw new Refusal('state', `${departure.key} is already ${departure.state}.`, {
      field: 'id',
      value: departure.key,
      expected: 'a requested departure',
    });
  if (departure.requestedBy === context.actorId)
    throw new Refusal('forbidden', `You asked for ${departure.key}; somebody else decides on it.`, {
      field: 'id',
      value: departure.key,
      expected: 'a departure asked for by somebody else',
    });
  revised(study, 'departure', departure, {
    state: command.decision,
    decision: { personId: context.actorId, at: context.at, reason: command.reason },
  });
};

/** Ends a departure whose time is over. */
export const expireDeparture: Apply<'departure.expire'> = (study, command) => {
  const departure = target(study, 'departure', command);
  if (departure.state !== 'in force')
    throw new Refusal('state', `${departure.key} is ${departure.state}; only one in force can expire.`, {
      field: 'id',
      value: departure.key,
      expected: 'a departure in force',
    });
  revised(study, 'departure', departure, { state: 'expired' });
};
