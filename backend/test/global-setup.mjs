/** Jest global set-up of the backend: a throwaway PostgreSQL with one migrated database that every test file gets a copy of. */
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import pg from 'pg';
import { bundleForNode, repository } from '../../database/build.mjs';
import { startCluster } from '../../database/cluster.mjs';
import { openDataDirectory } from '../../database/data-directory.mjs';
import { run } from '../../database/processes.mjs';

export default async function setUp() {
  const directory = mkdtempSync(join(tmpdir(), 'deltaproof-jest-'));
  chmodSync(directory, 0o711);
  const cluster = await startCluster(openDataDirectory(join(directory, 'data')), { durable: false });
  globalThis.deltaproofTestCluster = {
    stop: async () => {
      await cluster.stop();
      rmSync(directory, { recursive: true, force: true });
    },
  };
  const administrator = new pg.Client({ connectionString: cluster.url('postgres') });
  await administrator.connect();
  await administrator.query('CREATE DATABASE deltaproof_template');
  await administrator.end();

  const programs = join(repository, '.cache', `jest-${process.pid}`);
  await bundleForNode({ migrate: 'database/migrate.ts' }, programs);
  const env = { ...process.env, DATABASE_URL: cluster.url('deltaproof_template') };
  await run(process.execPath, [join(programs, 'migrate.cjs')], { env }).finally(() =>
    rmSync(programs, { recursive: true, force: true }),
  );
  process.env.TEST_CLUSTER_URL = cluster.url('postgres');
}
