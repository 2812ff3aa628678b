import { Client } from 'pg';
import { DataTypes } from 'sequelize';
import { migrations } from './migrations';
import { migrateDown, migrateUp } from './migrator';
import type { NamedMigration } from './named-migration';

const databaseUrl = process.env['TEST_DATABASE_URL'] ?? '';

const makesOrbits: NamedMigration = {
  name: '900-orbits',
  up: async ({ context }) => context.createTable('orbits', { name: { type: DataTypes.TEXT, primaryKey: true } }),
  down: async ({ context }) => context.dropTable('orbits'),
};

const failsHalfWay: NamedMigration = {
  name: '901-fails',
  up: async ({ context }) => {
    await context.createTable('half_made', { name: { type: DataTypes.TEXT, primaryKey: true } });
    throw new Error('the second half fails');
  },
  down: async () => undefined,
};

/** One line per table, column, type, constraint, index and trigger: what two equal schemas have in common. */
async function schemaOf(url: string): Promise<string[]> {
  const client = new Client({ connectionString: url });
  await client.connect();
  const { rows } = await client.query<{ line: string }>(`
    SELECT table_name || '.' || column_name || ' ' || data_type || ' ' || is_nullable || coalesce(column_default, '') AS line
      FROM information_schema.columns WHERE table_schema = 'public'
    UNION ALL SELECT conrelid::regclass || ' ' || pg_get_constraintdef(oid) FROM pg_constraint WHERE connamespace = 'public'::regnamespace
    UNION ALL SELECT indexdef FROM pg_indexes WHERE schemaname = 'public'
    UNION ALL SELECT pg_get_triggerdef(oid) FROM pg_trigger WHERE NOT tgisinternal
    ORDER BY 1`);
  await client.end();
  return rows.map((row) => row.line);
}

async function tablesOf(url: string): Promise<string[]> {
  const client = new Client({ connectionString: url });
  await client.connect();
  const { rows } = await client.query<{ tablename: string }>(
    `SELECT tablename FROM pg_tables WHERE schemaname = 'public' ORDER BY 1`,
  );
  await client.end();
  return rows.map((row) => row.tablename);
}

describe('migration runner', () => {
  it('applies what is pending once and reverts it', async () => {
    const all = [...migrations, makesOrbits];
    await expect(migrateUp(databaseUrl, all)).resolves.toEqual(['900-orbits']);
    await expect(migrateUp(databaseUrl, all)).resolves.toEqual([]);
    expect(await tablesOf(databaseUrl)).toContain('orbits');
    await expect(migrateDown(databaseUrl, 1, all)).resolves.toEqual(['900-orbits']);
    expect(await tablesOf(databaseUrl)).not.toContain('orbits');
  });

  it('leaves nothing of a run that fails half-way', async () => {
    const before = await tablesOf(databaseUrl);
    await expect(migrateUp(databaseUrl, [...migrations, makesOrbits, failsHalfWay])).rejects.toThrow('901-fails');
    expect(await tablesOf(databaseUrl)).toEqual(before);
  });

  it('lets two processes migrate at once: one applies, the other finds nothing left', async () => {
    const all = [...migrations, makesOrbits];
    const [first, second] = await Promise.all([migrateUp(databaseUrl, all), migrateUp(databaseUrl, all)]);
    expect([...first, ...second]).toEqual(['900-orbits']);
    await migrateDown(databaseUrl, 1, all);
  });

  it('reverts every migration of the product to an empty schema, and applies them again to the same schema', async () => {
    const schema = await schemaOf(databaseUrl);
    await migrateDown(databaseUrl, 'all');
    expect(await tablesOf(databaseUrl)).toEqual(['migrations']);
    await migrateUp(databaseUrl);
    expect(await schemaOf(databaseUrl)).toEqual(schema);
  });
});
