import * as fs from 'node:fs';
import * as os from 'node:os';
import * as path from 'node:path';
import request from 'supertest';
import * as z from 'zod';
import { createTestApp, TEST_ORIGIN, type TestApp } from '../../test/app';
import { anonymousAgent } from '../../test/people';
import { routes } from '../features';
import { mountRoutes } from './mount-routes';
import { NO_CONTENT, publicRoute } from './routes';

let testApp: TestApp;
let effects = 0;
const echo = publicRoute({
  method: 'post',
  path: '/api/echo',
  summary: 'test',
  body: z.strictObject({ any: z.unknown(), count: z.int().max(3).optional() }),
  handler: ({ body }) => {
    effects += 1;
    return body;
  },
});
const remove = publicRoute({
  method: 'delete',
  path: '/api/echo',
  summary: 'test',
  handler: () => {
    effects += 1;
    return NO_CONTENT;
  },
});
const fail = publicRoute({
  method: 'get',
  path: '/api/fail',
  summary: 'test',
  handler: async ({ services }) => services.sequelize.query("SELECT 'secret-text' FROM no_such_table"),
});

const clientDirectory = fs.mkdtempSync(path.join(os.tmpdir(), 'deltaproof-client-'));
beforeAll(async () => {
  fs.writeFileSync(
    path.join(clientDirectory, 'index.html'),
    '<dp-root ngCspNonce="__NONCE__"></dp-root><script nonce="__NONCE__"></script>',
  );
  fs.writeFileSync(path.join(clientDirectory, 'main-ABCD1234.js'), 'let a;');
  testApp = await createTestApp({ config: { clientDirectory }, routes: [...routes, echo, remove, fail] });
});
afterAll(async () => {
  await testApp.close();
  fs.rmSync(clientDirectory, { recursive: true });
});
beforeEach(() => {
  effects = 0;
});

describe('requests from elsewhere', () => {
  const refusals: [string, Record<string, string>][] = [
    ['without Origin and Sec-Fetch-Site', {}],
    ['from another origin', { Origin: 'http://127.0.0.2:4310' }],
    ['from another port', { Origin: 'http://localhost:4311' }],
    ['from a sandboxed page', { Origin: 'null' }],
    ['that the browser calls cross-site', { 'Sec-Fetch-Site': 'cross-site', Origin: TEST_ORIGIN }],
    ['that the browser calls same-site', { 'Sec-Fetch-Site': 'same-site' }],
    ['typed into the address bar', { 'Sec-Fetch-Site': 'none' }],
  ];
  it.each(refusals)('are refused %s', async (_name, headers) => {
    const post = await request(testApp.app).post('/api/echo').set(headers).send({ any: 1 });
    expect([post.status, post.body.code]).toEqual([403, 'cross-site']);
    await request(testApp.app).delete('/api/echo').set(headers).expect(403);
    expect(effects).toBe(0);
  });

  it('are taken when they are our own', async () => {
    await request(testApp.app).post('/api/echo').set('Sec-Fetch-Site', 'same-origin').send({ any: 1 }).expect(200);
    await request(testApp.app).post('/api/echo').set('Origin', TEST_ORIGIN).send({ any: 1 }).expect(200);
    await anonymousAgent(testApp).delete('/api/echo').expect(204);
    expect(effects).toBe(3);
  });

  it.each(['application/x-www-form-urlencoded', 'text/plain', 'multipart/form-data; boundary=x', 'application/jsonx'])(
    'are refused as %s',
    async (type) => {
      const answer = await anonymousAgent(testApp).post('/api/echo').set('Content-Type', type).send('{"any":1}');
      expect([answer.status, answer.body.code, effects]).toEqual([415, 'unsupported-media-type', 0]);
    },
  );

  it('get no permission to read answers from another origin', async () => {
    const answer = await request(testApp.app).get('/api/about').set('Origin', 'https://elsewhere.example');
    expect(answer.headers).not.toHaveProperty('access-control-allow-origin');
  });
});

describe('bodies', () => {
  const post = (text: string): request.Test =>
    anonymousAgent(testApp).post('/api/echo').set('Content-Type', 'application/json').send(text);
  const nested = (depth: number): string => '['.repeat(depth) + ']'.repeat(depth);

  it.each([
    ['cut off', '{"any":', 400, 'malformed-body'],
    ['with a __proto__ key', '{"any":{"__proto__":{"admin":true}}}', 400, 'malformed-body'],
    ['with a __proto__ key in a list', '{"any":[1,{"__proto__":1}]}', 400, 'malformed-body'],
    // The body itself is level 1, so that 32 lists in it reach level 33.
    ['nested 33 deep', `{"any":${nested(32)}}`, 400, 'malformed-body'],
    ['nested 50,000 deep', `{"any":${nested(50_000)}}`, 400, 'malformed-body'],
    ['over 256 KB', `{"any":"${'x'.repeat(256 * 1024)}"}`, 413, 'too-large'],
    ['with an unknown field', '{"any":1,"role":"administrator"}', 400, 'bad-input'],
    ['that are no object', '[1]', 400, 'bad-input'],
    ['that are a bare word', 'true', 400, 'malformed-body'],
  ])('are refused when %s', async (_name, text, status, code) => {
    const answer = await post(text);
    expect([answer.status, answer.body.code, effects]).toEqual([status, code, 0]);
    expect(({} as Record<string, unknown>)['admin']).toBeUndefined();
  });

  it('are taken up to the limits', async () => {
    await post(`{"any":${nested(31)}}`).expect(200);
    await post(`{"any":"${'x'.repeat(255 * 1024)}"}`).expect(200);
  });

  it('get an answer that names field, value and what would be right', async () => {
    const { body, headers } = await post('{"any":1,"count":7,"role":"x"}');
    expect(headers['content-type']).toContain('application/problem+json');
    expect(body).toMatchObject({
      type: 'urn:deltaproof:problem:bad-input',
      status: 400,
      code: 'bad-input',
      requestId: headers['x-request-id'],
      fields: expect.arrayContaining([
        expect.objectContaining({ field: 'count', value: 7, expected: 'at most 3' }),
        expect.objectContaining({ field: 'role', expected: 'leave it out' }),
      ]),
    });
  });

  it('do not bring an unknown query parameter along', async () => {
    const { body } = await anonymousAgent(testApp).get('/api/about?debug=1').expect(400);
    expect(body.fields).toEqual([
      { field: 'query.debug', message: 'is not a field of this request', expected: 'leave it out' },
    ]);
  });
});

