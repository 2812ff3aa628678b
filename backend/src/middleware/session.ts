import connectPgSimple from 'connect-pg-simple';
import type { RequestHandler } from 'express';
import session from 'express-session';
import type { Services } from '../services';

/** A session's row outlives its absolute limit a little, so that the database's clock alone decides when it ends. */
const ROW_SECONDS_BEYOND_LIMIT = 3600;

/** Sessions in PostgreSQL behind a cookie that scripts cannot read. Nothing is stored before somebody signs in. */
export function sessions({ config, secrets, pool, logger }: Services): RequestHandler {
  const PostgresStore = connectPgSimple(session);
  return session({
    name: sessionCookieName(config.secureCookies),
    secret: secrets.cookieSigning,
    resave: false,
    saveUninitialized: false,
    unset: 'destroy',
    // TLS ends at a proxy in front, which says so in X-Forwarded-Proto; a Secure cookie is only set then.
    proxy: true,
    cookie: { httpOnly: true, sameSite: 'lax', path: '/', secure: config.secureCookies },
    store: new PostgresStore({
      pool,
      tableName: 'sessions',
      ttl: config.sessionLimits.absoluteSeconds + ROW_SECONDS_BEYOND_LIMIT,
      // Last use is kept by authentication, at most once a minute: a write on every request would halve throughput.
      disableTouch: true,
      errorLog: () => logger.warn('old sessions could not be removed'),
    }),
  });
}

/** With TLS the name's prefix makes browsers insist on Secure, Path=/ and no Domain. */
export function sessionCookieName(secure: boolean): string {
  return secure ? '__Host-sid' : 'sid';
}
