import 'reflect-metadata';
import { createApp } from './app';
import { firstAdministratorLink } from './features/people/first-administrator';
import { Person } from './models';
import { readConfig } from './platform/config';
import { Housekeeping } from './platform/housekeeping';
import { createLogger } from './platform/logger';
import { StartRefusal } from './platform/start-refusal';
import { drain, listen, portOf } from './server';
import { startServices, stopServices } from './start-services';

async function main(): Promise<void> {
  const config = readConfig(process.env, __dirname);
  const logger = createLogger(config.logLevel);
  const services = await startServices(config, logger);
  try {
    if (config.production && (await Person.count({ where: { demonstration: true } })) > 0) {
      throw new StartRefusal(
        'demonstration-data-in-production',
        'This database holds demonstration people with published passwords: use another database in production.',
      );
    }
    const server = await listen(createApp(services), config);
    const housekeeping = new Housekeeping(services.sequelize, logger);
    housekeeping.start();
    logger.info({ port: portOf(server), demonstration: config.demonstration }, 'listening');
    const link = await firstAdministratorLink(services);
    // On stdout and not in the log, which may be kept where others read it.
    if (link !== null)
      process.stdout.write(`Nobody administers this product yet. Become the first here (works once):\n${link}\n`);

    let stopping = false;
    const stop = async (signal: string): Promise<void> => {
      if (stopping) return;
      stopping = true;
      logger.info({ signal }, 'stopping');
      housekeeping.stop();
      services.streams.stop();
      await drain(server);
      await stopServices(services);
    };
    for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => void stop(signal));
  } catch (error) {
    await stopServices(services);
    throw error;
  }
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
