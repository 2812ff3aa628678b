import type { StudyEvent } from '@shared/contract';
import * as http from 'node:http';
import type { AddressInfo } from 'node:net';
import { createTestApp, TEST_ORIGIN, type TestApp } from '../../test/app';
import { type Agent, anonymousAgent, createStudy, freshKey, signedInAs } from '../../test/people';
import type { Person, Study } from '../models';

let testApp: TestApp;
let server: http.Server;
let petrel: Study;
let owner: { readonly person: Person; readonly agent: Agent };
let admin: { readonly person: Person; readonly agent: Agent };
const open: Stream[] = [];

beforeAll(async () => {
  testApp = await createTestApp();
  server = http.createServer(testApp.app).listen(0, '127.0.0.1');
  petrel = await createStudy('petrel', 'Petrel');
  await createStudy('other', 'Other');
  owner = await signedInAs(testApp, 'Olga Owner', { study: 'petrel', roles: ['requirements-owner'] });
  admin = await signedInAs(testApp, 'Adam Admin', undefined, { administrator: true });
});
afterEach(() => {
  for (const stream of open.splice(0)) stream.cut();
});
afterAll(async () => {
  await testApp.close();
  server.closeAllConnections();
  server.close();
});

interface Received {
  readonly event: string;
  readonly id: string | null;
  readonly data: Partial<StudyEvent>;
}

/** A client of the live stream that keeps what it receives. */
class Stream {
  readonly received: Received[] = [];
  ended = false;
  private constructor(
    readonly status: number,
    readonly headers: http.IncomingHttpHeaders,
    private readonly response: http.IncomingMessage,
  ) {
    let text = '';
    response.setEncoding('utf8');
    response.on('data', (chunk: string) => {
      text += chunk;
      for (let end = text.indexOf('\n\n'); end >= 0; end = text.indexOf('\n\n')) {
        this.take(text.slice(0, end));
        text = text.slice(end + 2);
      }
    });
    response.on('end', () => (this.ended = true));
    response.on('error', () => (this.ended = true));
  }

  static async open(agent: Agent, headers: Record<string, string> = {}, study = 'petrel'): Promise<Stream> {
    const cookie = agent.jar
      .getCookies({ domain: '127.0.0.1', path: '/', secure: false, script: false })
      .toValueString();
    const response = await new Promise<http.IncomingMessage>((resolve, reject) => {
      http
        .get(
          {
            host: '127.0.0.1',
            port: (server.address() as AddressInfo).port,
            path: `/api/studies/${study}/events`,
            headers: { Accept: 'text/event-stream', Origin: TEST_ORIGIN, Cookie: cookie, ...headers },
          },
          resolve,
        )
        .on('error', reject);
    });
    const stream = new Stream(response.statusCode ?? 0, response.headers, response);
    open.push(stream);
    return stream;
  }

  cut(): void {
    this.response.destroy();
  }

  private take(block: string): void {
    const field = (name: string): string | null => new RegExp(`^${name}: (.*)$`, 'm').exec(block)?.[1] ?? null;
    const event = field('event');
    if (event !== null) this.received.push({ event, id: field('id'), data: JSON.parse(field('data') ?? 'null') });
  }
}

const until = async (condition: () => boolean, what: string, milliseconds = 5000): Promise<void> => {
  const deadline = Date.now() + milliseconds;
  while (!condition()) {
    if (Date.now() > deadline) throw new Error(`waited in vain for ${what}`);
    await new Promise((resolve) => setTimeout(resolve, 10));
  }
};

