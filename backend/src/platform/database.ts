import { Pool } from 'pg';
import { type Transaction, QueryTypes } from 'sequelize';
import { Sequelize } from 'sequelize-typescript';
import { models } from '../models';
import type { Logger } from './logger';
import { StartRefusal } from './start-refusal';

/** The two ways to PostgreSQL: models and transactions, and a plain pool for sessions and throttles. */
export interface Database {
  readonly sequelize: Sequelize;
  readonly pool: Pool;
}

const CONNECT_TIMEOUT_MS = 10_000;
const STATEMENT_TIMEOUT_MS = 30_000;
const LOCK_TIMEOUT_MS = 10_000;

/** Opens the database with all models registered; connections that break while idle are logged and replaced. */
export function openDatabase(databaseUrl: string, logger: Logger): Database {
  const sequelize = new Sequelize(databaseUrl, {
    dialect: 'postgres',
    logging: false,
    models,
    pool: { max: 10, min: 0, idle: 10_000, acquire: 20_000 },
    dialectOptions: {
      application_name: 'deltaproof',
      connectionTimeoutMillis: CONNECT_TIMEOUT_MS,
      statement_timeout: STATEMENT_TIMEOUT_MS,
      lock_timeout: LOCK_TIMEOUT_MS,
      idle_in_transaction_session_timeout: STATEMENT_TIMEOUT_MS,
    },
  });
  const pool = new Pool({
    connectionString: databaseUrl,
    max: 5,
    application_name: 'deltaproof-sessions',
    connectionTimeoutMillis: CONNECT_TIMEOUT_MS,
    statement_timeout: STATEMENT_TIMEOUT_MS,
  });
  // Without this handler a restart of the database would end the process.
  pool.on('error', (err) => logger.warn({ err }, 'an idle database connection broke'));
  return { sequelize, pool };
}

/** Closes both ways to the database. */
export async function closeDatabase(database: Database): Promise<void> {
  await Promise.all([database.sequelize.close(), database.pool.end()]);
}

/** The database's clock: expiry and audit never rest on a server process's own time. */
export async function databaseNow(sequelize: Sequelize, transaction?: Transaction): Promise<Date> {
  const [row] = await sequelize.query<{ now: Date }>('SELECT now() AS now', { type: QueryTypes.SELECT, transaction });
  if (row === undefined) throw new Error('the database did not tell the time');
  return row.now;
}

/**
 * Refuses a database that may lose what it acknowledged: an answer of 2xx means "committed", which only holds with
 * these settings on.
 */
export async function assertDurable(sequelize: Sequelize): Promise<void> {
  let rows: { name: string; setting: string }[];
  try {
    rows = await sequelize.query(
      "SELECT name, setting FROM pg_settings WHERE name IN ('fsync', 'full_page_writes', 'synchronous_commit')",
      { type: QueryTypes.SELECT },
    );
  } catch (error) {
    throw new StartRefusal('database-not-reachable', `The database cannot be reached: ${(error as Error).message}.`);
  }
  const off = rows.filter((row) => row.setting === 'off').map((row) => row.name);
  if (off.length > 0) {
    throw new StartRefusal(
      'database-not-durable',
      `The database has ${off.join(', ')} off, so it may lose acknowledged edits: turn ${off.length > 1 ? 'them' : 'it'} on.`,
    );
  }
}
