import type { Transaction } from 'sequelize';
import { PeopleAuditLine } from '../../models';

export type PeopleAction =
  | 'person.created'
  | 'person.invited'
  | 'person.accepted'
  | 'person.changed'
  | 'password.reset'
  | 'roles.set'
  | 'session.revoked';

/** Adds a line on what happened to whom by whom, in the transaction of what happened. `detail` holds no secrets. */
export async function writeAudit(
  transaction: Transaction,
  action: PeopleAction,
  who: { readonly actorId: string | null; readonly subjectId: string; readonly studyId?: string },
  detail: Record<string, unknown> = {},
): Promise<void> {
  await PeopleAuditLine.create(
    { action, actorId: who.actorId, subjectId: who.subjectId, studyId: who.studyId ?? null, detail },
    { transaction, fields: ['action', 'actorId', 'subjectId', 'studyId', 'detail'] },
  );
}
