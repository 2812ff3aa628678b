import type { MembershipAnswer, PeopleAnswer, PersonAnswer, StudyMember } from '@shared/contract';
import type { Role } from '@shared/contract';
import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import { NotFound } from '../../middleware/problems';

interface PersonRow extends Omit<PersonAnswer, 'memberships'> {
  readonly memberships: MembershipAnswer[] | null;
}

const PERSON_ROWS = `
  SELECT p.id, p.name, p.email, p.administrator, p.disabled, p.password_hash IS NULL AS invited, p.version,
         (SELECT json_agg(json_build_object(
                   'study', json_build_object('id', s.id, 'key', s.key, 'name', s.name), 'roles', m.roles) ORDER BY s.key)
            FROM memberships m JOIN studies s ON s.id = m.study_id WHERE m.person_id = p.id) AS memberships
    FROM people p`;

/** Everybody with all their roles, and the studies in which roles can be granted: the administrator's page. */
export async function peopleAnswer(sequelize: Sequelize): Promise<PeopleAnswer> {
  const rows = await sequelize.query<PersonRow>(`${PERSON_ROWS} ORDER BY p.name, p.email`, { type: QueryTypes.SELECT });
  const studies = await sequelize.query<PeopleAnswer['studies'][number]>(
    'SELECT id, key, name FROM studies ORDER BY key',
    { type: QueryTypes.SELECT },
  );
  return { people: rows.map(asAnswer), studies };
}

/** One person as the administrator sees them; throws NotFound. */
export async function personAnswer(
  sequelize: Sequelize,
  personId: string,
  transaction?: Transaction,
): Promise<PersonAnswer> {
  const [row] = await sequelize.query<PersonRow>(`${PERSON_ROWS} WHERE p.id = $1`, {
    bind: [personId],
    type: QueryTypes.SELECT,
    transaction,
  });
  if (row === undefined) throw new NotFound('There is no such person.');
  return asAnswer(row);
}

function asAnswer(row: PersonRow): PersonAnswer {
  return { ...row, memberships: row.memberships ?? [] };
}

/** Names and roles of a study's members, as every member may see them: to choose owners and to know the board. */
export async function studyMembers(sequelize: Sequelize, studyId: string): Promise<StudyMember[]> {
  return sequelize.query<{ id: string; name: string; roles: Role[] }>(
    `SELECT p.id, p.name, m.roles FROM memberships m JOIN people p ON p.id = m.person_id
      WHERE m.study_id = $1 AND NOT p.disabled ORDER BY p.name`,
    { bind: [studyId], type: QueryTypes.SELECT },
  );
}

/** The studies and roles of one person. */
export async function membershipsOf(sequelize: Sequelize, personId: string): Promise<MembershipAnswer[]> {
  const rows = await sequelize.query<{ id: string; key: string; name: string; roles: Role[] }>(
    `SELECT s.id, s.key, s.name, m.roles FROM memberships m JOIN studies s ON s.id = m.study_id
      WHERE m.person_id = $1 ORDER BY s.key`,
    { bind: [personId], type: QueryTypes.SELECT },
  );
  return rows.map(({ roles, ...study }) => ({ study, roles }));
}
