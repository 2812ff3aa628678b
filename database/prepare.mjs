/** The database inside the cluster: made, migrated and, for the demonstration, filled; all or nothing on the first start. */
import { join } from 'node:path';
import { serverDirectory } from './build.mjs';
import { CommandFailed, run } from './processes.mjs';
import { Refusal } from './refusal.mjs';

/** The demonstration has a database of its own, so that its accounts can never be met in a real one. @param {boolean} demo */
export function databaseName(demo) {
  return demo ? 'deltaproof_demo' : 'deltaproof';
}

/**
 * Makes sure that the product's database exists and has the current schema. A new one is prepared under another name and
 * renamed at the end: a first start that was cut short leaves nothing under the final name, and the next one begins again.
 * @param {import('./cluster.mjs').Cluster} cluster @param {{ demo: boolean, env: NodeJS.ProcessEnv, say: (line: string) => void }} options
 * @returns {Promise<string>} connection URL
 */
export async function prepareDatabase(cluster, { demo, env, say }) {
  const name = databaseName(demo);
  const url = cluster.url(name);
  const { default: pg } = await import('pg');
  const administrator = new pg.Client({ connectionString: cluster.url('postgres') });
  await administrator.connect();
  try {
    const found = await administrator.query('SELECT 1 FROM pg_database WHERE datname = $1', [name]);
    if (found.rowCount === 1) {
      await migrate(url, env);
      return url;
    }
    const unfinished = `${name}_unfinished`;
    await administrator.query(`DROP DATABASE IF EXISTS ${unfinished} WITH (FORCE)`);
    await administrator.query(`CREATE DATABASE ${unfinished}`);
    await migrate(cluster.url(unfinished), env);
    if (demo) {
      say('Writing the demonstration studies …');
      await runProgram('seed', cluster.url(unfinished), env);
    }
    await administrator.query(`ALTER DATABASE ${unfinished} RENAME TO ${name}`);
    return url;
  } finally {
    await administrator.end();
  }
}

/** Applies pending migrations to a database. @param {string} url @param {NodeJS.ProcessEnv} env */
export async function migrate(url, env) {
  await runProgram('migrate', url, env);
}

/** @param {'migrate' | 'seed'} program @param {string} url @param {NodeJS.ProcessEnv} env */
async function runProgram(program, url, env) {
  try {
    await run(process.execPath, ['--enable-source-maps', join(serverDirectory, `${program}.cjs`)], {
      env: { ...env, DATABASE_URL: url },
    });
  } catch (error) {
    if (!(error instanceof CommandFailed)) throw error;
    const full = /No space left on device|ENOSPC|53100/.test(error.output)
      ? 'The disk is full; free some room and start again. '
      : '';
    throw new Refusal(
      program === 'migrate'
        ? `${full}The database schema could not be brought up to date; it was left as it was.\n${error.output}`
        : `${full}The demonstration studies could not be written; the next start begins again.\n${error.output}`,
    );
  }
}
