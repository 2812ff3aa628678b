import { migrateDown, migrateUp } from './migrator';

/** `migrate.cjs` applies what is pending; `migrate.cjs down [n|all]` reverts. The database is named by DATABASE_URL. */
async function main(): Promise<void> {
  const databaseUrl = process.env['DATABASE_URL'];
  if (databaseUrl === undefined) throw new Error('DATABASE_URL is not set: it names the database to migrate.');
  const [direction = 'up', amount = '1'] = process.argv.slice(2);
  if (direction !== 'up' && direction !== 'down') throw new Error(`"${direction}" is neither "up" nor "down".`);
  const names =
    direction === 'up'
      ? await migrateUp(databaseUrl)
      : await migrateDown(databaseUrl, amount === 'all' ? 'all' : Number(amount));
  for (const name of names) console.log(`${direction} ${name}`);
}

main().catch((error: unknown) => {
  console.error(error instanceof Error ? (error.stack ?? error.message) : error);
  process.exitCode = 1;
});
