import { Router, type Request, type RequestHandler, type Response } from 'express';
import * as z from 'zod';
import type { Services } from '../services';
import type { Permission, SignedInPerson, StudyAccess, StudyPermission } from './access';
import {
  AlreadyAnswered,
  type IdempotencyKey,
  readIdempotencyKey,
  recalledAnswer,
  rememberAnswer,
  wasRemembered,
} from './idempotency';
import { readJsonBody } from './json-body';
import { parseBy } from './parse';
import { Forbidden, NotFound, NotSignedIn } from './problems';
import { Answer, checkRoutes, needsIdempotencyKey, type Route, STREAMED } from './routes';
import { accessStudy } from './study-access';

const nothing = z.strictObject({});

/** Turns the checked route table into a router. This is the only place where an address under /api is opened. */
export function mountRoutes(routes: readonly Route[], services: Services): Router {
  checkRoutes(routes);
  const router = Router({ caseSensitive: true });
  for (const route of routes) router[route.method](route.path, serve(route, services));
  return router;
}

/** Authenticate, permission, parse, handler: the same order for every route. */
function serve(route: Route, services: Services): RequestHandler {
  return async (request, response) => {
    const person = request.user ?? null;
    checkPermission(route.permission, person);
    const study = await studyOf(route, request, person, services);
    const { study: _key, ...pathParams } = request.params as Record<string, string>;
    const params = parseBy(route.params ?? nothing, pathParams, 'path');
    const query = parseBy(route.query ?? nothing, request.query, 'query');
    const sent = route.body === undefined ? undefined : await readJsonBody(request, response);
    const idempotency =
      needsIdempotencyKey(route) && person !== null
        ? readIdempotencyKey(
            request.get('idempotency-key'),
            { personId: person.id, studyId: study?.id ?? null },
            { method: route.method, path: request.path, body: sent },
          )
        : null;
    const body = route.body === undefined ? undefined : parseBy(route.body, sent, '');
    // The table has tied the handler's type to these schemas; here the types are erased.
    const call = { params, query, body, services, request, response, person, study, idempotency } as never;
    const result = await answerOnce(idempotency, services, route, () => route.handler(call));
    if (result !== STREAMED) send(response, asAnswer(result, route));
  };
}

function checkPermission(permission: Permission | StudyPermission, person: SignedInPerson | null): void {
  if (permission === 'public') return;
  if (person === null) throw new NotSignedIn();
}

/** Resolves the study of a study route; outside studies, the administrator's right is checked here. */
async function studyOf(
  route: Route,
  request: Request,
  person: SignedInPerson | null,
  services: Services,
): Promise<StudyAccess | null> {
  if (route.scope === 'product') {
    if (route.permission === 'administrator' && person?.administrator !== true) {
      throw new Forbidden('Only an administrator may do this.');
    }
    return null;
  }
  const key = request.params['study'];
  if (person === null || typeof key !== 'string') throw new NotFound();
  return accessStudy(services.sequelize, key, person, route.permission as StudyPermission);
}

/** Runs the handler of a write at most once per idempotency key; a repeated request gets the answer once given. */
async function answerOnce(
  idempotency: IdempotencyKey | null,
  services: Services,
  route: Route,
  handle: () => unknown,
): Promise<unknown> {
  if (idempotency === null) return handle();
  const before = await recalledAnswer(services.sequelize, idempotency);
  if (before !== null) return new Answer(before.status, before.body ?? undefined);
  try {
    const result = await handle();
    if (result !== STREAMED && !wasRemembered(idempotency)) {
      await services.sequelize.transaction((transaction) =>
        rememberAnswer(transaction, idempotency, asAnswer(result, route)),
      );
    }
    return result;
  } catch (error) {
    if (!(error instanceof AlreadyAnswered)) throw error;
    const meanwhile = await recalledAnswer(services.sequelize, idempotency);
    if (meanwhile === null) throw error;
    return new Answer(meanwhile.status, meanwhile.body ?? undefined);
  }
}

function asAnswer(result: unknown, route: Route): Answer {
  return result instanceof Answer ? result : new Answer(route.status, result);
}

function send(response: Response, answer: Answer): void {
  response.status(answer.status).set('Cache-Control', 'no-store');
  if (answer.body === undefined) response.end();
  else response.json(answer.body);
}
