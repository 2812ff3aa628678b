import 'reflect-metadata';
import type { Express } from 'express';
import * as fs from 'node:fs';
import * as os from 'node:os';
import * as path from 'node:path';
import { createApp } from '../src/app';
import { routes as allRoutes } from '../src/features';
import type { Route } from '../src/middleware/routes';
import { type Config, readConfig } from '../src/platform/config';
import { createLogger } from '../src/platform/logger';
import type { Services } from '../src/services';
import { startServices, stopServices } from '../src/start-services';

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
  const services: Services = { ...(await startServices(config, createLogger(config.logLevel))), ...options.services };
  return {
    app: createApp(services, options.routes ?? allRoutes),
    services,
    close: async () => {
      await stopServices(services);
      fs.rmSync(dataDirectory, { recursive: true, force: true });
    },
  };
}
