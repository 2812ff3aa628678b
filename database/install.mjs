/** What has to be installed before anything of the product can run: npm packages and Debian packages. */
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { repository } from './build.mjs';
import { isRoot } from './postgres.mjs';
import { run } from './processes.mjs';
import { Refusal } from './refusal.mjs';

/** Whether node_modules holds what package-lock.json asks for; npm writes its own list of what it installed as its last act. */
export function nodeModulesAreCurrent(root = repository) {
  const installedList = join(root, 'node_modules/.package-lock.json');
  if (!existsSync(installedList)) return false;
  try {
    const installed = JSON.parse(readFileSync(installedList, 'utf8')).packages;
    const wanted = JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8')).packages;
    // Packages for other platforms are optional and may be absent; everything else must be there in its exact version.
    return Object.entries(wanted).every(([path, { version, optional, devOptional }]) => {
      if (path === '') return true;
      return path in installed ? installed[path].version === version : optional === true || devOptional === true;
    });
  } catch {
    return false;
  }
}

/** Runs `npm ci` when node_modules is missing or stale. @param {(line: string) => void} say */
export async function ensureNodeModules(say) {
  if (nodeModulesAreCurrent()) return;
  say('Installing npm packages (npm ci) …');
  // NODE_ENV=production would leave out what the build needs.
  await run('npm', ['ci', '--include=dev', '--no-audit', '--no-fund'], { cwd: repository });
}

/**
 * Installs missing Debian packages when we are root; otherwise refuses with the command to give.
 * @param {readonly { package: string, presentIf: () => boolean }[]} wanted @param {(line: string) => void} say
 */
export async function ensureDebianPackages(wanted, say) {
  const missing = wanted.filter(({ presentIf }) => !presentIf()).map((entry) => entry.package);
  if (missing.length === 0) return;
  const command = `apt-get install --no-install-recommends ${missing.join(' ')}`;
  if (!isRoot || !existsSync('/usr/bin/apt-get')) {
    throw new Refusal(
      `These programs are needed and not installed: ${missing.join(', ')}.\nInstall them with:  sudo ${command}`,
    );
  }
  say(`Installing ${missing.join(', ')} (apt-get) …`);
  keepPostgresqlPackageFromStartingACluster();
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  try {
    await run('apt-get', ['update', '-q'], { env });
    await run(
      'apt-get',
      ['install', '-q', '-y', '--no-install-recommends', '-o', 'Dpkg::Options::=--force-confold', ...missing],
      { env },
    );
  } catch (error) {
    throw new Refusal(
      `${error instanceof Error ? error.message : error}\n\nCould not install by itself. Try:  ${command}`,
    );
  }
}

/** Debian's package makes and starts a cluster of its own on installation; the product has one of its own and needs no other. */
function keepPostgresqlPackageFromStartingACluster() {
  const directory = '/etc/postgresql-common';
  if (existsSync(directory)) return;
  mkdirSync(directory, { recursive: true });
  writeFileSync(join(directory, 'createcluster.conf'), 'create_main_cluster = false\n');
}