/** Commits `count` revisions as the one path does: counter, ledger and notice in one transaction under the row lock. */
async function commit(count = 1, study = petrel): Promise<void> {
  const { sequelize } = testApp.services;
  for (let step = 0; step < count; step += 1) {
    await sequelize.transaction(async (transaction) => {
      const run = (sql: string, bind: unknown[]) => sequelize.query(sql, { bind, transaction });
      await run('SELECT 1 FROM studies WHERE id = $1 FOR UPDATE', [study.id]);
      await run('UPDATE studies SET revision = revision + 1 WHERE id = $1', [study.id]);
      await run(
        `INSERT INTO ledger (study_id, revision, person_id, at, summary, why, commands, patch, moved, previous, digest, content)
         SELECT id, revision, $2, now(), 'Sets Isp', '', '[]',
                '[{"kind":"quantity","id":"q1","before":{"key":"Q-001"},"after":{"key":"Q-001"}}]',
                '[{"key":"VEH-001","from":"compliant","to":"non-compliant"}]', '', repeat('0', 64), ''
           FROM studies WHERE id = $1`,
        [study.id, owner.person.id],
      );
      await run(
        `SELECT pg_notify('study_revision', json_build_object('studyId', id, 'revision', revision)::text)
           FROM studies WHERE id = $1`,
        [study.id],
      );
    });
  }
}
const revision = async (): Promise<number> => Number((await petrel.reload()).revision);
const revisions = (stream: Stream): (number | undefined)[] => stream.received.map(({ data }) => data.revision);

it('begins with the current revision, then tells every further one with who, what and which verdicts turned', async () => {
  const stream = await Stream.open(owner.agent);
  expect([stream.status, stream.headers['content-type']]).toEqual([200, 'text/event-stream; charset=utf-8']);
  const before = await revision();
  await until(() => stream.received.length === 1, 'the current revision');
  expect(stream.received[0]).toEqual({ event: 'revision', id: String(before), data: { revision: before } });
  await commit();
  await until(() => stream.received.length === 2, 'the next revision', 1000);
  expect(stream.received[1]).toEqual({
    event: 'revision',
    id: String(before + 1),
    data: {
      revision: before + 1,
      by: 'Olga Owner',
      byId: owner.person.id,
      at: expect.stringMatching(/^\d{4}-\d\d-\d\dT/),
      summary: 'Sets Isp',
      moved: [{ key: 'VEH-001', from: 'compliant', to: 'non-compliant' }],
      touched: ['Q-001'],
    },
  });
});

it('tells many revisions in order, each once, to every client', async () => {
  const streams = await Promise.all([0, 1, 2].map(() => Stream.open(owner.agent)));
  const before = await revision();
  await Promise.all(Array.from({ length: 8 }, () => commit(5)));
  const expected = Array.from({ length: 41 }, (_, index) => before + index);
  for (const stream of streams) {
    await until(() => stream.received.length >= 41, 'all revisions');
    expect(revisions(stream)).toEqual(expected);
  }
});

it('resumes after the last event that the client saw, without gap or double', async () => {
  const before = await revision();
  await commit(3);
  const stream = await Stream.open(owner.agent, { 'Last-Event-ID': String(before + 1) });
  await commit(1);
  await until(() => stream.received.some(({ data }) => data.revision === before + 4), 'the newest revision');
  expect(stream.received[0]).toMatchObject({ id: null, data: { revision: before + 3 } });
  expect(stream.received.slice(1).map(({ id }) => Number(id))).toEqual([before + 2, before + 3, before + 4]);
});

it('survives 50 cuts without losing or repeating an event', async () => {
  const before = await revision();
  const ids: number[] = [];
  const writing = commit(60);
  for (let cut = 0; cut < 50; cut += 1) {
    const stream = await Stream.open(owner.agent, { 'Last-Event-ID': String(ids.at(-1) ?? before) });
    await new Promise((resolve) => setTimeout(resolve, 15));
    stream.cut();
    ids.push(...stream.received.flatMap(({ id }) => (id === null ? [] : [Number(id)])));
  }
  await writing;
  const last = await Stream.open(owner.agent, { 'Last-Event-ID': String(ids.at(-1) ?? before) });
  await until(() => ids.length + last.received.length > 60, 'the rest');
  ids.push(...last.received.flatMap(({ id }) => (id === null ? [] : [Number(id)])));
  expect(ids).toEqual(Array.from({ length: 60 }, (_, index) => before + 1 + index));
});

it('tells a client to read anew when its last event lies in the future or too far back', async () => {
  const now = await revision();
  const ahead = await Stream.open(owner.agent, { 'Last-Event-ID': String(now + 5) });
  await until(() => ahead.received.length === 1, 'the reset');
  expect(ahead.received[0]).toEqual({ event: 'reset', id: String(now), data: { revision: now } });
});

