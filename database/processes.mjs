/**
 * Child processes of the starter, the tests and the benches. Each runs in a process group of its own, so that Ctrl-C reaches
 * them in the order in which we stop them, and so that stopping one also stops what it has started.
 */
import { spawn } from 'node:child_process';

/** @type {Set<import('node:child_process').ChildProcess>} */
const running = new Set();

/** A child process that ended with an error; `output` is everything it printed. */
export class CommandFailed extends Error {
  /** @param {string} command @param {number | null} code @param {NodeJS.Signals | null} signal @param {string} output */
  constructor(command, code, signal, output) {
    super(`${command} ended with ${signal ?? `code ${code}`}${output === '' ? '' : `:\n${output.trimEnd()}`}`);
    this.name = 'CommandFailed';
    this.code = code;
    this.output = output;
  }
}

/**
 * Starts a long-running child that `stopChildren` will also stop.
 * @param {string} command @param {readonly string[]} args @param {import('node:child_process').SpawnOptions} [options]
 */
export function startChild(command, args, options = {}) {
  const child = spawn(command, args, { detached: true, ...options });
  running.add(child);
  child.once('exit', () => running.delete(child));
  child.once('error', () => running.delete(child));
  return child;
}

/**
 * Runs a command to its end and returns what it printed; throws CommandFailed when it does not end with code 0.
 * @param {string} command @param {readonly string[]} args
 * @param {{ cwd?: string, env?: NodeJS.ProcessEnv, input?: string, onOutput?: (text: string) => void, ignoreOutput?: boolean }} [options]
 * @returns {Promise<string>}
 */
export function run(command, args, options = {}) {
  const { cwd, env, input, onOutput, ignoreOutput = false } = options;
  return new Promise((resolve, reject) => {
    const sink = ignoreOutput ? 'ignore' : 'pipe';
    const child = startChild(command, args, { cwd, env, stdio: [input === undefined ? 'ignore' : 'pipe', sink, sink] });
    let output = '';
    /** @param {Buffer} chunk */
    const collect = (chunk) => {
      output += chunk.toString();
      onOutput?.(chunk.toString());
    };
    child.stdout?.on('data', collect);
    child.stderr?.on('data', collect);
    child.stdin?.end(input);
    child.once('error', reject);
    child.once('close', (code, signal) => {
      if (code === 0) resolve(output);
      else reject(new CommandFailed([command, ...args].join(' '), code, signal, output));
    });
  });
}

/** Asks a child and its group to end, and kills them when they have not within `patience` milliseconds. @param {import('node:child_process').ChildProcess} child */
export function stopChild(child, patience = 12_000) {
  return new Promise((/** @type {(value: void) => void} */ resolve) => {
    if (child.pid === undefined || child.exitCode !== null || child.signalCode !== null) return resolve();
    const timer = setTimeout(() => signalGroup(child, 'SIGKILL'), patience);
    child.once('exit', () => {
      clearTimeout(timer);
      resolve();
    });
    signalGroup(child, 'SIGTERM');
  });
}

/** Stops every child that is still running. */
export async function stopChildren() {
  await Promise.all([...running].map((child) => stopChild(child)));
}

/** @param {import('node:child_process').ChildProcess} child @param {NodeJS.Signals} signal */
function signalGroup(child, signal) {
  if (child.pid === undefined) return;
  try {
    process.kill(-child.pid, signal);
  } catch {
    // The group ended between the check and the signal.
  }
}
