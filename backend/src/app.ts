import express, { type Express } from 'express';
import { routes as allRoutes } from './features';
import { clientPages } from './middleware/client-pages';
import { refuseCrossSite } from './middleware/cross-site';
import { mountRoutes } from './middleware/mount-routes';
import { problemAnswers, unknownAddress } from './middleware/problem-answers';
import { requestId } from './middleware/request-id';
import type { Route } from './middleware/routes';
import { securityHeaders } from './middleware/security-headers';
import { sessions } from './middleware/session';
import type { Services } from './services';

/** The Express app without listening. Throws when the route table is not sound. */
export function createApp(services: Services, routes: readonly Route[] = allRoutes): Express {
  const { config, logger, authenticator, throttles } = services;
  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.trustedProxies);
  app.use(requestId(logger), ...securityHeaders(config.publicUrl.protocol === 'https:'));
  app.use('/api', refuseCrossSite(config.publicUrl), sessions(services), authenticator.readSession);
  app.use('/api', async (request, _response, next) => {
    const person = request.user;
    if (person !== undefined) await throttles.countRequest(person.id);
    next();
  });
  app.use(mountRoutes(routes, services));
  app.use('/api', unknownAddress);
  app.use(clientPages(config.clientDirectory));
  app.use(problemAnswers(logger));
  return app;
}
