import { TestEnvironment } from 'jest-environment-node';
import { Client } from 'pg';

/**
 * Gives every test file a migrated database of its own, named by `process.env.TEST_DATABASE_URL`: a copy of the template
 * that global set-up made. A test that needs no database opts out with the docblock `@jest-environment node`.
 */
export default class DatabaseEnvironment extends TestEnvironment {
  override async setup(): Promise<void> {
    await super.setup();
    const clusterUrl = process.env['TEST_CLUSTER_URL'];
    if (clusterUrl === undefined)
      throw new Error('TEST_CLUSTER_URL is not set: backend/test/global-setup.mjs has not run.');
    const name = `deltaproof_worker_${process.env['JEST_WORKER_ID'] ?? '1'}`;
    const client = new Client({ connectionString: clusterUrl });
    await client.connect();
    try {
      await client.query(`DROP DATABASE IF EXISTS ${name} WITH (FORCE)`);
      await client.query(`CREATE DATABASE ${name} TEMPLATE deltaproof_template STRATEGY file_copy`);
    } finally {
      await client.end();
    }
    const url = new URL(clusterUrl);
    url.pathname = `/${name}`;
    this.global.process.env['TEST_DATABASE_URL'] = url.href;
  }
}
