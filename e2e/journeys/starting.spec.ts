import { expect, test } from '@playwright/test';
import { type ChildProcess, execFileSync, spawn } from 'node:child_process';
import {
  chmodSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  rmSync,
  writeFileSync,
} from 'node:fs';
import { createServer } from 'node:http';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { freePort } from '../../database/ports.mjs';

let scratch: string;
const started: ChildProcess[] = [];

test.beforeEach(() => {
  scratch = mkdtempSync(join(tmpdir(), 'deltaproof-start-'));
  chmodSync(scratch, 0o711);
});

test.afterEach(async () => {
  await Promise.all(started.splice(0).map(async (starter) => endOf(starter, 'SIGTERM')));
  rmSync(scratch, { recursive: true, force: true });
});

interface Start {
  readonly starter: ChildProcess;
  readonly url: string;
  output(): string;
  /** Resolves when the address has been printed; rejects when the start ends before. */
  readonly ready: Promise<void>;
}

/** `npm start` without npm and without the demonstration, which takes the longest and changes nothing here. */
async function start(env: NodeJS.ProcessEnv = {}): Promise<Start> {
  const port = env['PORT'] ?? String(await freePort());
  const starter = spawn(process.execPath, ['database/start.mjs'], {
    env: { ...process.env, NODE_ENV: 'development', DEMO: '0', DATA_DIR: join(scratch, 'data'), PORT: port, ...env },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  started.push(starter);
  let output = '';
  const ready = new Promise<void>((resolve, reject) => {
    const collect = (chunk: Buffer): void => {
      output += chunk.toString();
      if (output.includes('Press Ctrl-C')) resolve();
    };
    starter.stdout.on('data', collect);
    starter.stderr.on('data', collect);
    starter.once('close', () => reject(new Error(`ended before it was ready:\n${output}`)));
  });
  ready.catch(() => undefined);
  return { starter, url: `http://localhost:${port}`, output: () => output, ready };
}

/** Sends a signal when the process still lives, and returns its exit code once it has ended. */
async function endOf(starter: ChildProcess, signal?: NodeJS.Signals): Promise<number | null> {
  if (starter.exitCode !== null || starter.signalCode !== null) return starter.exitCode;
  return new Promise((resolve) => {
    starter.once('exit', (code) => resolve(code));
    if (signal !== undefined) starter.kill(signal);
  });
}

/** Processes that work on the scratch directory, PostgreSQL included. */
function processesLeft(): string[] {
  const lines = execFileSync('ps', ['-eo', 'args'], { encoding: 'utf8' }).split('\n');
  return lines.filter((line) => line.includes(scratch));
}

async function healthOf(url: string): Promise<number> {
  return (await fetch(`${url}/api/health`)).status;
}

test('a first start serves, SIGTERM leaves nothing running, and a second start builds nothing again', async () => {
  const first = await start();
  await first.ready;
  expect(await healthOf(first.url)).toBe(200);
  expect(await endOf(first.starter, 'SIGTERM')).toBe(0);
  expect(processesLeft()).toEqual([]);
  await expect(healthOf(first.url)).rejects.toThrow();

  const second = await start();
  await second.ready;
  expect(await healthOf(second.url)).toBe(200);
  // The client is not built again: that is what makes a second start quick.
  expect(second.output()).not.toContain('Building the client');
});

test('Ctrl-C leaves nothing running', async () => {
  const product = await start();
  await product.ready;
  expect(await endOf(product.starter, 'SIGINT')).toBe(0);
  expect(processesLeft()).toEqual([]);
});

test('a starter killed without a word takes its server along, and the next start goes on with the same database', async () => {
  const killed = await start();
  await killed.ready;
  await endOf(killed.starter, 'SIGKILL');
  await expect.poll(() => healthOf(killed.url).catch(() => 'gone'), { timeout: 15_000 }).toBe('gone');

  const next = await start();
  await next.ready;
  expect(await healthOf(next.url)).toBe(200);
  expect(await endOf(next.starter, 'SIGTERM')).toBe(0);
  expect(processesLeft()).toEqual([]);
});

test('a first start cut short at any moment is taken up by the next one', async () => {
  for (const milliseconds of [150, 500, 900, 1_400, 2_000]) {
    const cut = await start();
    await new Promise((resolve) => setTimeout(resolve, milliseconds));
    await endOf(cut.starter, 'SIGKILL');
  }
  const next = await start();
  await next.ready;
  expect(await healthOf(next.url)).toBe(200);
});

test('a busy port is named, with what to do, and nothing is left running', async () => {
  const port = await freePort();
  const other = createServer().listen(port, '127.0.0.1');
  try {
    const refused = await start({ PORT: String(port) });
    expect(await endOf(refused.starter)).toBe(1);
    expect(refused.output()).toContain(`Port ${port} is in use. Choose another one: PORT=${port + 1} npm start`);
    expect(processesLeft()).toEqual([]);
  } finally {
    other.close();
  }
});

test('a directory that holds something else is refused and left as it is', async () => {
  const foreign = join(scratch, 'thesis');
  mkdirSync(foreign);
  writeFileSync(join(foreign, 'chapter-1.odt'), 'text');
  const refused = await start({ DATA_DIR: foreign });
  expect(await endOf(refused.starter)).toBe(1);
  expect(refused.output()).toContain('holds something that is not Deltaproof');
  expect(readdirSync(foreign)).toEqual(['chapter-1.odt']);
});

test('a second start on the same data directory says who holds it and harms nobody', async () => {
  const holder = await start();
  await holder.ready;
  const refused = await start();
  expect(await endOf(refused.starter)).toBe(1);
  expect(refused.output()).toContain(`in use: Deltaproof at ${holder.url} (process ${holder.starter.pid})`);
  expect(await healthOf(holder.url)).toBe(200);
});

test('the database password is readable by its owner only and PostgreSQL asks for it on loopback alone', async () => {
  const product = await start();
  await product.ready;
  const passwordFile = join(scratch, 'data/database-password');
  expect(execFileSync('stat', ['-c', '%a', passwordFile], { encoding: 'utf8' }).trim()).toBe('600');
  expect(readFileSync(passwordFile, 'utf8').trim()).toMatch(/^[\w-]{32}$/);
  const postgres = processesLeft().find((line) => line.includes('listen_addresses')) ?? '';
  expect(postgres).toContain('listen_addresses=127.0.0.1');
  expect(postgres).toContain('unix_socket_directories= ');
  for (const setting of ['fsync', 'full_page_writes', 'synchronous_commit'])
    expect(postgres).toContain(`${setting}=on`);
});

const refusedSettings = [
  { why: 'demonstration data', env: { NODE_ENV: 'production', DEMO: '1', PUBLIC_URL: 'https://a.example' }, code: 65 },
  { why: 'a plain HTTP address', env: { NODE_ENV: 'production', PUBLIC_URL: 'http://a.example' }, code: 67 },
  { why: 'no address', env: { NODE_ENV: 'production' }, code: 67 },
  { why: 'no mail server', env: { NODE_ENV: 'production', PUBLIC_URL: 'https://a.example' }, code: 73 },
];
for (const { why, env, code } of refusedSettings) {
  test(`production does not start with ${why}`, async () => {
    const refused = await start({ DEMO: '0', ...env });
    expect(await endOf(refused.starter), refused.output()).toBe(code);
    expect(processesLeft()).toEqual([]);
  });
}

test('settings that make no sense are refused before anything is made', async () => {
  for (const env of [{ PORT: 'eighty' }, { PORT: '70000' }, { DEMO: 'yes' }, { PUBLIC_URL: 'here' }]) {
    const refused = await start(env);
    expect(await endOf(refused.starter), refused.output()).toBe(64);
  }
  expect(existsSync(join(scratch, 'data'))).toBe(false);
});
