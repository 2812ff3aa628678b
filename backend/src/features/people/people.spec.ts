import type { Role } from '@shared/contract';
import { randomUUID } from 'node:crypto';
import { createTestApp, type TestApp } from '../../../test/app';
import { type Agent, anonymousAgent, createStudy, freshKey, signedInAgent, signedInAs } from '../../../test/people';
import { PeopleAuditLine, Person, type Study } from '../../models';

let testApp: TestApp;
let petrel: Study;
let admin: { readonly person: Person; readonly agent: Agent };
beforeAll(async () => {
  testApp = await createTestApp();
  petrel = await createStudy('petrel', 'Petrel');
  await createStudy('longreach', 'Longreach');
  admin = await signedInAs(testApp, 'Adam Admin', undefined, { administrator: true });
});
afterAll(() => testApp.close());

const roles = (agent: Agent, studyKey: string, personId: string, granted: readonly string[], key = freshKey()) =>
  agent.put(`/api/studies/${studyKey}/members/${personId}`).set(key).send({ roles: granted });
const actionsOn = async (personId: string): Promise<string[]> =>
  (await PeopleAuditLine.findAll({ where: { subjectId: personId }, order: ['id'] })).map(({ action }) => action);

describe('inviting', () => {
  it('makes a person with roles who cannot sign in yet, audited', async () => {
    const { body } = await admin.agent
      .post('/api/people')
      .send({
        name: ' Ivy Invited ',
        email: 'ivy@example.org',
        memberships: [{ study: 'petrel', roles: ['analyst', 'reader'] }],
      })
      .expect(201);
    expect(body).toEqual({
      id: expect.any(String),
      name: 'Ivy Invited',
      email: 'ivy@example.org',
      administrator: false,
      disabled: false,
      invited: true,
      version: 1,
      memberships: [{ study: { id: petrel.id, key: 'petrel', name: 'Petrel' }, roles: ['analyst', 'reader'] }],
    });
    expect(await actionsOn(body.id)).toEqual(['person.created', 'roles.set', 'person.invited']);
  });

  const good = { name: 'Nora', email: 'nora@example.org', memberships: [] as unknown[] };
  it.each<[string, Record<string, unknown>, string]>([
    ['without a name', { ...good, name: ' ' }, 'name'],
    ['with a name of two lines', { ...good, name: 'a\r\nBcc: x@example.org' }, 'name'],
    ['with no address', { ...good, email: 'nora' }, 'email'],
    ['with two addresses', { ...good, email: 'a@example.org, b@example.org' }, 'email'],
    ['with a list hidden in quotes', { ...good, email: '"a@example.org, evil"@example.org' }, 'email'],
    [
      'with an unknown role',
      { ...good, memberships: [{ study: 'petrel', roles: ['owner'] }] },
      'memberships.0.roles.0',
    ],
    ['with no role in a study', { ...good, memberships: [{ study: 'petrel', roles: [] }] }, 'memberships.0.roles'],
    [
      'with a role twice',
      { ...good, memberships: [{ study: 'petrel', roles: ['reader', 'reader'] }] },
      'memberships.0.roles',
    ],
    [
      'into a missing study',
      { ...good, memberships: [{ study: 'nowhere', roles: ['reader'] }] },
      'memberships.0.study',
    ],
    ['as administrator by the way', { ...good, administrator: true }, 'administrator'],
    ['with a password', { ...good, passwordHash: 'x' }, 'passwordHash'],
  ])('is refused %s, and nobody is made', async (_name, invitation, field) => {
    const { status, body } = await admin.agent.post('/api/people').send(invitation);
    expect([status, body.code, body.fields[0].field]).toEqual([400, 'bad-input', field]);
    expect(await Person.count({ where: { name: 'Nora' } })).toBe(0);
  });

  it('is refused for an address that is here already, in any case', async () => {
    const { body } = await admin.agent
      .post('/api/people')
      .send({ ...good, email: 'ADAM.ADMIN@example.org' })
      .expect(409);
    expect(body).toMatchObject({ code: 'conflict', fields: [{ field: 'email', value: 'ADAM.ADMIN@example.org' }] });
  });

  it('again is possible until accepted', async () => {
    const { person } = await signedInAs(testApp, 'Accepted');
    await admin.agent.post(`/api/people/${person.id}/invitation`).send().expect(409);
    await admin.agent.post(`/api/people/${randomUUID()}/invitation`).send().expect(404);
  });
});

