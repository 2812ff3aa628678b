/** The throwaway PostgreSQL of one backend test run: not durable, in the temporary directory, removed at the end. */
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import pg from 'pg';
import { bundleForNode, repository } from '../../database/build.mjs';
import { startCluster } from '../../database/cluster.mjs';
import { openDataDirectory } from '../../database/data-directory.mjs';
import { run } from '../../database/processes.mjs';

/** What ends it again, once it runs. @type {(() => Promise<void>) | undefined} */
let stop;

/** Starts the cluster with one migrated database, the template of all others, and returns the cluster's URL. */
export async function startTestCluster() {
  const directory = mkdtempSync(join(tmpdir(), 'deltaproof-jest-'));
  // The account that runs PostgreSQL when we are root must be able to pass through.
  chmodSync(directory, 0o711);
  const cluster = await startCluster(openDataDirectory(join(directory, 'data')), { durable: false });
  stop = async () => {
    await cluster.stop();
    rmSync(directory, { recursive: true, force: true });
  };
  const administrator = new pg.Client({ connectionString: cluster.url('postgres') });
  await administrator.connect();
  await administrator.query('CREATE DATABASE deltaproof_template');
  await administrator.end();

  const programs = join(repository, '.cache', `jest-${process.pid}`);
  try {
    await bundleForNode({ migrate: 'database/migrate.ts' }, programs);
    const env = { ...process.env, DATABASE_URL: cluster.url('deltaproof_template') };
    await run(process.execPath, [join(programs, 'migrate.cjs')], { env });
  } finally {
    rmSync(programs, { recursive: true, force: true });
  }
  return cluster.url('postgres');
}

/** Stops the cluster and removes every trace of it. */
export async function stopTestCluster() {
  await stop?.();
}
