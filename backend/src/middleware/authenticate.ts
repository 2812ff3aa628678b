import type { Request, RequestHandler, Response } from 'express';
import { Passport } from 'passport';
import { Strategy } from 'passport-local';
import { QueryTypes, type Sequelize } from 'sequelize';
import type { SessionLimits } from '../platform/config';
import type { PasswordHasher } from '../platform/password-hashing';
import { Person } from '../models';
import type { SignedInPerson } from './access';

declare global {
  // eslint-disable-next-line @typescript-eslint/no-namespace -- Express names the type of `request.user` here and nowhere else.
  namespace Express {
    // eslint-disable-next-line @typescript-eslint/no-empty-object-type -- only an interface merges with Express's own.
    interface User extends SignedInPerson {}
  }
}

/** Signing in and out, and reading who is signed in. */
export interface Authenticator {
  /** Puts the person of the request's session, read from the database, on the request. */
  readonly readSession: RequestHandler;
  /** The person whose address and password the parsed body holds, or null. */
  checkPassword(request: Request): Promise<Express.User | null>;
  /** Starts a new session for the person; the id of the one before is dead. */
  startSession(request: Request, person: Express.User): Promise<void>;
  /** Ends the request's session. */
  endSession(request: Request): Promise<void>;
}

interface SessionRow extends SignedInPerson {
  readonly over: boolean;
  readonly touch: boolean;
}

/** Passport with the local strategy; who is signed in is read from the database on every request. */
export function createAuthenticator(
  sequelize: Sequelize,
  passwords: PasswordHasher,
  limits: SessionLimits,
): Authenticator {
  const passport = new Passport();
  passport.use(
    new Strategy({ usernameField: 'email' }, (email, password, done) => {
      checkPassword(passwords, email, password).then(
        (person) => done(null, person ?? false),
        (error: unknown) => done(error),
      );
    }),
  );
  passport.serializeUser((person, done) => done(null, person.id));
  passport.deserializeUser<string, Request>((request, personId, done) => {
    // A stream that reconnects by itself is not a person at work.
    const active = request.get('accept')?.includes('text/event-stream') !== true;
    personOfSession(sequelize, request.sessionID, personId, limits, active).then(
      (person) => done(null, person ?? false),
      (error: unknown) => done(error),
    );
  });
  return {
    readSession: passport.session() as RequestHandler,
    checkPassword: (request) =>
      settled<Express.User | false | null | undefined>((done) => {
        const check = passport.authenticate('local', done) as RequestHandler;
        void check(request, request.res as Response, done);
      }).then((person) => (person === false ? null : (person ?? null))),
    startSession: (request, person) => settled((done) => request.logIn(person, done)),
    endSession: (request) => settled((done) => request.session.destroy(done)),
  };
}

/** A promise for what a function reports through a callback of the form (error, result). */
function settled<T = void>(start: (done: (error?: unknown, result?: T) => void) => void): Promise<T> {
  return new Promise((resolve, reject) => {
    start((error, result) => {
      if (error === null || error === undefined) resolve(result as T);
      else reject(error instanceof Error ? error : new Error('signing in failed', { cause: error }));
    });
  });
}

/**
 * The person of an open session, or null when it has ended: signed out, idle or old by the database's clock, or the
 * person disabled. Use is noted at most once a minute.
 */
export async function personOfSession(
  sequelize: Sequelize,
  sid: string,
  personId: string,
  limits: SessionLimits,
  active: boolean,
): Promise<SignedInPerson | null> {
  const [row] = await sequelize.query<SessionRow>(
    `SELECT p.id, p.name, p.email, p.administrator,
            now() > s.last_seen_at + make_interval(secs => $3) OR now() > s.created_at + make_interval(secs => $4) AS over,
            now() > s.last_seen_at + interval '1 minute' AS touch
       FROM sessions s JOIN people p ON p.id = s.person_id
      WHERE s.sid = $1 AND p.id = $2 AND NOT p.disabled`,
    { bind: [sid, personId, limits.idleSeconds, limits.absoluteSeconds], type: QueryTypes.SELECT },
  );
  if (row === undefined) return null;
  if (row.over) {
    await sequelize.query('DELETE FROM sessions WHERE sid = $1', { bind: [sid] });
    return null;
  }
  if (active && row.touch) {
    await sequelize.query('UPDATE sessions SET last_seen_at = now() WHERE sid = $1', { bind: [sid] });
  }
  return { id: row.id, name: row.name, email: row.email, administrator: row.administrator };
}

/** Whoever has this address and password, or null; unknown, disabled and merely invited people take as long as a wrong password. */
async function checkPassword(passwords: PasswordHasher, email: string, password: string): Promise<Person | null> {
  const person = await findByEmail(email);
  const usable = person !== null && !person.disabled ? person.passwordHash : null;
  const matches = await passwords.verify(password, usable);
  if (person === null || usable === null || !matches) return null;
  if (passwords.isWeak(usable)) {
    await Person.update(
      { passwordHash: await passwords.hash(password) },
      { where: { id: person.id, passwordHash: usable } },
    );
  }
  return person;
}

/** Finds a person by mail address, in any case of letters. */
export async function findByEmail(email: string): Promise<Person | null> {
  const { sequelize } = Person;
  if (!sequelize) throw new Error('the models are not registered');
  return Person.findOne({ where: sequelize.where(sequelize.fn('lower', sequelize.col('email')), email.toLowerCase()) });
}
