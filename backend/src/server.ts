import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Express } from 'express';
import type { Config } from './platform/config';
import { StartRefusal } from './platform/start-refusal';

const HEADERS_TIMEOUT_MS = 10_000;
const REQUEST_TIMEOUT_MS = 30_000;
const MOST_CONNECTIONS = 2000;
const DRAIN_MS = 10_000;

/** Listens; resolves with the server once it takes requests. Throws a StartRefusal when the port cannot be had. */
export async function listen(app: Express, { host, port }: Pick<Config, 'host' | 'port'>): Promise<Server> {
  const server = createServer({ headersTimeout: HEADERS_TIMEOUT_MS, requestTimeout: REQUEST_TIMEOUT_MS }, app);
  server.maxConnections = MOST_CONNECTIONS;
  await new Promise<void>((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => {
      reject(
        new StartRefusal(
          'port-not-available',
          `Port ${port} on ${host} cannot be used (${error.code}): free it or set PORT.`,
        ),
      );
    });
    server.listen(port, host, () => resolve());
  });
  return server;
}

/** The port that the server really has. */
export function portOf(server: Server): number {
  return (server.address() as AddressInfo).port;
}

/** Takes no more requests and resolves when those being served are done, or after ten seconds. */
export async function drain(server: Server): Promise<void> {
  await new Promise<void>((resolve) => {
    const deadline = setTimeout(() => {
      server.closeAllConnections();
      resolve();
    }, DRAIN_MS);
    server.close(() => {
      clearTimeout(deadline);
      resolve();
    });
    server.closeIdleConnections();
  });
}
