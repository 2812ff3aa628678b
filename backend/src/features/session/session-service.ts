import type { InvitationAcceptance, OwnSession, SessionAnswer } from '@shared/contract';
import type { Request } from 'express';
import { QueryTypes, type Transaction } from 'sequelize';
import { oneTimeLink, passwordResetMessage } from '../../mail/messages';
import { queueMail } from '../../mail/outbox';
import type { SignedInPerson } from '../../middleware/access';
import { findByEmail } from '../../middleware/authenticate';
import { Invalid, NotFound, ProblemError } from '../../middleware/problems';
import { Person } from '../../models';
import type { Services } from '../../services';
import { issueToken, LinkNotValid, useToken, voidTokens } from '../people/one-time-links';
import { assertGoodPassword } from '../people/password-policy';
import { writeAudit } from '../people/people-audit';
import { createPerson, endSessions, lockPerson } from '../people/people-service';
import { membershipsOf } from '../people/people-views';

/** Signs a person in with a fresh session; throws one and the same refusal for every kind of wrong sign-in. */
export async function signIn(services: Services, request: Request, email: string): Promise<SessionAnswer> {
  const address = request.ip ?? '';
  await services.throttles.countSignIn(email, address);
  const person = await services.authenticator.checkPassword(request);
  if (person === null) {
    throw new ProblemError(401, 'sign-in-refused', 'Not signed in', 'The address and the password do not go together.');
  }
  await services.throttles.forgiveSignIn(email, address);
  await services.authenticator.startSession(request, person);
  return sessionAnswer(services, person);
}

/** Who is signed in, with which roles where. */
export async function sessionAnswer(services: Services, person: SignedInPerson): Promise<SessionAnswer> {
  const { id, name, email, administrator } = person;
  return {
    person: { id, name, email, administrator },
    memberships: await membershipsOf(services.sequelize, id),
    demonstration: services.config.demonstration,
  };
}

/** A person's own open sessions, the newest first. */
export async function ownSessions(services: Services, person: SignedInPerson, sid: string): Promise<OwnSession[]> {
  const { idleSeconds, absoluteSeconds } = services.config.sessionLimits;
  const rows = await services.sequelize.query<{ id: string; current: boolean; created_at: Date; last_seen_at: Date }>(
    `SELECT id, sid = $2 AS current, created_at, last_seen_at FROM sessions
      WHERE person_id = $1 AND now() <= last_seen_at + make_interval(secs => $3)
        AND now() <= created_at + make_interval(secs => $4)
      ORDER BY created_at DESC`,
    { bind: [person.id, sid, idleSeconds, absoluteSeconds], type: QueryTypes.SELECT },
  );
  return rows.map(({ id, current, created_at, last_seen_at }) => ({
    id,
    current,
    startedAt: created_at.toISOString(),
    lastSeenAt: last_seen_at.toISOString(),
  }));
}

/** Ends one of a person's own sessions; throws NotFound for anybody else's. */
export async function revokeSession(services: Services, person: SignedInPerson, sessionId: string): Promise<void> {
  await services.sequelize.transaction(async (transaction) => {
    const ended = await services.sequelize.query('DELETE FROM sessions WHERE id = $1 AND person_id = $2 RETURNING id', {
      bind: [sessionId, person.id],
      type: QueryTypes.SELECT,
      transaction,
    });
    if (ended.length === 0) throw new NotFound('You have no such session.');
    await writeAudit(transaction, 'session.revoked', { actorId: person.id, subjectId: person.id });
  });
}

/**
 * Mails a link for a new password if the account exists, can be used and has not been mailed to too often. Runs after
 * the answer, so that neither its content nor its time tells whether the account exists.
 */
export async function mailPasswordReset(services: Services, email: string): Promise<void> {
  const person = await findByEmail(email);
  if (person === null || person.disabled || person.passwordHash === null) return;
  if (!(await services.throttles.allowsMail(email))) return;
  await services.sequelize.transaction(async (transaction) => {
    const token = await issueToken(services.sequelize, transaction, 'reset', person.id);
    const link = oneTimeLink(services.config.publicUrl, 'password-reset', token);
    await queueMail(transaction, person.email, passwordResetMessage(person.name, link));
  });
  services.mailSender.wake();
}

/** Sets the new password of a reset link and ends all sessions; signing in remains to be done. Throws link-not-valid. */
export async function completePasswordReset(services: Services, token: string, password: string): Promise<void> {
  await services.sequelize.transaction(async (transaction) => {
    const { personId } = await useToken(services.sequelize, transaction, ['reset'], token);
    const person = await usablePerson(transaction, personId);
    await setPassword(services, transaction, person, password);
    await writeAudit(transaction, 'password.reset', { actorId: person.id, subjectId: person.id });
  });
}

/** Accepts an invitation or makes the first administrator. A refused password leaves the link usable. Throws link-not-valid. */
export async function acceptInvitation(services: Services, acceptance: InvitationAcceptance): Promise<void> {
  const { sequelize } = services;
  await sequelize.transaction(async (transaction) => {
    const { personId, purpose } = await useToken(
      sequelize,
      transaction,
      ['invite', 'first-administrator'],
      acceptance.token,
    );
    if (purpose === 'first-administrator') {
      await createFirstAdministrator(services, transaction, acceptance);
      return;
    }
    const person = await usablePerson(transaction, personId);
    if (acceptance.name !== undefined) await person.update({ name: acceptance.name }, { transaction });
    await setPassword(services, transaction, person, acceptance.password);
    await writeAudit(transaction, 'person.accepted', { actorId: person.id, subjectId: person.id });
  });
}

async function createFirstAdministrator(
  services: Services,
  transaction: Transaction,
  { name, email, password }: InvitationAcceptance,
): Promise<void> {
  const missing = [
    ...(name === undefined
      ? [{ field: 'name', message: 'is missing', expected: 'the name of the first administrator' }]
      : []),
    ...(email === undefined ? [{ field: 'email', message: 'is missing', expected: 'their mail address' }] : []),
  ];
  if (name === undefined || email === undefined) throw new Invalid(missing);
  if ((await Person.count({ where: { administrator: true }, transaction })) > 0) throw new LinkNotValid();
  assertGoodPassword(password, { name, email });
  await createPerson(services, transaction, { name, email, password, administrator: true });
}

async function usablePerson(transaction: Transaction, personId: string | null): Promise<Person> {
  if (personId === null) throw new LinkNotValid();
  const person = await lockPerson(transaction, personId);
  if (person.disabled) throw new LinkNotValid();
  return person;
}

async function setPassword(
  services: Services,
  transaction: Transaction,
  person: Person,
  password: string,
): Promise<void> {
  assertGoodPassword(password, person);
  const passwordHash = await services.passwords.hash(password);
  await person.update({ passwordHash, version: person.version + 1 }, { transaction });
  await voidTokens(services.sequelize, transaction, 'reset', person.id);
  await endSessions(services, transaction, person.id);
}
