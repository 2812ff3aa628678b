/** The parts of the starter that can be judged without starting anything. */
import assert from 'node:assert/strict';
import { spawn } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, it } from 'node:test';
import { databasePassword, openDataDirectory, writeAtomically } from './data-directory.mjs';
import { nodeModulesAreCurrent } from './install.mjs';
import { freePort, portIsFree } from './ports.mjs';
import { CommandFailed, run, startChild, stopChild } from './processes.mjs';
import { Refusal, fileSystemRefusal } from './refusal.mjs';
import { holdDataDirectory, liveHolder } from './running.mjs';
import { readSettings } from './settings.mjs';

let scratch = '';
beforeEach(() => {
  scratch = mkdtempSync(join(tmpdir(), 'deltaproof-parts-'));
});
afterEach(() => rmSync(scratch, { recursive: true, force: true }));

describe('settings', () => {
  const refusedWith = (/** @type {number} */ code) => (/** @type {unknown} */ error) =>
    error instanceof Refusal && error.exitCode === code;

  it('starts the demonstration on port 4310 when nothing is said', () => {
    const { production, demo, port, publicUrl } = readSettings({});
    assert.deepEqual(
      { production, demo, port, publicUrl },
      { production: false, demo: true, port: 4310, publicUrl: 'http://localhost:4310' },
    );
  });
  it('leaves the demonstration out in production', () => {
    assert.equal(readSettings({ NODE_ENV: 'production', PUBLIC_URL: 'https://a.example' }).demo, false);
  });
  it('takes plain HTTP in production on loopback only, and only when told so', () => {
    const env = { NODE_ENV: 'production', PUBLIC_URL: 'http://localhost:4310' };
    assert.throws(() => readSettings(env), refusedWith(67));
    assert.equal(readSettings({ ...env, LOOPBACK_HTTP: '1' }).publicUrl, env.PUBLIC_URL);
    assert.throws(() => readSettings({ ...env, PUBLIC_URL: 'http://a.example', LOOPBACK_HTTP: '1' }), refusedWith(67));
  });
  it('keeps the demonstration out of a database that it did not make', () => {
    assert.throws(() => readSettings({ DATABASE_URL: 'postgres://a/b' }), refusedWith(64));
    assert.equal(readSettings({ DATABASE_URL: 'postgres://a/b', DEMO: '0' }).databaseUrl, 'postgres://a/b');
  });
});

describe('node_modules', () => {
  const write = (/** @type {object} */ wanted, /** @type {object | undefined} */ installed) => {
    mkdirSync(join(scratch, 'node_modules'), { recursive: true });
    writeFileSync(join(scratch, 'package-lock.json'), JSON.stringify({ packages: { '': {}, ...wanted } }));
    if (installed !== undefined) {
      writeFileSync(join(scratch, 'node_modules/.package-lock.json'), JSON.stringify({ packages: installed }));
    }
  };
  const one = { 'node_modules/a': { version: '1.0.0' } };

  it('are current when every wanted package is there in its version', () => {
    write({ ...one, 'node_modules/for-another-platform': { version: '2.0.0', optional: true } }, one);
    assert.equal(nodeModulesAreCurrent(scratch), true);
  });
  it('are stale when a package is missing, of another version, or npm did not finish', () => {
    write({ ...one, 'node_modules/b': { version: '1.0.0' } }, one);
    assert.equal(nodeModulesAreCurrent(scratch), false);
    write({ 'node_modules/a': { version: '1.0.1' } }, one);
    assert.equal(nodeModulesAreCurrent(scratch), false);
    rmSync(join(scratch, 'node_modules'), { recursive: true });
    write(one, undefined);
    assert.equal(nodeModulesAreCurrent(scratch), false);
  });
});

