/** What the person at the terminal chose, read from the environment and checked before anything is started. */
import { join } from 'node:path';
import { repository } from './build.mjs';
import { Refusal } from './refusal.mjs';

/** Exit codes of refused settings, those that the server uses for the same reasons. */
const exitCodes = { notValid: 64, demonstrationInProduction: 65, publicAddressNotSafe: 67 };

/**
 * @typedef {object} Settings
 * @property {boolean} production
 * @property {boolean} demo whether a new database is filled with the demonstration studies
 * @property {number} port
 * @property {string} dataDirectory
 * @property {string} publicUrl address under which people reach the product; links in mails begin with it
 * @property {string | undefined} databaseUrl a PostgreSQL of the operator's own, instead of one started here
 */

/** @param {NodeJS.ProcessEnv} [env] @returns {Settings} */
export function readSettings(env = process.env) {
  const production = env.NODE_ENV === 'production';
  const port = portFrom(env.PORT ?? '4310');
  const settings = {
    production,
    demo: demoFrom(env.DEMO ?? (production ? '0' : '1')),
    port,
    dataDirectory: env.DATA_DIR ?? join(repository, '.data'),
    publicUrl: env.PUBLIC_URL ?? `http://localhost:${port}`,
    databaseUrl: env.DATABASE_URL,
  };
  if (production && settings.demo) {
    throw new Refusal(
      'DEMO=1 would put accounts with a published password into production.',
      exitCodes.demonstrationInProduction,
    );
  }
  if (settings.demo && settings.databaseUrl !== undefined) {
    throw new Refusal(
      'The demonstration is only kept in a database that the start makes itself: unset DATABASE_URL, or set DEMO=0.',
      exitCodes.notValid,
    );
  }
  checkPublicUrl(settings, env.LOOPBACK_HTTP === '1');
  return settings;
}

/** @param {string} text */
function portFrom(text) {
  const port = Number(text);
  if (/^\d+$/.test(text) && port >= 1 && port <= 65535) return port;
  throw new Refusal(`PORT is "${text}"; it must be a whole number from 1 to 65535.`, exitCodes.notValid);
}

/** @param {string} text */
function demoFrom(text) {
  if (text === '0' || text === '1') return text === '1';
  throw new Refusal(`DEMO is "${text}"; it must be 1 (with the demonstration studies) or 0.`, exitCodes.notValid);
}

/** @param {Settings} settings @param {boolean} plainHttpAllowed */
function checkPublicUrl({ production, publicUrl }, plainHttpAllowed) {
  let url;
  try {
    url = new URL(publicUrl);
  } catch {
    throw new Refusal(`PUBLIC_URL is "${publicUrl}", which is not an address.`, exitCodes.notValid);
  }
  if (url.protocol === 'https:') return;
  const loopback = ['localhost', '127.0.0.1', '[::1]'].includes(url.hostname);
  if (url.protocol !== 'http:' || !loopback || (production && !plainHttpAllowed)) {
    throw new Refusal(
      `PUBLIC_URL is "${publicUrl}". ${production ? 'In production it' : 'It'} must begin with https:// — session cookies ` +
        'do not travel safely over plain HTTP. ' +
        (loopback
          ? 'To try production on this machine alone, set LOOPBACK_HTTP=1.'
          : 'Plain HTTP is for localhost only.'),
      exitCodes.publicAddressNotSafe,
    );
  }
}
