import type { RequestHandler, Response } from 'express';
import helmet from 'helmet';
import type { ServerResponse } from 'node:http';
import { randomBytes } from 'node:crypto';

const nonces = new WeakMap<ServerResponse, string>();

/**
 * A content security policy without unsafe-inline and unsafe-eval: scripts and styles are ours or carry the request's
 * nonce. Fonts and images may come as data addresses because the grid's icons and exported pictures do.
 */
export function securityHeaders(https: boolean): RequestHandler[] {
  const nonce = (_request: unknown, response: ServerResponse): string => `'nonce-${nonceOf(response)}'`;
  return [
    (_request, response, next) => {
      nonces.set(response, randomBytes(18).toString('base64'));
      next();
    },
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          defaultSrc: ["'none'"],
          scriptSrc: ["'self'", nonce],
          styleSrc: ["'self'", nonce],
          fontSrc: ["'self'", 'data:'],
          imgSrc: ["'self'", 'data:', 'blob:'],
          connectSrc: ["'self'"],
          baseUri: ["'self'"],
          formAction: ["'self'"],
          frameAncestors: ["'none'"],
          objectSrc: ["'none'"],
        },
      },
      strictTransportSecurity: https ? { maxAge: 31_536_000, includeSubDomains: false } : false,
      referrerPolicy: { policy: 'no-referrer' },
      xFrameOptions: { action: 'deny' },
      crossOriginEmbedderPolicy: false,
    }),
  ];
}

/** The nonce of the answer that is being made. */
export function nonceOf(response: ServerResponse | Response): string {
  return nonces.get(response) ?? '';
}
