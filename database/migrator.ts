import { Sequelize } from 'sequelize';
import { SequelizeStorage, Umzug } from 'umzug';
import { migrations as allMigrations } from './migrations';
import type { NamedMigration } from './named-migration';

/** Any constant works, as long as every process of this product uses the same one and nothing else in the database does. */
const migrationLock = 4_310_001;

/** Applies every pending migration in one transaction and returns the names of those applied; throws if one fails. */
export async function migrateUp(
  databaseUrl: string,
  migrations: readonly NamedMigration[] = allMigrations,
): Promise<string[]> {
  return withMigrationConnection(databaseUrl, migrations, async (umzug) => namesOf(await umzug.up()));
}

/** Reverts the newest migrations, `steps` of them or all, in one transaction and returns the names of those reverted. */
export async function migrateDown(
  databaseUrl: string,
  steps: number | 'all',
  migrations: readonly NamedMigration[] = allMigrations,
): Promise<string[]> {
  return withMigrationConnection(databaseUrl, migrations, async (umzug) =>
    namesOf(await umzug.down(steps === 'all' ? { to: 0 } : { step: steps })),
  );
}

/**
 * Runs `work` on a pool of exactly one connection, inside one transaction that holds the advisory lock: a second
 * process waits, then finds nothing left to do. One connection is what makes the transaction cover every statement
 * that a migration issues through the query interface.
 */
async function withMigrationConnection(
  databaseUrl: string,
  migrations: readonly NamedMigration[],
  work: (umzug: Umzug<ReturnType<Sequelize['getQueryInterface']>>) => Promise<string[]>,
): Promise<string[]> {
  const sequelize = new Sequelize(databaseUrl, {
    dialect: 'postgres',
    logging: false,
    pool: { max: 1, min: 1, idle: 600_000, evict: 600_000, acquire: 60_000 },
  });
  const umzug = new Umzug({
    migrations: migrations.map(({ name, up, down }) => ({ name, up, down })),
    context: sequelize.getQueryInterface(),
    storage: new SequelizeStorage({ sequelize, tableName: 'migrations' }),
    logger: undefined,
  });
  try {
    await sequelize.query('BEGIN');
    try {
      await sequelize.query('SELECT pg_advisory_xact_lock($1)', { bind: [migrationLock] });
      const names = await work(umzug);
      await sequelize.query('COMMIT');
      return names;
    } catch (error) {
      await sequelize.query('ROLLBACK');
      throw error;
    }
  } finally {
    await sequelize.close();
  }
}

function namesOf(steps: readonly { readonly name: string }[]): string[] {
  return steps.map((step) => step.name);
}
