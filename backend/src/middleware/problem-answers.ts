import type { Problem } from '@shared/contract';
import type { ErrorRequestHandler, RequestHandler, Response } from 'express';
import type { Logger } from '../platform/logger';
import { HashingBusy } from '../platform/password-hashing';
import { NotFound, ProblemError } from './problems';
import { requestIdOf } from './request-id';

/** Answers with problem+json; never carries a stack, a statement or a value from the database. */
export function sendProblem(response: Response, problem: ProblemError): void {
  const body: Problem = {
    type: `urn:deltaproof:problem:${problem.code}`,
    title: problem.title,
    status: problem.status,
    detail: problem.message,
    code: problem.code,
    requestId: requestIdOf(response),
    ...(problem.fields === undefined ? {} : { fields: [...problem.fields] }),
    ...(problem.current === undefined ? {} : { current: problem.current }),
  };
  if (problem.retryAfterSeconds !== undefined) {
    response.set('Retry-After', String(Math.max(1, Math.ceil(problem.retryAfterSeconds))));
  }
  response.status(problem.status).set('Cache-Control', 'no-store').type('application/problem+json');
  response.send(JSON.stringify(body));
}

/** Whatever is asked for under /api and not in the route table does not exist. */
export const unknownAddress: RequestHandler = () => {
  throw new NotFound('There is no such address in this product.');
};

/** The one place where errors become answers. */
export function problemAnswers(logger: Logger): ErrorRequestHandler {
  return (error: unknown, _request, response, next) => {
    if (response.headersSent) {
      logger.error({ err: error, requestId: requestIdOf(response) }, 'failed after the answer had begun');
      next(error);
      return;
    }
    const problem = asProblem(error);
    if (problem.status >= 500) logger.error({ err: error, requestId: requestIdOf(response) }, 'request failed');
    sendProblem(response, problem);
  };
}

function asProblem(error: unknown): ProblemError {
  if (error instanceof ProblemError) return error;
  if (error instanceof HashingBusy) {
    return new ProblemError(503, 'busy', 'Busy', 'Too many people are signing in just now. Try again in a moment.', {
      retryAfterSeconds: 2,
    });
  }
  // Express and its parts mark what a client did wrong (an address that cannot be decoded, for example).
  const status = (error as { status?: unknown; expose?: unknown } | null)?.status;
  if (typeof status === 'number' && status >= 400 && status < 500) {
    return new ProblemError(status, 'bad-input', 'Not accepted', 'The request cannot be read.');
  }
  if (isDatabaseAway(error)) {
    return new ProblemError(503, 'busy', 'Busy', 'The database is not reachable just now. Nothing was applied.', {
      retryAfterSeconds: 2,
    });
  }
  return new ProblemError(
    500,
    'internal',
    'Failed',
    'Something failed on the server. The request id finds it in the log.',
  );
}

function isDatabaseAway(error: unknown): boolean {
  const name = error instanceof Error ? error.name : '';
  return name.startsWith('SequelizeConnection') || name === 'SequelizeHostNotFoundError';
}
