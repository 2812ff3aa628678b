import type { Request, Response } from 'express';
import * as z from 'zod';
import type { Services } from '../services';
import type { Permission, SignedInPerson, StudyAccess, StudyPermission } from './access';
import type { IdempotencyKey } from './idempotency';

export type Method = 'get' | 'post' | 'put' | 'patch' | 'delete';

/** What every handler gets: the parsed parts of the request and the services. */
export interface Call<P, Q, B> {
  readonly params: P;
  readonly query: Q;
  readonly body: B;
  readonly services: Services;
  readonly request: Request;
  readonly response: Response;
}
export interface PersonCall<P, Q, B> extends Call<P, Q, B> {
  readonly person: SignedInPerson;
  /** Present on every write under /api/studies. */
  readonly idempotency: IdempotencyKey | null;
}
export interface StudyCall<P, Q, B> extends PersonCall<P, Q, B> {
  readonly study: StudyAccess;
}
/** A write inside a study always carries its idempotency key. */
export interface StudyWriteCall<P, Q, B> extends StudyCall<P, Q, B> {
  readonly idempotency: IdempotencyKey;
}

/** An answer other than 200 with a JSON body. */
export class Answer {
  constructor(
    readonly status: number,
    readonly body?: unknown,
  ) {}
}
/** 204: done, nothing to say. */
export const NO_CONTENT = new Answer(204);
/** Returned by a handler that writes its answer itself (a file, a stream of events). */
export const STREAMED = Symbol('streamed');

type Empty = z.ZodObject<Record<never, never>, z.core.$strict>;

interface Declaration<P extends z.ZodType, Q extends z.ZodType, B extends z.ZodType> {
  /** Full path, e.g. `/api/studies/:study/quantities/:key`. */
  readonly path: `/api/${string}`;
  /** What it does, in one line, for the API document. */
  readonly summary: string;
  /** Strict schema of the parameters in the path, other than `:study` of a study route. */
  readonly params?: P;
  /** Strict schema of the query; without one no query parameter is accepted. */
  readonly query?: Q;
  /** Strict schema of the JSON body; without one no body is read. */
  readonly body?: B;
  /** Schema of the answer's body, for the API document. */
  readonly answer?: z.ZodType;
  /** Status of success, for the API document; 200 unless said otherwise. */
  readonly status?: number;
}
interface Handled<C> {
  readonly handler: (call: C) => unknown;
}

/** One line of the route table, with its types erased. Only the functions below make one. */
export interface Route {
  readonly method: Method;
  readonly path: string;
  readonly summary: string;
  readonly scope: 'product' | 'study';
  readonly permission: Permission | StudyPermission;
  readonly params: z.ZodType | undefined;
  readonly query: z.ZodType | undefined;
  readonly body: z.ZodType | undefined;
  readonly answer: z.ZodType | undefined;
  readonly status: number;
  readonly handler: (call: never) => unknown;
}

/** A route that anybody may call, signed in or not. */
export function publicRoute<P extends z.ZodType = Empty, Q extends z.ZodType = Empty, B extends z.ZodType = Empty>(
  route: Declaration<P, Q, B> & Handled<Call<z.output<P>, z.output<Q>, z.output<B>>> & { readonly method: Method },
): Route {
  return erased(route, 'product', 'public');
}

/** A route for whoever is signed in, or for administrators, outside any study. */
export function personRoute<P extends z.ZodType = Empty, Q extends z.ZodType = Empty, B extends z.ZodType = Empty>(
  route: Declaration<P, Q, B> &
    Handled<PersonCall<z.output<P>, z.output<Q>, z.output<B>>> & {
      readonly method: Method;
      readonly permission: 'signed-in' | 'administrator';
    },
): Route {
  return erased(route, 'product', route.permission);
}

/** A read inside the study named by `:study`; the call carries the study and the person's roles in it. */
export function studyRead<P extends z.ZodType = Empty, Q extends z.ZodType = Empty>(
  route: Omit<Declaration<P, Q, Empty>, 'body'> &
    Handled<StudyCall<z.output<P>, z.output<Q>, z.output<Empty>>> & { readonly permission: StudyPermission },
): Route {
  return erased({ ...route, method: 'get' }, 'study', route.permission);
}

