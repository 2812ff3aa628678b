import { QueryTypes } from 'sequelize';
import { personOfSession } from '../../middleware/authenticate';
import { ProblemError } from '../../middleware/problems';
import { type Route, STREAMED, studyRead } from '../../middleware/routes';

/** The live stream of a study. */
export const liveRoutes: readonly Route[] = [
  studyRead({
    path: '/api/studies/:study/events',
    summary: 'Follow the study: the current revision, then every further one as server-sent events',
    permission: 'member',
    handler: ({ request, response, person, study, services }) => {
      if (request.get('accept')?.includes('text/event-stream') !== true) {
        throw new ProblemError(406, 'bad-input', 'Not acceptable', 'This address only answers with text/event-stream.');
      }
      const { sequelize, config, streams } = services;
      streams.start({
        response,
        personId: person.id,
        studyId: study.id,
        revision: study.revision,
        lastSeen: lastSeenRevision(request.get('last-event-id')),
        mayStillRead: async () => {
          const still = await personOfSession(sequelize, request.sessionID, person.id, config.sessionLimits, false);
          if (still === null) return false;
          const rows = await sequelize.query('SELECT 1 FROM memberships WHERE study_id = $1 AND person_id = $2', {
            bind: [study.id, person.id],
            type: QueryTypes.SELECT,
          });
          return rows.length > 0;
        },
      });
      return STREAMED;
    },
  }),
];

function lastSeenRevision(header: string | undefined): number | null {
  return header !== undefined && /^\d{1,15}$/.test(header) ? Number(header) : null;
}
