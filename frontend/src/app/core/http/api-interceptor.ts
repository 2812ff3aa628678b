import { type HttpEvent, type HttpHandlerFn, type HttpRequest } from '@angular/common/http';
import { inject } from '@angular/core';
import { type Observable, catchError, throwError } from 'rxjs';
import { SignedOut } from '../session/signed-out';
import { toProblem } from './problem-error';

const WRITES = new Set(['POST', 'PUT', 'PATCH', 'DELETE']);

/**
 * Every call to our API: writes carry JSON and an idempotency key (so a repeated request has one effect), failures
 * become ProblemError, and an expired session is announced once.
 */
export function apiInterceptor(request: HttpRequest<unknown>, next: HttpHandlerFn): Observable<HttpEvent<unknown>> {
  if (!request.url.startsWith('/api/')) return next(request);
  const signedOut = inject(SignedOut);
  return next(WRITES.has(request.method) ? asWrite(request) : request).pipe(
    catchError((error: unknown) => {
      const problem = toProblem(error);
      if (problem.status === 401 && !request.url.startsWith('/api/session')) signedOut.announce();
      return throwError(() => problem);
    }),
  );
}

function asWrite(request: HttpRequest<unknown>): HttpRequest<unknown> {
  let headers = request.headers;
  if (!headers.has('Idempotency-Key')) headers = headers.set('Idempotency-Key', crypto.randomUUID());
  // A form upload must keep the boundary that the browser writes into its own content type.
  // The own header takes the place of the JSON type as the sign that no other site's form sent it.
  if (request.body instanceof FormData)
    return request.clone({ headers: headers.set('X-Requested-With', 'deltaproof') });
  if (!headers.has('Content-Type')) headers = headers.set('Content-Type', 'application/json');
  return request.clone({ headers, body: request.body ?? {} });
}
