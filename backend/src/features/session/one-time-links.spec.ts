import { createTestApp, TEST_ORIGIN, type TestApp } from '../../../test/app';
import {
  type Agent,
  anonymousAgent,
  createStudy,
  createTestPerson,
  signedInAgent,
  signedInAs,
  TEST_PASSWORD,
} from '../../../test/people';
import { Person } from '../../models';
import { firstAdministratorLink } from '../people/first-administrator';

const NEW_PASSWORD = 'seven-cold-radiators';
let testApp: TestApp;
let admin: Agent;
let anybody: Agent;
beforeAll(async () => {
  testApp = await createTestApp();
  await createStudy('petrel', 'Petrel');
  admin = (await signedInAs(testApp, 'Adam Admin', undefined, { administrator: true })).agent;
  anybody = anonymousAgent(testApp);
});
afterAll(() => testApp.close());
afterEach(() => testApp.services.pool.query('TRUNCATE throttles'));

/** Waits for the mail with the latest link to the address; reads it where a demonstration shows it. */
async function mailedToken(email: string, subject: RegExp): Promise<string> {
  for (let wait = 0; wait < 100; wait += 1) {
    const { body } = await anybody.get('/api/demo/mail').expect(200);
    const mail = body.mails.find(
      (kept: { to: string[]; subject: string }) => kept.to[0] === email && subject.test(kept.subject),
    );
    const token = /#([A-Za-z0-9_-]{43})$/m.exec(mail?.text ?? '')?.[1];
    if (token !== undefined) return token;
    await new Promise((resolve) => setTimeout(resolve, 20));
  }
  throw new Error(`no mail reached ${email}`);
}
const invite = async (name: string, email: string): Promise<string> => {
  const memberships = [{ study: 'petrel', roles: ['analyst'] }];
  await admin.post('/api/people').send({ name, email, memberships }).expect(201);
  return mailedToken(email, /Invitation/);
};
const askReset = async (email: string): Promise<void> => {
  await anybody.post('/api/session/password-reset').send({ email }).expect(202);
  await testApp.services.background.settled();
};
const accept = (body: Record<string, unknown>) => anybody.post('/api/invitations/accept').send(body);
const complete = (body: Record<string, unknown>) => anybody.post('/api/password-resets/complete').send(body);

describe('an invitation', () => {
  it('comes by mail, leads to a password, and does not sign in by itself', async () => {
    const token = await invite('Ivy', 'ivy@example.org');
    const answer = await accept({ token, name: 'Ivy Invited', password: NEW_PASSWORD }).expect(204);
    expect(answer.headers).not.toHaveProperty('set-cookie');
    const agent = await signedInAgent(testApp, { email: 'ivy@example.org' }, NEW_PASSWORD);
    const { body } = await agent.get('/api/session').expect(200);
    expect(body.person.name).toBe('Ivy Invited');
    expect(body.memberships[0].roles).toEqual(['analyst']);
  });

  it('names the study and the one who invites, and links to the public address with the code after #', async () => {
    await invite('Lena', 'lena@example.org');
    const { body } = await anybody.get('/api/demo/mail').set('Host', 'evil.example').expect(200);
    expect(body.mails[0]).toMatchObject({ to: ['lena@example.org'], subject: 'Invitation to Deltaproof' });
    expect(body.mails[0].text).toContain('Adam Admin has invited you to Deltaproof and given you a part in Petrel.');
    expect(body.mails[0].text).toMatch(new RegExp(`^${TEST_ORIGIN}/invitation#[A-Za-z0-9_-]{43}$`, 'm'));
  });

  it('works once, also when used twice at the same moment', async () => {
    const token = await invite('Twin', 'twin@example.org');
    const answers = await Promise.all([0, 1].map((n) => accept({ token, password: `${NEW_PASSWORD}-${n}` })));
    expect(answers.map(({ status }) => status).toSorted()).toEqual([204, 410]);
    const { body } = await accept({ token, password: NEW_PASSWORD }).expect(410);
    expect(body.code).toBe('link-not-valid');
  });

  it('is void once another was sent, and after 72 hours', async () => {
    const first = await invite('Slow', 'slow@example.org');
    const person = await Person.findOne({ where: { email: 'slow@example.org' }, rejectOnEmpty: true });
    const validFor = await testApp.services.pool.query(
      'SELECT extract(epoch FROM expires_at - created_at) / 3600 AS hours FROM tokens WHERE person_id = $1',
      [person.id],
    );
    expect(Number(validFor.rows[0].hours)).toBe(72);
    await admin.post(`/api/people/${person.id}/invitation`).send().expect(202);
    await accept({ token: first, password: NEW_PASSWORD }).expect(410);
    await testApp.services.pool.query(
      "UPDATE tokens SET expires_at = now() - interval '1 second' WHERE used_at IS NULL",
    );
    const second = await mailedToken('slow@example.org', /Invitation/);
    await accept({ token: second, password: NEW_PASSWORD }).expect(410);
  });

  it('stays usable when the password is refused', async () => {
    const token = await invite('Careless', 'careless@example.org');
    for (const password of ['short', 'password123', 'aaaaaaaaaaaa', '12345678901', 'careless', 'x'.repeat(129)]) {
      const { body } = await accept({ token, password }).expect(400);
      expect(body.fields[0].field).toBe('password');
      expect(JSON.stringify(body)).not.toContain(`"${password}"`);
    }
    await accept({ token, password: NEW_PASSWORD }).expect(204);
  });

  it('is kept in the database as a digest only, and leaves the outbox once sent', async () => {
    const token = await invite('Secret', 'secret@example.org');
    // The mail is noted as sent a moment after it was taken.
    await testApp.services.mailSender.stop();
    const { rows } = await testApp.services.pool.query(
      `SELECT (SELECT string_agg(t::text, ' ') FROM tokens t) || (SELECT string_agg(m::text, ' ') FROM mails m) AS everything`,
    );
    expect(rows[0].everything).toContain('secret@example.org');
    expect(rows[0].everything).not.toContain(token);
    testApp.services.mailSender.start();
  });

  it.each([
    ['of another form', { token: 'abc', password: NEW_PASSWORD }, 400],
    ['never given', { token: 'A'.repeat(43), password: NEW_PASSWORD }, 410],
    ['with administration', { token: 'A'.repeat(43), password: NEW_PASSWORD, administrator: true }, 400],
  ])('%s is refused', async (_name, body, status) => {
    await accept(body).expect(status);
  });
});