/** A write inside the study named by `:study`; needs an Idempotency-Key, which the call carries. */
export function studyWrite<P extends z.ZodType = Empty, Q extends z.ZodType = Empty, B extends z.ZodType = Empty>(
  route: Declaration<P, Q, B> &
    Handled<StudyWriteCall<z.output<P>, z.output<Q>, z.output<B>>> & {
      readonly method: Exclude<Method, 'get'>;
      readonly permission: StudyPermission;
    },
): Route {
  return erased(route, 'study', route.permission);
}

function erased(
  route: Declaration<z.ZodType, z.ZodType, z.ZodType> & { readonly method: Method; readonly handler: Route['handler'] },
  scope: Route['scope'],
  permission: Route['permission'],
): Route {
  const { method, path, summary, params, query, body, answer, status = 200, handler } = route;
  return { method, path, summary, scope, permission, params, query, body, answer, status, handler };
}

/** Whether a route needs an Idempotency-Key: every write under /api/studies. */
export function needsIdempotencyKey(route: Route): boolean {
  return route.method !== 'get' && /^\/api\/studies(\/|$)/.test(route.path);
}

/** Checks the table as a whole at start-up; throws with every fault: no policy, loose schema, unnamed parameter, double. */
export function checkRoutes(routes: readonly Route[]): void {
  const faults = routes.flatMap((route) => faultsOf(route).map((fault) => `${route.method} ${route.path}: ${fault}`));
  const seen = new Set<string>();
  for (const { method, path } of routes) {
    const address = `${method} ${path.replace(/:[A-Za-z]+/g, ':')}`;
    if (seen.has(address)) faults.push(`${method} ${path}: declared twice`);
    seen.add(address);
  }
  if (faults.length > 0) throw new Error(`The route table is not sound.\n${faults.join('\n')}`);
}

function faultsOf(route: Route): string[] {
  const faults: string[] = [];
  // Types say that there is a policy; a table assembled past the types must still not open a door.
  if ((route.permission as unknown) === undefined) faults.push('has no permission');
  if (!route.path.startsWith('/api/')) faults.push('does not lie under /api');
  const inStudy = route.path === '/api/studies/:study' || route.path.startsWith('/api/studies/:study/');
  if (inStudy !== (route.scope === 'study'))
    faults.push('must be a study route exactly if it lies under /api/studies/:study');
  if (route.method === 'get' && route.body !== undefined) faults.push('reads a body although it is a GET');
  const inPath = [...route.path.matchAll(/:([A-Za-z]+)/g)]
    .map((match) => match[1] ?? '')
    .filter((name) => name !== 'study');
  const declared = route.params instanceof z.ZodObject ? Object.keys(route.params.shape) : [];
  if (inPath.toSorted().join() !== declared.toSorted().join()) {
    faults.push(
      `has the parameters ${inPath.join(', ') || 'none'} in its path but declares ${declared.join(', ') || 'none'}`,
    );
  }
  for (const part of ['params', 'query', 'body'] as const) {
    if (!isStrict(route[part])) faults.push(`accepts unknown fields in its ${part}: use z.strictObject`);
  }
  return faults;
}

interface ObjectSchema {
  readonly type?: unknown;
  readonly additionalProperties?: unknown;
  readonly anyOf?: readonly ObjectSchema[];
  readonly oneOf?: readonly ObjectSchema[];
}

function isStrict(schema: z.ZodType | undefined): boolean {
  if (schema === undefined) return true;
  const closed = (part: ObjectSchema): boolean => {
    const alternatives = part.anyOf ?? part.oneOf;
    if (alternatives !== undefined) return alternatives.every(closed);
    return part.type === 'object' && part.additionalProperties === false;
  };
  return closed(z.toJSONSchema(schema, { io: 'input', unrepresentable: 'any', reused: 'inline' }));
}
