import type { Invitation, PersonChange } from '@shared/contract';
import type { Role } from '@shared/contract';
import { type Transaction, UniqueConstraintError } from 'sequelize';
import { invitationMessage, oneTimeLink } from '../../mail/messages';
import { queueMail } from '../../mail/outbox';
import type { SignedInPerson } from '../../middleware/access';
import { Conflict, Invalid, NotFound, Stale } from '../../middleware/problems';
import { Membership, Person, Study } from '../../models';
import type { Services } from '../../services';
import { issueToken, voidTokens } from './one-time-links';
import { writeAudit } from './people-audit';
import { personAnswer } from './people-views';

export interface NewPerson {
  readonly email: string;
  readonly name: string;
  /** Without one the person cannot sign in until an invitation is accepted. */
  readonly password?: string;
  readonly administrator?: boolean;
  readonly demonstration?: boolean;
  /** Roles by study key. */
  readonly memberships?: readonly { readonly study: string; readonly roles: readonly Role[] }[];
}

/**
 * Creates a person with their roles, without any mail: for seeding, for the first administrator and as the first half of
 * an invitation. Throws Conflict when the address is taken, Invalid when a study does not exist.
 */
export async function createPerson(
  services: Pick<Services, 'passwords'>,
  transaction: Transaction,
  person: NewPerson,
  actorId: string | null = null,
): Promise<Person> {
  const passwordHash = person.password === undefined ? null : await services.passwords.hash(person.password);
  const created = await insertPerson(transaction, {
    email: person.email,
    name: person.name,
    passwordHash,
    administrator: person.administrator ?? false,
    demonstration: person.demonstration ?? false,
  });
  await writeAudit(
    transaction,
    'person.created',
    { actorId, subjectId: created.id },
    { administrator: created.administrator },
  );
  for (const [index, { study: key, roles }] of (person.memberships ?? []).entries()) {
    const study = await Study.findOne({ where: { key }, transaction });
    if (study === null) {
      throw new Invalid([
        {
          field: `memberships.${index}.study`,
          value: key,
          message: 'there is no such study',
          expected: 'the key of a study',
        },
      ]);
    }
    await setRoles(transaction, study.id, created.id, roles, actorId);
  }
  return created;
}

async function insertPerson(transaction: Transaction, values: Partial<Person>): Promise<Person> {
  try {
    return await Person.create(values as Record<string, unknown>, {
      transaction,
      fields: ['id', 'email', 'name', 'passwordHash', 'administrator', 'demonstration'],
      returning: true,
    });
  } catch (error) {
    if (!(error instanceof UniqueConstraintError)) throw error;
    throw new Conflict('Somebody with this address is here already.', [
      {
        field: 'email',
        value: values.email,
        message: 'belongs to somebody who is here already',
        expected: 'another address',
      },
    ]);
  }
}

/** Invites somebody: the person, their roles, the one-time link and its mail in one transaction. Returns the person's id. */
export async function invitePerson(
  services: Services,
  inviter: SignedInPerson,
  invitation: Invitation,
): Promise<string> {
  const id = await services.sequelize.transaction(async (transaction) => {
    const person = await createPerson(services, transaction, invitation, inviter.id);
    await sendInvitation(services, transaction, inviter, person);
    return person.id;
  });
  services.mailSender.wake();
  return id;
}

/** Sends a fresh invitation and voids the earlier one; throws Conflict when the person has accepted already. */
export async function inviteAgain(services: Services, inviter: SignedInPerson, personId: string): Promise<void> {
  await services.sequelize.transaction(async (transaction) => {
    const person = await lockPerson(transaction, personId);
    if (person.passwordHash !== null) throw new Conflict(`${person.name} has accepted the invitation already.`);
    await sendInvitation(services, transaction, inviter, person);
  });
  services.mailSender.wake();
}

async function sendInvitation(
  services: Services,
  transaction: Transaction,
  inviter: SignedInPerson,
  person: Person,
): Promise<void> {
  const { sequelize, config } = services;
  const memberships = await Membership.findAll({ where: { personId: person.id }, transaction });
  const studies = await Study.findAll({
    where: { id: memberships.map(({ studyId }) => studyId) },
    order: ['key'],
    transaction,
  });
  const token = await issueToken(sequelize, transaction, 'invite', person.id);
  const link = oneTimeLink(config.publicUrl, 'invitation', token);
  const names = studies.map(({ name }) => name);
  await queueMail(transaction, person.email, invitationMessage(person.name, inviter.name, names, link));
  await writeAudit(transaction, 'person.invited', { actorId: inviter.id, subjectId: person.id });
}

/**
 * Renames, disables or enables a person, or gives or takes administration. Throws Stale with the current state, and
 * Conflict for what would leave the product without an administrator or the actor without access.
 */
export async function changePerson(
  services: Services,
  actor: SignedInPerson,
  personId: string,
  { version, ...change }: PersonChange,
): Promise<void> {
  const { sequelize } = services;
  await sequelize.transaction(async (transaction) => {
    const person = await lockPerson(transaction, personId);
    if (person.version !== version) throw new Stale(await personAnswer(sequelize, personId, transaction));
    const losesAdministration = person.administrator && (change.administrator === false || change.disabled === true);
    if (person.id === actor.id && (change.disabled === true || losesAdministration)) {
      throw new Conflict('You cannot disable yourself or give up administration yourself; ask another administrator.');
    }
    const privilegeMoves = change.administrator !== undefined && change.administrator !== person.administrator;
    await person.update({ ...change, version: version + 1 }, { transaction });
    if (privilegeMoves || change.disabled === true) await endSessions(services, transaction, personId);
    if (change.disabled === true) {
      await voidTokens(sequelize, transaction, 'reset', personId);
      await voidTokens(sequelize, transaction, 'invite', personId);
    }
    await writeAudit(transaction, 'person.changed', { actorId: actor.id, subjectId: personId }, change);
  });
}

/** Gives a person exactly these roles in a study; none takes them out of it. */
export async function setMemberRoles(
  transaction: Transaction,
  actor: SignedInPerson,
  studyId: string,
  personId: string,
  roles: readonly Role[],
): Promise<void> {
  await lockPerson(transaction, personId);
  await setRoles(transaction, studyId, personId, roles, actor.id);
}

async function setRoles(
  transaction: Transaction,
  studyId: string,
  personId: string,
  roles: readonly Role[],
  actorId: string | null,
): Promise<void> {
  const before = await Membership.findOne({ where: { studyId, personId }, transaction });
  if (roles.length === 0) await before?.destroy({ transaction });
  else if (before !== null) await before.update({ roles: [...roles] }, { transaction });
  else {
    await Membership.create(
      { studyId, personId, roles: [...roles] },
      { transaction, fields: ['studyId', 'personId', 'roles'] },
    );
  }
  const detail = { before: before?.roles ?? [], after: roles };
  await writeAudit(transaction, 'roles.set', { actorId, subjectId: personId, studyId }, detail);
}

/** Ends every session of a person; triggers tell all server processes to close the person's live streams. */
export async function endSessions(services: Services, transaction: Transaction, personId: string): Promise<void> {
  await services.sequelize.query('DELETE FROM sessions WHERE person_id = $1', { bind: [personId], transaction });
}

/** The person's row, locked to the end of the transaction; throws NotFound. */
export async function lockPerson(transaction: Transaction, personId: string): Promise<Person> {
  const person = await Person.findByPk(personId, { transaction, lock: transaction.LOCK.UPDATE });
  if (person === null) throw new NotFound('There is no such person.');
  return person;
}
