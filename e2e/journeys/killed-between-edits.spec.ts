import { expect, test } from '@playwright/test';
import { type ChildProcess, execFileSync, spawn } from 'node:child_process';
import { randomUUID } from 'node:crypto';
import { join } from 'node:path';
import { serverDirectory } from '../../database/build.mjs';
import { freePort } from '../../database/ports.mjs';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '../fixtures/people';
import { startTestProduct, type TestProduct } from '../fixtures/product';

const KILLS = 20;
const STUDY = 'PETREL';

let product: TestProduct;
let port: number;

test.beforeAll(async () => {
  // With PostgreSQL's protections on, as in use: what was acknowledged must be there after any kill.
  product = await startTestProduct({ durable: true });
  port = await freePort();
});
test.afterAll(async () => {
  await product.stop();
});

/** A second server process on the same database, for this test to kill. */
async function startServer(): Promise<ChildProcess> {
  const server = spawn(process.execPath, [join(serverDirectory, 'main.cjs')], {
    env: environment(),
    stdio: 'ignore',
  });
  await expect
    .poll(
      () =>
        fetch(`${origin()}/api/health`).then(
          (answer) => answer.status,
          () => 0,
        ),
      { timeout: 30_000, intervals: [50] },
    )
    .toBe(200);
  return server;
}

const origin = (): string => `http://localhost:${port}`;
const environment = (): NodeJS.ProcessEnv => ({
  ...process.env,
  NODE_ENV: 'development',
  DATABASE_URL: product.databaseUrl,
  DATA_DIR: product.dataDirectory,
  PUBLIC_URL: origin(),
  PORT: String(port),
  DEMO: '1',
  LOG_LEVEL: 'silent',
});

async function signIn(): Promise<string> {
  const analyst = DEMO_PEOPLE.find((person) => person.roles.includes('analyst'))!;
  const answer = await fetch(`${origin()}/api/session`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json', Origin: origin() },
    body: JSON.stringify({ email: analyst.email, password: DEMO_PASSWORD }),
  });
  expect(answer.status).toBe(200);
  return answer.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';')[0])
    .join('; ');
}

interface Quantity {
  readonly id: string;
  readonly version: number;
  readonly symbol: string;
  readonly value: { readonly text: string };
}

async function impulse(cookie: string): Promise<Quantity> {
  const answer = await fetch(`${origin()}/api/studies/${STUDY}/quantities`, { headers: { Cookie: cookie } });
  const { rows } = (await answer.json()) as { rows: Quantity[] };
  return rows.find((row) => row.symbol === 'I_sp')!;
}

/** One edit of the specific impulse, which moves the delta-v and all that rests on it. */
function set(cookie: string, quantity: Quantity, version: number, text: string, key: string): Promise<Response> {
  return fetch(`${origin()}/api/studies/${STUDY}/edits`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json', Origin: origin(), Cookie: cookie, 'Idempotency-Key': key },
    body: JSON.stringify({
      commands: [{ type: 'quantity.set', id: quantity.id, version, value: { text, unit: 's' } }],
    }),
  });
}

test('twenty kills between edits leave no verdict that re-proof contradicts, and nothing acknowledged is lost', async () => {
  test.setTimeout(600_000);
  let acknowledged = 0;
  for (let kill = 1; kill <= KILLS; kill++) {
    const server = await startServer();
    const cookie = await signIn();
    const quantity = await impulse(cookie);
    const ended = new Promise((resolve) => server.once('exit', resolve));
    setTimeout(() => server.kill('SIGKILL'), 30 + kill * 17);
    // ok, or unknown: a request whose answer never came may have been applied or not.
    let version = quantity.version;
    let unknown: { key: string; text: string } | null = null;
    let last = quantity.value.text;
    for (let edit = 0; unknown === null; edit++) {
      const attempt = { key: randomUUID(), text: String(6400 + kill * 10 + (edit % 10)) };
      try {
        const answer = await set(cookie, quantity, version, attempt.text, attempt.key);
        expect(answer.status).toBe(200);
        version += 1;
        last = attempt.text;
        acknowledged += 1;
      } catch {
        unknown = attempt;
      }
    }
    await ended;
    const report = execFileSync(process.execPath, [join(serverDirectory, 'reprove.cjs')], {
      env: environment(),
      encoding: 'utf8',
    });
    expect(report, `after kill ${kill}`).toContain(`${STUDY} r`);
    expect(report).not.toContain('DOES NOT HOLD');

    const again = await startServer();
    const after = await impulse(cookie);
    const applied = after.version === version + 1;
    expect(
      applied || after.version === version,
      `kill ${kill}: version ${after.version} after ${version} acknowledged`,
    ).toBe(true);
    expect(after.value.text).toBe(applied ? unknown.text : last);
    // Sending the unknown one again has one effect in all.
    const repeated = await set(cookie, quantity, version, unknown.text, unknown.key);
    expect(repeated.status).toBe(200);
    expect(await impulse(cookie)).toMatchObject({ version: version + 1, value: { text: unknown.text } });
    const stopped = new Promise((resolve) => again.once('exit', resolve));
    again.kill('SIGKILL');
    await stopped;
  }
  expect(acknowledged).toBeGreaterThan(KILLS);
});
