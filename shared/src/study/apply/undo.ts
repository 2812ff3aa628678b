import type { EntityKind, EntityKinds, PatchEntry } from '@shared/contract';
import { type Apply, labelOf } from '../edit-context';
import { Refusal } from '../refusal';
import { isControlled } from './analyses';
import { refuseUnsound } from './soundness';

/** Kinds whose direct edits can be taken back by the person who made them. */
const UNDOABLE: readonly EntityKind[] = [
  'policy',
  'element',
  'requirement',
  'trace',
  'quantity',
  'analysis',
  'verification',
];

/** Takes back one earlier edit of one's own, if nothing it touched has moved since. */
export const undoEdit: Apply<'edit.undo'> = (study, command, context) => {
  const entry = context.patchOf(command.revision);
  if (!entry)
    throw new Refusal('not-found', `There is no revision ${command.revision} in this study.`, {
      field: 'revision',
      value: String(command.revision),
      expected: 'a revision of this study',
    });
  if (entry.actorId !== context.actorId)
    throw new Refusal(
      'forbidden',
      `Revision ${command.revision} was made by ${context.personName(entry.actorId)}; you can take back your own edits.`,
      { field: 'revision', value: String(command.revision), expected: 'a revision of your own' },
    );
  for (const change of [...entry.patch].reverse()) undoOne(change);
  refuseUnsound(study, entry.patch);

  function undoOne(change: PatchEntry): void {
    // Counters stay: numbers once issued are never issued again.
    if (change.kind === 'study') {
      const { counters: _before, ...before } = change.before ?? study.settings;
      const { counters: _after, ...after } = change.after ?? study.settings;
      if (JSON.stringify(before) === JSON.stringify(after)) return;
    }
    if (!UNDOABLE.includes(change.kind))
      throw new Refusal(
        'state',
        `Revision ${command.revision} was a step of procedure and cannot be taken back; give the opposite step instead.`,
        { field: 'revision', value: String(command.revision), expected: 'a direct edit' },
      );
    const current = study.get(change.kind, change.id);
    if ((current?.version ?? 0) !== (change.after?.version ?? 0)) {
      const label = current ? labelOf(study, change.kind, current) : 'What it touched';
      throw new Refusal(
        'conflict',
        `${label} has been edited again since revision ${command.revision}; take the later edit back first, or edit it by hand.`,
        { field: 'revision', value: String(command.revision), expected: 'an edit that nothing was built on', current },
      );
    }
    if (current) refuseNowControlled(change, current);
    if (!change.before) {
      study.remove(change.kind, change.id);
      return;
    }
    const version = (change.after?.version ?? change.before.version) + 1;
    study.put(change.kind, { ...change.before, version });
  }

  function refuseNowControlled(change: PatchEntry, current: unknown): void {
    const baselined = change.kind === 'requirement' && (current as EntityKinds['requirement']).state === 'baselined';
    const controlled = change.kind === 'quantity' && (current as EntityKinds['quantity']).state === 'controlled';
    const analysis = change.kind === 'analysis' && isControlled(study, current as EntityKinds['analysis']);
    const verifies =
      change.kind === 'verification' &&
      study.get('requirement', (current as EntityKinds['verification']).requirementId)?.state === 'baselined';
    const adopted =
      change.kind === 'trace' &&
      (current as EntityKinds['trace']).share === 'adopted' &&
      study.get('requirement', (current as EntityKinds['trace']).parentId)?.state === 'baselined';
    if (baselined || controlled || analysis || verifies || adopted)
      throw new Refusal(
        'controlled',
        `What revision ${command.revision} edited is under control now. Raise a change request to propose the opposite.`,
        { field: 'revision', value: String(command.revision), expected: 'an approved change request' },
      );
  }
};