it('keeps studies apart', async () => {
  const { agent } = await signedInAs(testApp, 'Elsewhere', { study: 'other', roles: ['reader'] });
  const stream = await Stream.open(agent, {}, 'other');
  await commit();
  await new Promise((resolve) => setTimeout(resolve, 200));
  expect(revisions(stream)).toEqual([0]);
  expect((await Stream.open(agent)).status).toBe(404);
});

it('resumes listening by itself after the database cut the connection, and catches up', async () => {
  const stream = await Stream.open(owner.agent);
  await until(() => stream.received.length === 1, 'the current revision');
  const before = await revision();
  await testApp.services.pool.query(
    "SELECT pg_terminate_backend(pid) FROM pg_stat_activity WHERE application_name = 'deltaproof-live'",
  );
  await commit(2);
  await until(() => stream.received.length === 3, 'the missed revisions');
  expect(revisions(stream)).toEqual([before, before + 1, before + 2]);
  await commit();
  await until(() => stream.received.length === 4, 'a revision after that', 1000);
});

describe('a stream ends within 5 seconds', () => {
  const opened = async (name: string): Promise<{ stream: Stream; agent: Agent; person: Person }> => {
    const { agent, person } = await signedInAs(testApp, name, { study: 'petrel', roles: ['analyst'] });
    const stream = await Stream.open(agent);
    await until(() => stream.received.length === 1, 'the current revision');
    return { stream, agent, person };
  };

  it('after signing out, while others go on', async () => {
    const others = await Stream.open(owner.agent);
    const { stream, agent } = await opened('Signs Out');
    await agent.delete('/api/session').expect(204);
    await until(() => stream.ended, 'the end of the stream');
    expect(others.ended).toBe(false);
    expect((await Stream.open(agent)).status).toBe(401);
  });

  it('after losing the part in the study', async () => {
    const { stream, agent, person } = await opened('Loses Part');
    const address = `/api/studies/petrel/members/${person.id}`;
    await admin.agent
      .put(address)
      .set(freshKey())
      .send({ roles: ['reader'] })
      .expect(204);
    await new Promise((resolve) => setTimeout(resolve, 200));
    expect(stream.ended).toBe(false);
    await admin.agent.put(address).set(freshKey()).send({ roles: [] }).expect(204);
    await until(() => stream.ended, 'the end of the stream');
    expect((await Stream.open(agent)).status).toBe(404);
  });

  it('after being disabled', async () => {
    const { stream, person } = await opened('Disabled');
    await admin.agent.patch(`/api/people/${person.id}`).send({ disabled: true, version: 1 }).expect(200);
    await until(() => stream.ended, 'the end of the stream');
  });
});

it('does not count as activity of its person', async () => {
  const { agent, person } = await signedInAs(testApp, 'Away', { study: 'petrel', roles: ['reader'] });
  const { pool } = testApp.services;
  await pool.query("UPDATE sessions SET last_seen_at = now() - interval '10 minutes' WHERE person_id = $1", [
    person.id,
  ]);
  const stream = await Stream.open(agent);
  await until(() => stream.received.length === 1, 'the current revision');
  const { rows } = await pool.query(
    'SELECT now() - last_seen_at > $2::interval AS idle FROM sessions WHERE person_id = $1',
    [person.id, '9 minutes'],
  );
  expect(rows[0].idle).toBe(true);
});

it('is refused to other sites and to requests that are no stream', async () => {
  expect((await Stream.open(owner.agent, { 'Sec-Fetch-Site': 'cross-site' })).status).toBe(403);
  expect((await Stream.open(owner.agent, { Origin: 'https://elsewhere.example' })).status).toBe(403);
  expect((await Stream.open(owner.agent, { Accept: '*/*' })).status).toBe(406);
  expect((await Stream.open(anonymousAgent(testApp))).status).toBe(401);
});

it('closes the oldest stream when a person opens more than twenty', async () => {
  const { agent } = await signedInAs(testApp, 'Many Tabs', { study: 'petrel', roles: ['reader'] });
  const streams: Stream[] = [];
  for (let tab = 0; tab < 21; tab += 1) streams.push(await Stream.open(agent));
  await until(() => streams[0]?.ended === true, 'the end of the oldest stream');
  expect(streams.slice(1).every(({ ended }) => !ended)).toBe(true);
});
