import { createTestApp, type TestApp } from '../../../test/app';
import { createStudy, signedInAs } from '../../../test/people';

let testApp: TestApp;
beforeAll(async () => {
  testApp = await createTestApp();
  await createStudy('petrel', 'Petrel');
});
afterAll(() => testApp.close());

it('says who is signed in, with which roles in which studies', async () => {
  const { agent, person } = await signedInAs(testApp, 'Ann Owner', {
    study: 'petrel',
    roles: ['requirements-owner', 'reader'],
  });
  const { body } = await agent.get('/api/session').expect(200);
  expect(body.person).toEqual({
    id: person.id,
    name: 'Ann Owner',
    email: 'ann.owner@example.org',
    administrator: false,
  });
  expect(body.memberships).toEqual([
    { study: { id: expect.any(String), key: 'petrel', name: 'Petrel' }, roles: ['requirements-owner', 'reader'] },
  ]);
  expect(body.demonstration).toBe(true);
  await agent.delete('/api/session').expect(204);
  await agent.get('/api/session').expect(401);
});