describe('the list of people', () => {
  it('holds everybody, and the studies to grant roles in', async () => {
    const { body } = await admin.agent.get('/api/people').expect(200);
    expect(body.people.find((person: { name: string }) => person.name === 'Adam Admin')).toMatchObject({
      administrator: true,
      invited: false,
      memberships: [],
    });
    expect(body.studies.map((study: { key: string }) => study.key)).toEqual(['longreach', 'petrel']);
    expect(JSON.stringify(body)).not.toMatch(/argon2|hash/i);
  });
});

describe('changing a person', () => {
  const change = (id: string, body: Record<string, unknown>) => admin.agent.patch(`/api/people/${id}`).send(body);

  it('renames and raises the version', async () => {
    const { person } = await signedInAs(testApp, 'Old Name');
    const { body } = await change(person.id, { name: 'New Name', version: 1 }).expect(200);
    expect(body).toMatchObject({ name: 'New Name', version: 2 });
  });

  it('is refused on a stale version, with the current state and nothing applied', async () => {
    const { person } = await signedInAs(testApp, 'Moved On');
    await change(person.id, { name: 'First', version: 1 }).expect(200);
    const { body } = await change(person.id, { name: 'Second', version: 1 }).expect(409);
    expect(body).toMatchObject({ code: 'stale', current: { name: 'First', version: 2 } });
    expect((await person.reload()).name).toBe('First');
  });

  it('lets one of two changes at once through', async () => {
    const { person } = await signedInAs(testApp, 'Raced');
    const answers = await Promise.all(['A', 'B', 'C'].map((name) => change(person.id, { name, version: 1 })));
    expect(answers.map(({ status }) => status).toSorted()).toEqual([200, 409, 409]);
    expect((await person.reload()).version).toBe(2);
  });

  it('disables: sessions end, links are void, audited; and enables again', async () => {
    const { person, agent } = await signedInAs(testApp, 'Leaving', { study: 'petrel', roles: ['reader'] });
    await change(person.id, { disabled: true, version: 1 }).expect(200);
    await agent.get('/api/session').expect(401);
    expect(await actionsOn(person.id)).toContain('person.changed');
    const members = await admin.agent.get('/api/studies/petrel/members').expect(200);
    expect(JSON.stringify(members.body)).not.toContain('Leaving');
    await change(person.id, { disabled: false, version: 2 }).expect(200);
    await signedInAgent(testApp, person);
  });

  it('ends the sessions of a person whose administration moves', async () => {
    const { person, agent } = await signedInAs(testApp, 'Promoted');
    await change(person.id, { administrator: true, version: 1 }).expect(200);
    await agent.get('/api/session').expect(401);
    await (await signedInAgent(testApp, person)).get('/api/people').expect(200);
  });

  it('does not let administrators lock themselves out', async () => {
    const { version } = await admin.person.reload();
    await change(admin.person.id, { disabled: true, version }).expect(409);
    await change(admin.person.id, { administrator: false, version }).expect(409);
    await admin.agent.get('/api/people').expect(200);
  });

  it.each([
    ['nothing to change', { version: 1 }],
    ['no version', { name: 'X' }],
    ['another’s password', { version: 1, password: 'new-password-1' }],
    ['another address', { version: 1, email: 'x@example.org' }],
  ])('is refused with %s', async (_name, body) => {
    const { status } = await change(admin.person.id, body);
    expect(status).toBe(400);
  });

  it('is refused for somebody who does not exist', async () => {
    await change(randomUUID(), { name: 'X', version: 1 }).expect(404);
    await change('no-uuid', { name: 'X', version: 1 }).expect(400);
  });
});

