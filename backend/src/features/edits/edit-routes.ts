import { EditRequest } from '@shared/contract';
import { type Route, studyWrite } from '../../middleware/routes';

/** The one way in for every change to a study. */
export const editRoutes: readonly Route[] = [
  studyWrite({
    method: 'post',
    path: '/api/studies/:study/edits',
    summary: 'Apply commands as the next revision, or add them to the draft of a change request',
    permission: 'member',
    body: EditRequest,
    handler: ({ body, study, person, services, idempotency }) =>
      services.edits.edit({ studyId: study.id, personId: person.id, roles: study.roles }, body, { idempotency }),
  }),
];
