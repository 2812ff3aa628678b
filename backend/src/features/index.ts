import type { Route } from '../middleware/routes';
import { liveRoutes } from './live/live-routes';
import { peopleRoutes } from './people/people-routes';
import { sessionRoutes } from './session/session-routes';
import { systemRoutes } from './system/system-routes';

/** The whole route table of the product. A new feature is one more line here. */
export const routes: readonly Route[] = [
  ...systemRoutes(() => routes),
  ...sessionRoutes,
  ...peopleRoutes,
  ...liveRoutes,
];