describe('roles in a study', () => {
  it('are set as a whole, and taken away with the empty list', async () => {
    const { person, agent } = await signedInAs(testApp, 'Rolf');
    const members = async (): Promise<Role[] | undefined> =>
      (await admin.agent.get('/api/studies/petrel/members')).body.members.find(
        (member: { id: string }) => member.id === person.id,
      )?.roles;
    await agent.get('/api/studies/petrel/members').expect(404);
    await roles(admin.agent, 'petrel', person.id, ['board-member', 'board-chair']).expect(204);
    expect(await members()).toEqual(['board-member', 'board-chair']);
    await agent.get('/api/studies/petrel/members').expect(200);
    await roles(admin.agent, 'petrel', person.id, ['reader']).expect(204);
    expect(await members()).toEqual(['reader']);
    await roles(admin.agent, 'petrel', person.id, []).expect(204);
    expect(await members()).toBeUndefined();
    await agent.get('/api/studies/petrel/members').expect(404);
    expect((await actionsOn(person.id)).filter((action) => action === 'roles.set')).toHaveLength(3);
  });

  it('are refused for what does not exist or is not a role', async () => {
    await roles(admin.agent, 'nowhere', admin.person.id, ['reader']).expect(404);
    await roles(admin.agent, 'petrel', randomUUID(), ['reader']).expect(404);
    await roles(admin.agent, 'petrel', admin.person.id, ['administrator']).expect(400);
    await admin.agent.put(`/api/studies/petrel/members/${admin.person.id}`).set(freshKey()).send({}).expect(400);
  });

  it('cannot be granted by a member to themselves', async () => {
    const { person, agent } = await signedInAs(testApp, 'Climber', { study: 'petrel', roles: ['board-chair'] });
    await roles(agent, 'petrel', person.id, ['analyst']).expect(403);
    await roles(agent, 'longreach', person.id, ['analyst']).expect(404);
  });

  it('show members names and roles only', async () => {
    const { agent } = await signedInAs(testApp, 'Peer', { study: 'longreach', roles: ['reader'] });
    const { body } = await agent.get('/api/studies/longreach/members').expect(200);
    expect(body).toEqual({ members: [{ id: expect.any(String), name: 'Peer', roles: ['reader'] }] });
  });
});

describe('the idempotency key of a write', () => {
  const audited = async (personId: string): Promise<number> =>
    PeopleAuditLine.count({ where: { subjectId: personId, action: 'roles.set' } });

  it('is needed', async () => {
    const address = `/api/studies/petrel/members/${admin.person.id}`;
    const { body } = await admin.agent
      .put(address)
      .send({ roles: ['reader'] })
      .expect(400);
    expect(body.code).toBe('idempotency-key-missing');
    await admin.agent
      .put(address)
      .set('Idempotency-Key', '17')
      .send({ roles: ['reader'] })
      .expect(400);
  });

  it('makes a repetition have one effect and the same answer, also when sent at once', async () => {
    const { person } = await signedInAs(testApp, 'Once');
    const key = freshKey();
    const answers = await Promise.all(
      Array.from({ length: 4 }, () => roles(admin.agent, 'petrel', person.id, ['analyst'], key)),
    );
    expect(answers.map(({ status }) => status)).toEqual([204, 204, 204, 204]);
    expect(await audited(person.id)).toBe(1);
    await roles(admin.agent, 'petrel', person.id, ['analyst'], key).expect(204);
    expect(await audited(person.id)).toBe(1);
  });

  it('is refused for another request', async () => {
    const { person } = await signedInAs(testApp, 'Twice');
    const key = freshKey();
    await roles(admin.agent, 'petrel', person.id, ['analyst'], key).expect(204);
    const { body } = await roles(admin.agent, 'petrel', person.id, ['reader'], key).expect(422);
    expect(body.code).toBe('idempotency-key-reused');
    await roles(admin.agent, 'longreach', person.id, ['analyst'], key).expect(422);
    expect(await audited(person.id)).toBe(1);
  });

  it('does not remember a refusal', async () => {
    const { person } = await signedInAs(testApp, 'Later');
    const key = freshKey();
    await person.update({ disabled: true });
    await roles(admin.agent, 'petrel', person.id, ['nonsense'], key).expect(400);
    await roles(admin.agent, 'petrel', person.id, ['reader'], key).expect(204);
  });

  it('belongs to the person who sent it', async () => {
    const other = await signedInAs(testApp, 'Second Admin', undefined, { administrator: true });
    const { person } = await signedInAs(testApp, 'Shared Key');
    const key = freshKey();
    await roles(admin.agent, 'petrel', person.id, ['analyst'], key).expect(204);
    await roles(other.agent, 'petrel', person.id, ['reader'], key).expect(204);
  });
});

it('keeps audit lines as they are', async () => {
  const { sequelize } = testApp.services;
  await expect(sequelize.query("UPDATE people_audit SET action = 'x'")).rejects.toThrow(/only ever added/);
  await expect(sequelize.query('DELETE FROM people_audit')).rejects.toThrow(/only ever added/);
});

it('answers anonymous requests with 401 before looking at their content', async () => {
  const { body } = await anonymousAgent(testApp).post('/api/people').send({ nonsense: 1 }).expect(401);
  expect(body.code).toBe('not-signed-in');
});
