import 'reflect-metadata';
import { readConfig } from '../backend/src/platform/config';
import { closeDatabase, openDatabase } from '../backend/src/platform/database';
import { createLogger } from '../backend/src/platform/logger';
import { PasswordHasher } from '../backend/src/platform/password-hashing';
import { EditService } from '../backend/src/study/edit-service';
import { StudyStore } from '../backend/src/study/study-store';
import { seedDemonstration } from './seeders';
import { ProductExecutor } from './seeders/product-executor';

/** Fills an empty, migrated database with the demonstration; refuses outside demonstration mode. */
async function main(): Promise<void> {
  const config = readConfig(process.env, __dirname);
  if (!config.demonstration) throw new Error('Demonstration data are only written in demonstration mode (DEMO=1).');
  const database = openDatabase(config.databaseUrl, createLogger(config.logLevel));
  try {
    const studies = new StudyStore(database.sequelize);
    const executor = new ProductExecutor({
      ...database,
      passwords: new PasswordHasher(config.passwordHashing),
      studies,
      edits: new EditService(studies),
    });
    await executor.createPeople();
    await seedDemonstration(executor);
  } finally {
    await closeDatabase(database);
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exit(1);
});
