/** The server as a child process: started from its bundle, waited for, and told when its starter is gone. */
import { join } from 'node:path';
import { repository, serverDirectory } from './build.mjs';
import { startChild } from './processes.mjs';
import { Refusal } from './refusal.mjs';

/** @typedef {{ code: number, how: string }} ServerEnd */

/**
 * Starts the server and returns once it answers its health check; throws when it ends before.
 * @param {{ port: number, env: NodeJS.ProcessEnv, log?: number }} options `log`: file descriptor for its output
 */
export async function startServer({ port, env, log }) {
  const output = log ?? 'inherit';
  const server = startChild(
    process.execPath,
    [
      '--enable-source-maps',
      '--require',
      join(repository, 'database/follow-starter.cjs'),
      join(serverDirectory, 'main.cjs'),
    ],
    { cwd: repository, env, stdio: ['ignore', output, output, 'ipc'] },
  );
  const ended = new Promise((/** @type {(end: ServerEnd) => void} */ resolve) => {
    server.once('exit', (code, signal) => resolve({ code: code ?? 1, how: signal ?? `exit code ${code}` }));
  });
  const up = await Promise.race([healthy(server, port, 60_000), ended]);
  if (up === false) throw new Refusal('The server did not answer its health check within 60 s.');
  if (up !== true) throw new Refusal(`The server did not start (${up.how}).`, up.code || 1);
  return { process: server, ended };
}

/**
 * Whether the server answers its health check in time; gives up at once when the server has ended.
 * @param {import('node:child_process').ChildProcess} server @param {number} port @param {number} patience milliseconds
 */
async function healthy(server, port, patience) {
  const deadline = Date.now() + patience;
  while (Date.now() < deadline && server.exitCode === null && server.signalCode === null) {
    try {
      const answer = await fetch(`http://127.0.0.1:${port}/api/health`, { signal: AbortSignal.timeout(2_000) });
      if (answer.ok) return true;
    } catch {
      // Not listening yet.
    }
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  return false;
}