describe('a password reset', () => {
  it('sets the new password, ends all sessions and does not sign in', async () => {
    const { person, agent } = await signedInAs(testApp, 'Forgetful');
    await askReset(person.email);
    const token = await mailedToken(person.email, /new password/);
    const answer = await complete({ token, password: NEW_PASSWORD }).expect(204);
    expect(answer.headers).not.toHaveProperty('set-cookie');
    await agent.get('/api/session').expect(401);
    await anybody.post('/api/session').send({ email: person.email, password: TEST_PASSWORD }).expect(401);
    await signedInAgent(testApp, person, NEW_PASSWORD);
  });

  it('works once, also when used twice at the same moment', async () => {
    const person = await createTestPerson(testApp, 'Hasty');
    await askReset(person.email);
    const token = await mailedToken(person.email, /new password/);
    const answers = await Promise.all([0, 1].map((n) => complete({ token, password: `${NEW_PASSWORD}-${n}` })));
    expect(answers.map(({ status }) => status).toSorted()).toEqual([204, 410]);
  });

  it('answers the same for everybody, and mails only those who can use it', async () => {
    const disabled = await createTestPerson(testApp, 'Disabled');
    await disabled.update({ disabled: true });
    const known = await createTestPerson(testApp, 'Known');
    const answers = [];
    for (const email of ['nobody@example.org', disabled.email, known.email]) {
      const { status, text } = await anybody.post('/api/session/password-reset').send({ email });
      answers.push({ status, text });
    }
    expect(answers).toEqual(Array(3).fill({ status: 202, text: '' }));
    await mailedToken(known.email, /new password/);
    const { body } = await anybody.get('/api/demo/mail');
    const reached = body.mails.flatMap((mail: { to: string[] }) => mail.to);
    expect(reached).not.toContain('nobody@example.org');
    expect(reached).not.toContain(disabled.email);
  });

  it('is mailed at most three times in five minutes', async () => {
    const person = await createTestPerson(testApp, 'Insistent');
    for (let time = 0; time < 5; time += 1) await askReset(person.email);
    const { rows } = await testApp.services.pool.query('SELECT 1 FROM tokens WHERE person_id = $1', [person.id]);
    expect(rows).toHaveLength(3);
  });

  it('can be asked for ten times in five minutes from one client address', async () => {
    for (let time = 0; time < 10; time += 1) await askReset(`x${time}@example.org`);
    await anybody.post('/api/session/password-reset').send({ email: 'x@example.org' }).expect(429);
  });

  it('is valid for 30 minutes and not a way to accept an invitation', async () => {
    const person = await createTestPerson(testApp, 'Timely');
    await askReset(person.email);
    const token = await mailedToken(person.email, /new password/);
    await accept({ token, password: NEW_PASSWORD }).expect(410);
    const { rows } = await testApp.services.pool.query(
      'SELECT extract(epoch FROM expires_at - created_at) / 60 AS minutes FROM tokens WHERE person_id = $1',
      [person.id],
    );
    expect(Number(rows[0].minutes)).toBe(30);
    await testApp.services.pool.query("UPDATE tokens SET expires_at = now() - interval '1 second'");
    await complete({ token, password: NEW_PASSWORD }).expect(410);
  });
});

describe('the first administrator', () => {
  it('is made by a link that exists only while there is none', async () => {
    expect(await firstAdministratorLink(testApp.services)).toBeNull();
    const real = await createTestApp({ config: { demonstration: false } });
    expect(await firstAdministratorLink(real.services)).toBeNull();
    await testApp.services.pool.query('UPDATE people SET administrator = false');

    const replaced = await firstAdministratorLink(real.services);
    const link = await firstAdministratorLink(real.services);
    expect(link).toMatch(new RegExp(`^${TEST_ORIGIN}/first-administrator#[A-Za-z0-9_-]{43}$`));
    const token = link?.split('#')[1];
    const good = { token, name: 'First', email: 'first@example.org', password: NEW_PASSWORD };
    const { body } = await accept({ token, password: NEW_PASSWORD }).expect(400);
    expect(body.fields.map(({ field }: { field: string }) => field)).toEqual(['name', 'email']);
    await accept({ ...good, token: replaced?.split('#')[1] }).expect(410);
    await accept(good).expect(204);
    await accept({ ...good, email: 'second@example.org' }).expect(410);
    const agent = await signedInAgent(testApp, { email: 'first@example.org' }, NEW_PASSWORD);
    await agent.get('/api/people').expect(200);
    await real.close();
  });
});

it('shows mails in a demonstration only', async () => {
  const real = await createTestApp({ config: { demonstration: false } });
  await anonymousAgent(real).get('/api/demo/mail').expect(404);
  await real.close();
});
