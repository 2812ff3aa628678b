/** The whole product, from nothing to an address: used by `npm start`, by the end-to-end tests and by the benches. */
import { buildClient, buildServer } from './build.mjs';
import { startCluster } from './cluster.mjs';
import { openDataDirectory } from './data-directory.mjs';
import { ensureDebianPackages, ensureNodeModules } from './install.mjs';
import { portIsFree } from './ports.mjs';
import { findPostgres } from './postgres.mjs';
import { migrate, prepareDatabase } from './prepare.mjs';
import { stopChild, stopChildren } from './processes.mjs';
import { Refusal } from './refusal.mjs';
import { holdDataDirectory } from './running.mjs';
import { startServer } from './server.mjs';

export const postgresPackage = { package: 'postgresql-15', presentIf: () => findPostgres() !== undefined };

/**
 * @typedef {object} Product
 * @property {string} url
 * @property {string} databaseUrl
 * @property {number | undefined} serverPid
 * @property {Promise<import('./server.mjs').ServerEnd>} serverEnded how the server ended, once it has
 * @property {() => Promise<void>} stop
 */

/**
 * Installs, builds, prepares and serves; on failure everything begun is stopped again.
 * @param {import('./settings.mjs').Settings} settings
 * @param {{ say?: (line: string) => void, durable?: boolean, log?: number, env?: NodeJS.ProcessEnv, signal?: AbortSignal }} [options]
 * `durable: false` for throwaway clusters; `log`: file descriptor for the server's output; `signal`: gives up between two steps
 * @returns {Promise<Product>}
 */
export async function startProduct(settings, options = {}) {
  const { say = () => undefined, durable = true, log, env: extraEnv = {}, signal } = options;
  /** What to undo, newest last. @type {(() => void | Promise<void>)[]} */
  const undo = [];
  const stop = async () => {
    for (const step of undo.splice(0).reverse()) await step();
  };
  const step = (/** @type {() => void | Promise<void>} */ undoing) => {
    undo.push(undoing);
    signal?.throwIfAborted();
  };
  try {
    await ensureNodeModules(say);
    if (settings.databaseUrl === undefined) await ensureDebianPackages([postgresPackage], say);
    const data = openDataDirectory(settings.dataDirectory);
    step(holdDataDirectory(data, `Deltaproof at ${settings.publicUrl}`));
    if (!(await portIsFree(settings.port))) {
      throw new Refusal(`Port ${settings.port} is in use. Choose another one: PORT=${settings.port + 1} npm start`);
    }
    if (data.clusterElsewhere && settings.databaseUrl === undefined) {
      say(
        `The database goes to ${data.clusterHome}: the account "postgres", which runs it, cannot enter ${data.path}.`,
      );
    }
    const env = {
      ...process.env,
      NODE_ENV: settings.production ? 'production' : 'development',
      PORT: String(settings.port),
      DEMO: settings.demo ? '1' : '0',
      DATA_DIR: data.path,
      // One line per request is for operators; at a desk only what went wrong is worth the space.
      LOG_LEVEL: process.env.LOG_LEVEL ?? (settings.production ? 'info' : 'warn'),
      PUBLIC_URL: settings.publicUrl,
      // The server refuses a cluster that could lose a commit, unless told that it is a throwaway one.
      ...(durable ? {} : { ALLOW_UNSAFE_DATABASE: '1' }),
      ...extraEnv,
    };
    const bundled = buildServer();
    const database = async () => {
      if (settings.databaseUrl !== undefined) {
        await bundled;
        await migrate(settings.databaseUrl, env);
        return settings.databaseUrl;
      }
      const cluster = await startCluster(data, { durable });
      step(() => cluster.stop());
      await bundled;
      return prepareDatabase(cluster, { demo: settings.demo, env, say });
    };
    // Both at once on two cores; both are waited for, so that nothing is still being started when a failure is undone.
    const [databaseUrl, client] = await Promise.allSettled([database(), buildClient(say), bundled]);
    if (databaseUrl.status === 'rejected') throw databaseUrl.reason;
    if (client.status === 'rejected') throw client.reason;
    signal?.throwIfAborted();

    const server = await startServer({ port: settings.port, env: { ...env, DATABASE_URL: databaseUrl.value }, log });
    step(() => stopChild(server.process));
    return {
      url: settings.publicUrl,
      databaseUrl: databaseUrl.value,
      serverPid: server.process.pid,
      serverEnded: server.ended,
      stop,
    };
  } catch (error) {
    await stopChildren();
    await stop();
    throw error;
  }
}
