import type { RequestHandler } from 'express';
import { ProblemError } from './problems';

const SAFE_METHODS = ['GET', 'HEAD', 'OPTIONS'];

/**
 * Refuses requests that another site makes a browser send: anything with an effect, and live streams. The browser says
 * where a request comes from (Sec-Fetch-Site); where it does not, Origin must be our own address.
 */
export function refuseCrossSite(publicUrl: URL): RequestHandler {
  const ownOrigin = publicUrl.origin;
  return (request, _response, next) => {
    const hasEffect = !SAFE_METHODS.includes(request.method);
    const isStream = request.get('accept')?.includes('text/event-stream') === true;
    if (!hasEffect && !isStream) {
      next();
      return;
    }
    const fetchSite = request.get('sec-fetch-site');
    const sameOrigin = fetchSite === undefined ? request.get('origin') === ownOrigin : fetchSite === 'same-origin';
    if (!sameOrigin) {
      throw new ProblemError(
        403,
        'cross-site',
        'From another site',
        `Requests are only taken from ${ownOrigin} itself.`,
      );
    }
    if (hasEffect && hasBody(request.headers) && !isOwnFormat(request)) {
      throw new ProblemError(
        415,
        'unsupported-media-type',
        'Unsupported format',
        `The body must be application/json; it came as ${request.get('content-type') ?? 'nothing'}.`,
      );
    }
    next();
  };
}

function hasBody(headers: NodeJS.Dict<string | string[]>): boolean {
  return headers['transfer-encoding'] !== undefined || (headers['content-length'] ?? '0') !== '0';
}

/** Formats that a plain HTML form of another site cannot send: JSON, or a file upload with our own header. */
function isOwnFormat(request: Parameters<RequestHandler>[0]): boolean {
  if (request.is('application/json')) return true;
  return Boolean(request.is('multipart/form-data')) && request.get('x-requested-with') === 'deltaproof';
}
