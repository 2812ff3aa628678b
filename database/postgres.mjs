/** Where Debian's PostgreSQL programs are, and how to run them: initdb and pg_ctl refuse to run as root. */
import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { execFileSync } from 'node:child_process';
import { run } from './processes.mjs';

const debianRoot = '/usr/lib/postgresql';
/** The account that Debian's package creates, and under which the cluster runs when the starter is root. */
const serviceAccount = 'postgres';

export const isRoot = process.getuid?.() === 0;

/** The program directory of the newest PostgreSQL installed (15 or later), or undefined. @param {string} [root] */
export function findPostgres(root = debianRoot) {
  if (!existsSync(root)) return undefined;
  const versions = readdirSync(root)
    .filter((name) => /^\d+$/.test(name) && Number(name) >= 15 && existsSync(join(root, name, 'bin', 'initdb')))
    .sort((a, b) => Number(b) - Number(a));
  // 15 is the version this product is tested with, so it goes first where several are installed.
  const version = versions.find((name) => name === '15') ?? versions[0];
  return version === undefined ? undefined : join(root, version, 'bin');
}

/** Runs a PostgreSQL program, as the service account when we are root. @param {string} program @param {readonly string[]} args @param {{ ignoreOutput?: boolean }} [options] */
export function runPostgresProgram(program, args, options = {}) {
  // The working directory must be one that the service account may enter.
  return isRoot
    ? run('runuser', ['-u', serviceAccount, '--', program, ...args], { cwd: '/', ...options })
    : run(program, args, { cwd: '/', ...options });
}

/** User and group number of the service account. @returns {{ uid: number, gid: number }} */
export function serviceAccountIds() {
  const number = (/** @type {string} */ flag) =>
    Number(execFileSync('id', [flag, serviceAccount], { encoding: 'utf8' }));
  return { uid: number('-u'), gid: number('-g') };
}

/** As root: whether the service account may enter a directory and so every one above it. @param {string} directory */
export function clusterAccountCanReach(directory) {
  try {
    execFileSync('runuser', ['-u', serviceAccount, '--', 'test', '-x', directory], { cwd: '/', stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
}
