import type { Role } from '@shared/contract';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { SignedInPerson, StudyAccess, StudyPermission } from './access';
import { Forbidden, NotFound } from './problems';

interface Row {
  readonly id: string;
  readonly key: string;
  readonly name: string;
  readonly revision: string;
  readonly roles: Role[] | null;
}

/**
 * Finds the study by its key and the person's roles in it, in one query per request. Throws the same NotFound for a
 * study that does not exist and for one that the person has no part in, and Forbidden for a member without the role.
 */
export async function accessStudy(
  sequelize: Sequelize,
  key: string,
  person: SignedInPerson,
  permission: StudyPermission,
): Promise<StudyAccess> {
  const [row] = await sequelize.query<Row>(
    `SELECT s.id, s.key, s.name, s.revision, m.roles
       FROM studies s LEFT JOIN memberships m ON m.study_id = s.id AND m.person_id = $2
      WHERE s.key = $1`,
    { bind: [key, person.id], type: QueryTypes.SELECT },
  );
  const forAdministrators = permission === 'administrator' || permission === 'member-or-administrator';
  const member = row !== undefined && row.roles !== null;
  if (row === undefined || !(member || (forAdministrators && person.administrator))) throw new NotFound();
  const study: StudyAccess = {
    id: row.id,
    key: row.key,
    name: row.name,
    revision: Number(row.revision),
    roles: row.roles ?? [],
  };
  if (permission === 'administrator' && !person.administrator) {
    throw new Forbidden('Only an administrator may do this.');
  }
  if (typeof permission === 'object' && !study.roles.some((role) => permission.anyOf.includes(role))) {
    throw new Forbidden(
      `Your roles in ${study.name} are ${study.roles.join(', ')}; this needs ${permission.anyOf.join(' or ')}.`,
    );
  }
  return study;
}
