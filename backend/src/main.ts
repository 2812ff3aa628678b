import 'reflect-metadata';
import { createApp } from './app';
import { firstAdministratorLink } from './features/people/first-administrator';
import { ExpireDepartures } from './jobs/expire-departures';
import { Person } from './models';
import { readConfig } from './platform/config';
import { Housekeeping } from './platform/housekeeping';
import { closeDatabase, openDatabase } from './platform/database';
import { createLogger } from './platform/logger';
import { StartRefusal } from './platform/start-refusal';
import { drain, listen, portOf } from './server';
import type { Services } from './services';
import { startServices, stopServices } from './start-services';

async function main(): Promise<void> {
  const config = readConfig(process.env, __dirname);
  const logger = createLogger(config.logLevel);
  const database = openDatabase(config.databaseUrl, logger);
  try {
    const services = await startServices(config, logger, database);
    try {
      await serve(services);
    } finally {
      await stopServices(services);
    }
  } finally {
    await closeDatabase(database);
  }
}

/** Serves until the process is told to stop and the last request is answered. */
async function serve(services: Services): Promise<void> {
  const { config, logger } = services;
  if (config.production && (await Person.count({ where: { demonstration: true } })) > 0) {
    throw new StartRefusal(
      'demonstration-data-in-production',
      'This database holds demonstration people with published passwords: use another database in production.',
    );
  }
  const told = new Promise<string>((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => resolve(signal));
  });
  const server = await listen(createApp(services), config);
  const housekeeping = new Housekeeping(services.sequelize, logger);
  housekeeping.start();
  const departures = new ExpireDepartures(services);
  departures.start();
  logger.info({ port: portOf(server), demonstration: config.demonstration }, 'listening');
  const link = await firstAdministratorLink(services);
  // On stdout and not in the log, which may be kept where others read it.
  if (link !== null)
    process.stdout.write(`Nobody administers this product yet. Become the first here (works once):\n${link}\n`);
  logger.info({ signal: await told }, 'stopping');
  housekeeping.stop();
  await departures.stop();
  services.streams.stop();
  await drain(server);
}

main().catch((error: unknown) => {
  if (error instanceof StartRefusal) {
    process.stderr.write(`${error.message}\n`);
    process.exitCode = error.exitCode;
  } else {
    process.stderr.write(`${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`);
    process.exitCode = 1;
  }
});
