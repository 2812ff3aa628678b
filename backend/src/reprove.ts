import 'reflect-metadata';
import { Study } from './models/study';
import { readConfig } from './platform/config';
import { closeDatabase, openDatabase } from './platform/database';
import { createLogger } from './platform/logger';
import { holds, reproveStudy } from './study/reprove-service';

/** Re-proves every study from scratch and says so for each; exit code 1 when anything stored does not follow. */
async function main(): Promise<void> {
  const config = readConfig(process.env, __dirname);
  const database = openDatabase(config.databaseUrl, createLogger(config.logLevel));
  const print = (line: string): void => void process.stdout.write(`${line}\n`);
  try {
    for (const study of await Study.findAll({ order: ['key'] })) {
      const report = await reproveStudy(database.sequelize, study.id);
      print(
        holds(report)
          ? `${report.key} r${report.revision}: ${report.requirements} verdicts and ${report.results} results follow from their inputs; the ledger's ${report.chain.entries} entries are intact, head ${report.chain.head.slice(0, 12)}`
          : `${report.key} r${report.revision}: DOES NOT HOLD`,
      );
      for (const one of report.verdicts) print(`  ${one.key}: stored ${one.stored}, proved ${one.proved}`);
      for (const one of report.outputs) print(`  ${one.node}: stored ${one.stored}, proved ${one.proved}`);
      if (report.chain.broken) print(`  ledger: revision ${report.chain.broken.revision}: ${report.chain.broken.why}`);
      if (!holds(report)) process.exitCode = 1;
    }
  } finally {
    await closeDatabase(database);
  }
}

main().catch((error: unknown) => {
  process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
  process.exit(1);
});
