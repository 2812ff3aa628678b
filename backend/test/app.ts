import 'reflect-metadata';
import type { Express } from 'express';
import * as fs from 'node:fs';
import * as os from 'node:os';
import * as path from 'node:path';
import { createApp } from '../src/app';
import { routes as allRoutes } from '../src/features';
import type { Route } from '../src/middleware/routes';
import { type Config, readConfig } from '../src/platform/config';
import { closeDatabase, type Database, openDatabase } from '../src/platform/database';
import { createLogger } from '../src/platform/logger';
import type { Services } from '../src/services';
import { startServices, stopServices } from '../src/start-services';

// Starting an app and signing people in takes long where many processes share two cores; a hang still shows.
jest.setTimeout(60_000);

/** The address that the app under test believes to have; requests must claim to come from it. */
export const TEST_ORIGIN = 'http://localhost:4310';

export interface TestApp {
  readonly app: Express;
  readonly services: Services;
  close(): Promise<void>;
}

export interface TestAppOptions {
  readonly config?: Partial<Config>;
  readonly environment?: NodeJS.ProcessEnv;
  readonly services?: Partial<Services>;
  readonly routes?: readonly Route[];
}

/** Model classes belong to one connection per process, so apps that run side by side in a test share it. */
let shared: { readonly database: Database; readonly apps: number } | null = null;

/** The whole app on this test file's own database: light password hashing, no logging, mails kept in the catcher. */
export async function createTestApp(options: TestAppOptions = {}): Promise<TestApp> {
  const dataDirectory = fs.mkdtempSync(path.join(os.tmpdir(), 'deltaproof-app-'));
  const config: Config = {
    ...readConfig(
      {
        DATABASE_URL: process.env['TEST_DATABASE_URL'],
        DATA_DIR: dataDirectory,
        PUBLIC_URL: TEST_ORIGIN,
        DEMO: '1',
        ALLOW_UNSAFE_DATABASE: '1',
        LOG_LEVEL: 'silent',
        ...options.environment,
      },
      dataDirectory,
    ),
    passwordHashing: { memoryKiB: 19 * 1024, passes: 2 },
    ...options.config,
  };
  const logger = createLogger(config.logLevel);
  const database = shared?.database ?? openDatabase(config.databaseUrl, logger);
  shared = { database, apps: (shared?.apps ?? 0) + 1 };
  const services: Services = { ...(await startServices(config, logger, database)), ...options.services };
  return {
    app: createApp(services, options.routes ?? allRoutes),
    services,
    close: async () => {
      await stopServices(services);
      shared = { database, apps: (shared?.apps ?? 1) - 1 };
      if (shared.apps === 0) {
        shared = null;
        await closeDatabase(database);
      }
      fs.rmSync(dataDirectory, { recursive: true, force: true });
    },
  };
}
