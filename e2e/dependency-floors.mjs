/** Checks package-lock.json against security/floors.json, without a network: no version below a floor, nothing unverifiable. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { repository } from '../database/build.mjs';

/**
 * One sentence for each fault; none when all is well.
 * @param {Record<string, { version?: string, integrity?: string, link?: boolean, hasInstallScript?: boolean }>} packages
 * entries of the lockfile
 * @param {{ floors: readonly { package: string, atLeast: string, advisory: string }[], installScripts: readonly string[] }} rules
 */
export function dependencyFaults(packages = readLockedPackages(), rules = readRules()) {
  return Object.entries(packages).flatMap(([path, { version = '', integrity, link, hasInstallScript }]) => {
    if (path === '' || link === true) return [];
    const name = path.slice(path.lastIndexOf('node_modules/') + 'node_modules/'.length);
    const faults = rules.floors
      .filter((floor) => floor.package === name && isBelow(version, floor.atLeast))
      .map(({ atLeast, advisory }) => `${path} is ${version}, below ${atLeast} (${advisory}).`);
    if (integrity === undefined) faults.push(`${path} has no integrity digest in package-lock.json.`);
    if (hasInstallScript === true && !rules.installScripts.includes(name)) {
      faults.push(`${path} runs a script on installation and is not on the list of those that may.`);
    }
    return faults;
  });
}

/** Whether a version is lower than another; a pre-release counts as lower than its release. @param {string} version @param {string} floor */
export function isBelow(version, floor) {
  const [release = '', preRelease] = version.split('-');
  const [ours, theirs] = [release, floor].map((text) => text.split('.').map(Number));
  for (let i = 0; i < 3; i++) {
    const difference = (ours?.[i] ?? 0) - (theirs?.[i] ?? 0);
    if (difference !== 0) return difference < 0;
  }
  return preRelease !== undefined;
}

function readLockedPackages() {
  return JSON.parse(readFileSync(join(repository, 'package-lock.json'), 'utf8')).packages;
}

function readRules() {
  return JSON.parse(readFileSync(join(repository, 'security/floors.json'), 'utf8'));
}
