import type { RequestHandler, Response } from 'express';
import { randomUUID } from 'node:crypto';
import type { Logger } from '../platform/logger';

const ids = new WeakMap<Response, string>();

/** Gives every request an id, names it in the answer and logs one line per request: no address parameters, no contents. */
export function requestId(logger: Logger): RequestHandler {
  return (request, response, next) => {
    const id = randomUUID();
    ids.set(response, id);
    response.set('X-Request-Id', id);
    const start = process.hrtime.bigint();
    response.once('finish', () => {
      const milliseconds = Number((process.hrtime.bigint() - start) / 1000n) / 1000;
      logger.info(
        {
          requestId: id,
          method: request.method,
          path: request.path.slice(0, 200),
          status: response.statusCode,
          milliseconds,
        },
        'request',
      );
    });
    next();
  };
}

/** The id of the request that is being answered. */
export function requestIdOf(response: Response): string {
  return ids.get(response) ?? '';
}
