import type { Route } from '../middleware/routes';
import { liveRoutes } from './live/live-routes';
import { peopleRoutes } from './people/people-routes';
import { sessionRoutes } from './session/session-routes';
import { editRoutes } from './edits/edit-routes';
import { exportRoutes } from './exports/export-routes';
import { methodRoutes } from './methods/method-routes';
import { studyRoutes } from './studies/study-routes';
import { systemRoutes } from './system/system-routes';
import { viewRoutes } from './views/view-routes';

/** The whole route table of the product. A new feature is one more line here. */
export const routes: readonly Route[] = [
  ...systemRoutes(() => routes),
  ...sessionRoutes,
  ...peopleRoutes,
  ...studyRoutes,
  ...viewRoutes,
  ...editRoutes,
  ...exportRoutes,
  ...methodRoutes,
  ...liveRoutes,
];
