import type { Sequelize } from 'sequelize-typescript';
import { createTestApp, type TestApp } from '../../test/app';
import { createTestPerson } from '../../test/people';
import { assertDurable, databaseNow } from './database';
import { Housekeeping } from './housekeeping';

let testApp: TestApp;
beforeAll(async () => {
  testApp = await createTestApp();
});
afterAll(() => testApp.close());

const withSettings = (settings: Record<string, string>): Sequelize =>
  ({ query: () => Promise.resolve(Object.entries(settings).map(([name, setting]) => ({ name, setting }))) }) as never;

it('refuses a database that may lose what it acknowledged, and names what is off', async () => {
  const on = { fsync: 'on', full_page_writes: 'on', synchronous_commit: 'on' };
  await expect(assertDurable(withSettings(on))).resolves.toBeUndefined();
  for (const name of Object.keys(on)) {
    await expect(assertDurable(withSettings({ ...on, [name]: 'off' }))).rejects.toThrow(new RegExp(`has ${name} off`));
  }
  const refusal = assertDurable(withSettings({ ...on, fsync: 'off' }));
  await expect(refusal).rejects.toMatchObject({ reason: 'database-not-durable' });
});

it('goes on after the database has cut every connection', async () => {
  const { pool, sequelize } = testApp.services;
  await Promise.all([pool.query('SELECT 1'), sequelize.query('SELECT 1')]);
  await pool.query(
    'SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE pid <> pg_backend_pid() AND datname = current_database()',
  );
  await new Promise((resolve) => setTimeout(resolve, 200));
  for (let time = 0; time < 10; time += 1) await sequelize.query('SELECT 1');
  await expect(databaseNow(sequelize)).resolves.toBeInstanceOf(Date);
});

it('forgets what has outlived its use, and nothing else', async () => {
  const { sequelize, logger, pool } = testApp.services;
  const person = await createTestPerson(testApp, 'Kept');
  await pool.query(
    `INSERT INTO idempotency_keys (person_id, key, request_digest, status, at)
     SELECT $1, gen_random_uuid(), '', 204, now() - make_interval(days => age) FROM unnest(ARRAY[6, 8]) age`,
    [person.id],
  );
  await pool.query(
    `INSERT INTO sessions (sid, sess, expire) VALUES ('old', '{}', now() - interval '1 minute'), ('new', '{}', now() + interval '1 minute')`,
  );
  await new Housekeeping(sequelize, logger).forget();
  const { rows } = await pool.query(
    'SELECT (SELECT count(*) FROM idempotency_keys) AS keys, (SELECT string_agg(sid, $1) FROM sessions) AS sessions',
    [','],
  );
  expect(rows[0]).toEqual({ keys: '1', sessions: 'new' });
});
