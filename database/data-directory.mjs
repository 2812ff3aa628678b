/** The data directory: what one installation keeps between starts. A marker file says that it is ours. */
import { createHash, randomBytes } from 'node:crypto';
import { chmodSync, existsSync, mkdirSync, readFileSync, readdirSync, renameSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { Refusal } from './refusal.mjs';
import { clusterAccountCanReach, isRoot } from './postgres.mjs';

const markerName = 'deltaproof.json';
/** Where the cluster goes when the service account cannot reach the data directory. */
const reachableRoot = '/var/lib/deltaproof';

/**
 * @typedef {object} DataDirectory
 * @property {string} path absolute path
 * @property {string} clusterHome directory that holds the PostgreSQL cluster and its log
 * @property {boolean} clusterElsewhere whether `clusterHome` had to be put outside the data directory
 * @property {string} passwordFile
 * @property {string} runningFile says which process holds the directory
 */

/**
 * Creates the data directory, or opens it when it is ours; refuses a directory that holds something else.
 * @param {string} directory @returns {DataDirectory}
 */
export function openDataDirectory(directory) {
  const path = resolve(directory);
  const marker = join(path, markerName);
  if (!existsSync(marker)) {
    const strangers = existsSync(path) ? readdirSync(path).filter((name) => !name.startsWith(`${markerName}.`)) : [];
    if (strangers.length > 0) {
      throw new Refusal(
        `The data directory ${path} holds something that is not Deltaproof's (${strangers.slice(0, 3).join(', ')}). ` +
          'Nothing in it was touched. Name an empty or new directory: DATA_DIR=/some/where npm start',
      );
    }
    // As root the service account must be able to pass through; the files inside have modes of their own.
    mkdirSync(path, { recursive: true, mode: isRoot ? 0o711 : 0o700 });
    writeAtomically(marker, `${JSON.stringify({ product: 'deltaproof', layout: 1 })}\n`);
  }
  checkMarker(marker, path);
  const name = createHash('sha256').update(path).digest('hex').slice(0, 16);
  const inside = join(path, 'postgres');
  const elsewhere = join(reachableRoot, name);
  // A cluster that exists stays where it is, whatever has become of the permissions since.
  const clusterElsewhere =
    existsSync(join(elsewhere, 'cluster')) ||
    (isRoot && !existsSync(join(inside, 'cluster')) && !clusterAccountCanReach(path));
  return {
    path,
    clusterHome: clusterElsewhere ? elsewhere : inside,
    clusterElsewhere,
    passwordFile: join(path, 'database-password'),
    runningFile: join(path, 'running.json'),
  };
}

/** The database password of this data directory, generated on first use and readable by its owner only. @param {DataDirectory} data */
export function databasePassword(data) {
  if (!existsSync(data.passwordFile)) writeAtomically(data.passwordFile, `${randomBytes(24).toString('base64url')}\n`);
  return readFileSync(data.passwordFile, 'utf8').trim();
}

/** Writes a file with mode 0600 so that a crash leaves either the old content or the new, never a part. @param {string} path @param {string} content */
export function writeAtomically(path, content) {
  const part = `${path}.${process.pid}.part`;
  writeFileSync(part, content, { mode: 0o600, flush: true });
  chmodSync(part, 0o600);
  renameSync(part, path);
}

/** @param {string} marker @param {string} path */
function checkMarker(marker, path) {
  let content;
  try {
    content = JSON.parse(readFileSync(marker, 'utf8'));
  } catch {
    content = undefined;
  }
  if (content?.product !== 'deltaproof') {
    throw new Refusal(`${marker} is not a marker of Deltaproof, so the data directory ${path} is left alone.`);
  }
  if (content.layout !== 1) {
    throw new Refusal(
      `The data directory ${path} was made by a newer version of Deltaproof (layout ${content.layout}).`,
    );
  }
}
