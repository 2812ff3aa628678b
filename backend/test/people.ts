import type { Role } from '@shared/contract';
import { randomUUID } from 'node:crypto';
import request from 'supertest';
import { createPerson, type NewPerson } from '../src/features/people/people-service';
import { type Person, Study } from '../src/models';
import { TEST_ORIGIN, type TestApp } from './app';

/** The password of everybody whom these functions create. */
export const TEST_PASSWORD = 'four-quiet-pumps-hum';

export type Agent = ReturnType<typeof request.agent>;

/** An empty study, without what the one path would put into it. */
export async function createStudy(key: string, name = key): Promise<Study> {
  return Study.create({ key, name }, { fields: ['id', 'key', 'name'], returning: true });
}

/** A person with a password and, where a study key is given, with roles in that study. */
export async function createTestPerson(
  { services }: TestApp,
  name: string,
  inStudy?: { readonly study: string; readonly roles: readonly Role[] },
  more: Partial<NewPerson> = {},
): Promise<Person> {
  return services.sequelize.transaction((transaction) =>
    createPerson(services, transaction, {
      name,
      email: `${name.toLowerCase().replace(/[^a-z]+/g, '.')}@example.org`,
      password: TEST_PASSWORD,
      memberships: inStudy === undefined ? [] : [inStudy],
      ...more,
    }),
  );
}

/** A browser without a session: it keeps cookies and says that its requests come from the product's own pages. */
export function anonymousAgent({ app }: TestApp): Agent {
  return request.agent(app).set('Origin', TEST_ORIGIN);
}

/** A browser in which the person has signed in. */
export async function signedInAgent(
  testApp: TestApp,
  person: Pick<Person, 'email'>,
  password = TEST_PASSWORD,
): Promise<Agent> {
  const agent = anonymousAgent(testApp);
  await agent.post('/api/session').send({ email: person.email, password }).expect(200);
  return agent;
}

/** Creates a person with roles in a study and signs them in. */
export async function signedInAs(
  testApp: TestApp,
  name: string,
  inStudy?: { readonly study: string; readonly roles: readonly Role[] },
  more: Partial<NewPerson> = {},
): Promise<{ readonly person: Person; readonly agent: Agent }> {
  const person = await createTestPerson(testApp, name, inStudy, more);
  return { person, agent: await signedInAgent(testApp, person) };
}

/** A fresh Idempotency-Key header for one write. */
export function freshKey(): Record<string, string> {
  return { 'Idempotency-Key': randomUUID() };
}
