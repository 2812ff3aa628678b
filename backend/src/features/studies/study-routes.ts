import type { StudySummary } from '@shared/contract';
import { verdictCounts } from '@shared/study';
import * as z from 'zod';
import { rememberAnswer } from '../../middleware/idempotency';
import { Answer, personRoute, type Route } from '../../middleware/routes';
import { Membership } from '../../models/membership';
import { Study } from '../../models/study';
import type { Services } from '../../services';
import { createStudy } from '../../study/study-creation';

const NewStudyBody = z.strictObject({
  key: z
    .string()
    .regex(/^[A-Z][A-Z0-9-]{1,30}$/, 'must be 2 to 31 capital letters, digits or hyphens, starting with a letter'),
  name: z.string().trim().min(1).max(120),
  summary: z.string().trim().max(1000).default(''),
  concept: z.string().trim().max(120).default(''),
  phase: z.string().trim().max(60).default('concept'),
});

/** Studies as a person sees them: those they have a role in. */
export const studyRoutes: readonly Route[] = [
  personRoute({
    method: 'get',
    path: '/api/studies',
    summary: 'Studies that you have a role in, with how they stand',
    permission: 'signed-in',
    handler: async ({ person, services }) => ({ studies: await summariesFor(services, person.id) }),
  }),
  personRoute({
    method: 'post',
    path: '/api/studies',
    summary: 'Start a study; whoever starts it is its requirements owner and analyst',
    permission: 'signed-in',
    body: NewStudyBody,
    status: 201,
    handler: ({ body, person, services, idempotency }) =>
      services.sequelize.transaction(async (transaction) => {
        const study = await createStudy(
          services.sequelize,
          body,
          [{ personId: person.id, roles: ['requirements-owner', 'analyst'] }],
          transaction,
        );
        const answer = { key: study.key };
        if (idempotency) await rememberAnswer(transaction, idempotency, { status: 201, body: answer });
        return new Answer(201, answer);
      }),
  }),
];

async function summariesFor(services: Services, personId: string): Promise<StudySummary[]> {
  const memberships = await Membership.findAll({ where: { personId }, raw: true });
  const studies = await Study.findAll({
    where: { id: memberships.map((membership) => membership.studyId) },
    order: ['name'],
    raw: true,
  });
  const summaries: StudySummary[] = [];
  for (const study of studies) {
    const { proof, revision } = await services.studies.now(study.id);
    const settings = proof.study.settings;
    summaries.push({
      key: study.key,
      name: study.name,
      summary: settings.summary,
      concept: settings.concept,
      phase: settings.phase,
      revision,
      roles: memberships.find((membership) => membership.studyId === study.id)?.roles ?? [],
      counts: verdictCounts({ proof }),
    });
  }
  return summaries;
}
