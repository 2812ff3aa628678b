import type { Role } from '@shared/contract';
import { ROLES } from '@shared/contract';
import { randomUUID } from 'node:crypto';
import { createTestApp, type TestApp } from '../../test/app';
import { type Agent, anonymousAgent, createStudy, freshKey, signedInAs } from '../../test/people';
import { routes } from '../features';
import type { Route } from './routes';

/** Addresses that answer without a session. Adding one here is a decision, not a formality. */
const PUBLIC = [
  'get /api/health',
  'get /api/about',
  'get /api/openapi.json',
  'get /api/demo/mail',
  'post /api/session',
  'post /api/session/password-reset',
  'post /api/password-resets/complete',
  'post /api/invitations/accept',
];

let testApp: TestApp;
let outsider: Agent;
let administrator: Agent;
const members = new Map<Role, Agent>();

beforeAll(async () => {
  testApp = await createTestApp();
  await createStudy('own', 'Own study');
  await createStudy('foreign', 'Foreign study');
  outsider = (await signedInAs(testApp, 'Outsider', { study: 'foreign', roles: [...ROLES] })).agent;
  administrator = (await signedInAs(testApp, 'Administrator', undefined, { administrator: true })).agent;
  for (const role of ROLES)
    members.set(role, (await signedInAs(testApp, `Member ${role}`, { study: 'own', roles: [role] })).agent);
});
afterAll(() => testApp.close());

/** Calls a route with parameters that name nothing; every check before the parameters is thereby seen. */
async function call(
  agent: Agent,
  route: Route,
  study: string,
): Promise<{ status: number; body: Record<string, unknown> }> {
  const address = route.path.replace(':study', study).replace(/:\w+/g, () => randomUUID());
  const answer = await agent[route.method](address).set(freshKey()).set('Accept', 'application/json');
  return { status: answer.status, body: answer.body as Record<string, unknown> };
}
const named = routes.map((route) => [`${route.method} ${route.path}`, route] as const);
const ofStudies = named.filter(([, route]) => route.scope === 'study');

it('opens exactly these addresses to everybody', () => {
  expect(named.filter(([, route]) => route.permission === 'public').map(([name]) => name)).toEqual(PUBLIC);
});

it.each(named.filter(([, route]) => route.permission !== 'public'))('%s needs a session', async (_name, route) => {
  const { status, body } = await call(anonymousAgent(testApp), route, 'own');
  expect([status, body['code']]).toEqual([401, 'not-signed-in']);
});

it.each(ofStudies)('%s says the same of a foreign and of a missing study', async (_name, route) => {
  const foreign = await call(outsider, route, 'own');
  const missing = await call(outsider, route, 'nowhere');
  expect(foreign.status).toBe(404);
  expect({ ...foreign.body, requestId: '' }).toEqual({ ...missing.body, requestId: '' });
});

it.each(ofStudies)(
  '%s is closed to an administrator without a part in the study, unless it is theirs',
  async (_name, route) => {
    const { status } = await call(administrator, route, 'own');
    if (route.permission === 'administrator' || route.permission === 'member-or-administrator')
      expect([403, 401]).not.toContain(status);
    else expect(status).toBe(404);
  },
);

it.each(named.filter(([, route]) => route.permission === 'administrator'))(
  '%s is closed to every role',
  async (_name, route) => {
    for (const member of members.values()) {
      const { status, body } = await call(member, route, 'own');
      expect([status, body['code']]).toEqual([403, 'forbidden']);
    }
  },
);

it('keeps routes that name roles closed to every other role', async () => {
  for (const [name, route] of ofStudies) {
    if (typeof route.permission !== 'object') continue;
    for (const [role, member] of members) {
      const { status } = await call(member, route, 'own');
      const open = route.permission.anyOf.includes(role);
      expect({ name, role, refused: status === 403 }).toEqual({ name, role, refused: !open });
    }
  }
});