describe('answers', () => {
  it('carry exactly this content security policy, with a nonce of their own', async () => {
    const policy = (nonce: string): string =>
      `default-src 'none';script-src 'self' 'nonce-${nonce}';style-src 'self' 'nonce-${nonce}';font-src 'self' data:;` +
      `img-src 'self' data: blob:;connect-src 'self';base-uri 'self';form-action 'self';frame-ancestors 'none';object-src 'none'`;
    const seen = new Set<string>();
    for (const address of ['/', '/studies/petrel', '/index.html', '/api/about']) {
      const { headers } = await request(testApp.app).get(address).expect(200);
      const header = String(headers['content-security-policy']);
      const nonce = /'nonce-([^']+)'/.exec(header)?.[1] ?? '';
      expect(nonce).toMatch(/^[A-Za-z0-9+/]{24}$/);
      expect(header).toBe(policy(nonce));
      seen.add(nonce);
    }
    expect(seen.size).toBe(4);
  });

  it('put the nonce into the page, which is never kept', async () => {
    const { text, headers } = await request(testApp.app).get('/studies/petrel?x=1').expect(200);
    const nonce = /'nonce-([^']+)'/.exec(String(headers['content-security-policy']))?.[1];
    expect(text).toBe(`<dp-root ngCspNonce="${nonce}"></dp-root><script nonce="${nonce}"></script>`);
    expect(headers['cache-control']).toBe('no-store');
  });

  it('let hashed files be kept and refuse paths out of the folder', async () => {
    const { headers } = await request(testApp.app).get('/main-ABCD1234.js').expect(200);
    expect(headers['cache-control']).toContain('immutable');
    const { text } = await request(testApp.app).get('/..%2f..%2f..%2fetc%2fpasswd');
    expect(text).not.toContain('root:');
  });

  it('say nothing about the inside when something fails', async () => {
    const { body, text } = await anonymousAgent(testApp).get('/api/fail').expect(500);
    expect(body).toMatchObject({ code: 'internal', requestId: expect.any(String) });
    expect(text).not.toMatch(/secret-text|no_such_table|SELECT|at \w+ \(/);
  });

  it('for unknown addresses under /api are problems, not the page', async () => {
    const { body } = await anonymousAgent(testApp).get('/api/nothing').expect(404);
    expect(body.code).toBe('not-found');
    await anonymousAgent(testApp).put('/api/session').send({}).expect(404);
  });

  it('name an unreadable address as the sender’s fault', async () => {
    await anonymousAgent(testApp).get('/api/people/%E0%A4%A').expect(400);
  });
});

describe('the route table', () => {
  interface Layer {
    readonly route?: { readonly path: string; readonly methods: Record<string, boolean> };
  }
  it('is all that is open under /api', () => {
    const { stack } = mountRoutes(routes, testApp.services) as unknown as { readonly stack: readonly Layer[] };
    const open = stack.flatMap(({ route }) =>
      route === undefined ? ['no route'] : Object.keys(route.methods).map((method) => `${method} ${route.path}`),
    );
    expect(open).toEqual(routes.map(({ method, path: address }) => `${method} ${address}`));
  });

  it('is described in full by the interface document', async () => {
    const plain = await createTestApp();
    const { body } = await anonymousAgent(plain).get('/api/openapi.json').expect(200);
    await plain.close();
    expect(body.openapi).toBe('3.1.0');
    const described = Object.entries(body.paths as Record<string, object>).flatMap(([address, methods]) =>
      Object.keys(methods).map((method) => `${method} ${address}`),
    );
    expect(described.toSorted()).toEqual(
      routes.map(({ method, path: address }) => `${method} ${address.replace(/:(\w+)/g, '{$1}')}`).toSorted(),
    );
    expect(body.paths['/api/session'].post.requestBody.content['application/json'].schema).toMatchObject({
      additionalProperties: false,
      required: ['email', 'password'],
    });
    expect(body.paths['/api/studies/{study}/members/{personId}'].put.parameters).toEqual(
      expect.arrayContaining([expect.objectContaining({ in: 'header', name: 'Idempotency-Key', required: true })]),
    );
  });
});
