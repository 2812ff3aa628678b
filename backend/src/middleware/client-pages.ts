import express, { Router } from 'express';
import * as fs from 'node:fs';
import * as path from 'node:path';
import { NotFound } from './problems';
import { nonceOf } from './security-headers';

const HASHED_NAME = /-[A-Z0-9]{8}\.[a-z0-9]+$/;

/** Serves the built client: files as they are, and for every other address its page with the nonce of the request. */
export function clientPages(clientDirectory: string): Router {
  const router = Router();
  const page = readPage(path.join(clientDirectory, 'index.html'));
  const sendPage: express.RequestHandler = (_request, response) => {
    if (page === null) throw new NotFound('The client has not been built.');
    response
      .set('Cache-Control', 'no-store')
      .type('html')
      .send(page.replaceAll('__NONCE__', nonceOf(response)));
  };
  // index.html must never leave as a plain file: its placeholder would be everybody's nonce.

  router.get('/index.html', sendPage);
  router.use(
    express.static(clientDirectory, {
      index: false,
      redirect: false,
      setHeaders: (response, file) => {
        const forever = HASHED_NAME.test(file);
        response.setHeader('Cache-Control', forever ? 'public, max-age=31536000, immutable' : 'no-cache');
      },
    }),
  );

  router.get('/{*path}', sendPage);
  return router;
}

function readPage(file: string): string | null {
  try {
    return fs.readFileSync(file, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return null;
    throw error;
  }
}