describe('data directory', () => {
  it('is made with a marker, and opened again', () => {
    const path = join(scratch, 'data');
    openDataDirectory(path);
    assert.equal(JSON.parse(readFileSync(join(path, 'deltaproof.json'), 'utf8')).product, 'deltaproof');
    assert.equal(openDataDirectory(path).path, path);
  });
  it('is refused when it holds something else, a marker of another product, or a newer layout', () => {
    writeFileSync(join(scratch, 'notes.txt'), '');
    assert.throws(() => openDataDirectory(scratch), /holds something that is not Deltaproof's \(notes\.txt\)/);
    writeFileSync(join(scratch, 'deltaproof.json'), '{"product":"other"}');
    assert.throws(() => openDataDirectory(scratch), /not a marker of Deltaproof/);
    writeFileSync(join(scratch, 'deltaproof.json'), '{"product":"deltaproof","layout":2}');
    assert.throws(() => openDataDirectory(scratch), /newer version/);
  });
  it('keeps one password, which only its owner can read', () => {
    const data = openDataDirectory(join(scratch, 'data'));
    const password = databasePassword(data);
    assert.equal(databasePassword(data), password);
    assert.equal(statSync(data.passwordFile).mode & 0o777, 0o600);
  });
  it('is held by one live process at a time', () => {
    const data = openDataDirectory(join(scratch, 'data'));
    const letGo = holdDataDirectory(data, 'this test');
    assert.throws(
      () => holdDataDirectory(data, 'another'),
      new RegExp(`in use: this test \\(process ${process.pid}\\)`),
    );
    letGo();
    assert.equal(liveHolder(data), undefined);
  });
  it('is free again when its holder is gone and the process number belongs to another', () => {
    const data = openDataDirectory(join(scratch, 'data'));
    writeAtomically(data.runningFile, JSON.stringify({ pid: process.pid, startTime: '1', what: 'a dead one' }));
    assert.equal(liveHolder(data), undefined);
  });
});

describe('child processes', () => {
  it('hand back what they print, and fail with it', async () => {
    assert.equal(await run('echo', ['ready']), 'ready\n');
    await assert.rejects(
      run('sh', ['-c', 'echo broken >&2; exit 3']),
      (error) => error instanceof CommandFailed && error.code === 3 && error.message.includes('broken'),
    );
  });
  it('are stopped together with what they have started, by force when they do not listen', async () => {
    const pidFile = join(scratch, 'pid');
    const child = startChild('sh', ['-c', `trap '' TERM; sleep 60 & echo $! > ${pidFile}; while :; do wait; done`], {
      stdio: 'ignore',
    });
    while (!existsSync(pidFile) || readFileSync(pidFile, 'utf8') === '')
      await new Promise((resolve) => setTimeout(resolve, 20));
    await stopChild(child, 300);
    const grandchild = Number(readFileSync(pidFile, 'utf8'));
    assert.equal(child.signalCode, 'SIGKILL');
    // Ended, or a zombie that nobody has collected yet.
    const left = spawn('ps', ['-o', 'stat=', '-p', String(grandchild)]);
    const state = await new Promise((resolve) => left.stdout.once('data', resolve).once('end', () => resolve('')));
    assert.match(String(state).trim(), /^(Z.*)?$/);
  });
});

describe('ports', () => {
  it('are told busy from free', async () => {
    const port = await freePort();
    assert.equal(await portIsFree(port), true);
    const server = createServer().listen(port, '127.0.0.1');
    await new Promise((resolve) => server.once('listening', resolve));
    assert.equal(await portIsFree(port), false);
    server.close();
  });
});

describe('file errors', () => {
  it('become sentences where the person can do something', () => {
    assert.match(fileSystemRefusal({ code: 'ENOSPC', path: '/d' })?.message ?? '', /disk is full \(writing \/d\)/);
    assert.match(fileSystemRefusal({ code: 'EACCES', path: '/d' })?.message ?? '', /may not write \/d/);
    assert.equal(fileSystemRefusal(new TypeError('a mistake of ours')), undefined);
  });
});
