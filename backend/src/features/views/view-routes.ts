import { StandpointText } from '@shared/contract';
import {
  analysesView,
  analysisSheet,
  baselinesView,
  bindableView,
  changeSheet,
  changesView,
  complianceView,
  impactOf,
  newId,
  overviewView,
  productTreeView,
  quantitiesView,
  requirementSheet,
  requirementsView,
  searchView,
  studyHead,
  type ViewContext,
} from '@shared/study';
import * as z from 'zod';
import { NotFound } from '../../middleware/problems';
import { type Route, studyRead } from '../../middleware/routes';
import {
  dispositionRevision,
  baselineCounts,
  directEditsSince,
  membersOf,
  movesOf,
  recordsView,
  turnedBy,
} from './view-facts';

const At = z.strictObject({ at: StandpointText });
const Key = z.strictObject({ key: z.string().max(40) });

type Read = Parameters<typeof studyRead>[0];
type ReadCall = Parameters<Read['handler']>[0];

/** One read model at a standpoint, the same way for every screen. */
function view(
  path: `/api/${string}`,
  summary: string,
  answer: (context: ViewContext, call: ReadCall) => unknown,
): Route {
  return studyRead({
    path,
    summary,
    permission: 'member',
    query: At,
    handler: async (call) =>
      answer(
        await call.services.standpoints.context(call.study, call.person, call.query.at),
        call as unknown as ReadCall,
      ),
  });
}

/** One item at a standpoint; what is not there is not found. */
function sheet(
  path: `/api/${string}`,
  summary: string,
  answer: (context: ViewContext, key: string, call: ReadCall) => unknown,
): Route {
  return studyRead({
    path,
    summary,
    permission: 'member',
    params: Key,
    query: At,
    handler: async (call) => {
      const context = await call.services.standpoints.context(call.study, call.person, call.query.at);
      const found = await answer(context, call.params.key, call);
      if (found === null)
        throw new NotFound(`There is no ${call.params.key} in this study at ${context.standpoint.label}.`);
      return found;
    },
  });
}

/** The one way out for reads: every screen's read model, from every standpoint. */
export const viewRoutes: readonly Route[] = [
  view(
    '/api/studies/:study',
    'What the title block shows: study, standpoint, baseline in force, your roles',
    async (context, { services, study }) => studyHead(context, await membersOf(services.sequelize, study.id)),
  ),
  view(
    '/api/studies/:study/overview',
    'Whether the study closes, what fails, what drives it, what waits for you',
    async (context, { services, study }) =>
      overviewView(context, { edits: await directEditsSince(services.sequelize, study.id, context) }),
  ),
  view(
    '/api/studies/:study/requirements',
    'The flow-down with limits, computed values, margins, verdicts and budgets',
    requirementsView,
  ),
  sheet(
    '/api/studies/:study/requirements/:key',
    'One requirement with its proof',
    async (context, key, { services, study }) =>
      requirementSheet(context, key, {
        moves: await movesOf(services.sequelize, study.id, context, key),
        turnedBy: await turnedBy(services.sequelize, study.id, context, key),
      }),
  ),
  view('/api/studies/:study/product-tree', 'The product tree with what is allocated to each element', productTreeView),
  view(
    '/api/studies/:study/quantities',
    'The quantities with values, uncertainties and what rests on them',
    quantitiesView,
  ),
  view('/api/studies/:study/analyses', 'The analyses with what they verify', analysesView),
  sheet('/api/studies/:study/analyses/:key', 'One analysis with inputs, lines and results', analysisSheet),
  view('/api/studies/:study/bindable', 'What an analysis input can be bound to', bindableView),
  view('/api/studies/:study/compliance', 'The compliance matrix, bad news first', complianceView),
  view('/api/studies/:study/changes', 'The change requests', changesView),
  sheet(
    '/api/studies/:study/changes/:key',
    'One change request with what its approval would do',
    async (context, key, { services, study }) => {
      const change = context.proof.study.byKey('change', key);
      if (!change) return null;
      const { sequelize, standpoints } = services;
      const personName = (id: string): string => context.people.get(id) ?? 'a former member';
      const decided = change.state === 'approved' || change.state === 'rejected';
      const disposedAt = decided ? await dispositionRevision(sequelize, study.id, change.id) : null;
      // What a decided request did is told from the study just before its disposition.
      const before = disposedAt === null ? context.proof : await standpoints.revisionProof(study.id, disposedAt - 1);
      const then = before.study.get('change', change.id) ?? change;
      const revision = disposedAt === null ? context.standpoint.revision : disposedAt - 1;
      const impact = impactOf(before, then, { newId: () => newId(), at: context.provedAt, personName, revision });
      const members = await membersOf(sequelize, study.id);
      return changeSheet(context, key, impact, {
        members,
        disposedAt,
        before: disposedAt === null ? null : before.study,
      });
    },
  ),
  view(
    '/api/studies/:study/baselines',
    'The baselines, and what a new one would take in',
    async (context, { services, study }) => baselinesView(context, await baselineCounts(services, study, context)),
  ),
  studyRead({
    path: '/api/studies/:study/records',
    summary: 'The ledger, newest first',
    permission: 'member',
    query: z.strictObject({
      at: StandpointText,
      before: z.coerce.number().int().min(1).optional(),
      limit: z.coerce.number().int().min(1).max(200).default(50),
    }),
    handler: async ({ services, study, person, query }) => {
      const context = await services.standpoints.context(study, person, query.at);
      return recordsView(
        services.sequelize,
        study.id,
        context,
        query.before ?? context.standpoint.revision + 1,
        query.limit,
      );
    },
  }),
  studyRead({
    path: '/api/studies/:study/search',
    summary: 'Items by key or word',
    permission: 'member',
    query: z.strictObject({ at: StandpointText, q: z.string().max(100).default('') }),
    handler: async ({ services, study, person, query }) => ({
      hits: searchView(await services.standpoints.context(study, person, query.at), query.q),
    }),
  }),
];
