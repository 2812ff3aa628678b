/** Builds of the server programs (esbuild, well under a second) and of the client (Angular, half a minute). */
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, renameSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { basename, dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { run } from './processes.mjs';

export const repository = dirname(dirname(fileURLToPath(import.meta.url)));
export const serverDirectory = join(repository, 'dist/backend');
export const clientDirectory = join(repository, 'dist/frontend');

/** The server and the programs that prepare its database: output name → source. */
const serverEntries = {
  main: 'backend/src/main.ts',
  reprove: 'backend/src/reprove.ts',
  migrate: 'database/migrate.ts',
  seed: 'database/seed.ts',
  'demo-people': 'database/seeders/demo-people.ts',
};

/** Everything that the client build reads. */
const clientSources = [
  ...['frontend/src', 'frontend/public', 'frontend/tsconfig.app.json', 'shared/src'],
  ...['angular.json', 'tsconfig.json', 'package-lock.json'],
];

/**
 * Bundles TypeScript entry points for Node: one CommonJS file each, packages left in node_modules, `@shared/…` resolved.
 * @param {Record<string, string>} entries output name → source file relative to the repository
 * @param {string} directory output directory inside the repository, so that packages resolve
 */
export async function bundleForNode(entries, directory) {
  const { build } = await import('esbuild');
  const { outputFiles } = await build({
    absWorkingDir: repository,
    entryPoints: entries,
    outdir: directory,
    outExtension: { '.js': '.cjs' },
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'cjs',
    packages: 'external',
    alias: { '@shared': join(repository, 'shared/src') },
    tsconfig: join(repository, 'backend/tsconfig.json'),
    sourcemap: true,
    write: false,
    logLevel: 'silent',
  });
  mkdirSync(directory, { recursive: true });
  for (const { path, contents } of outputFiles) {
    // Renamed into place, so that a server that starts meanwhile reads the old file or the new one, never a part.
    const part = `${path}.${process.pid}.part`;
    writeFileSync(part, contents);
    renameSync(part, path);
  }
}

/** Bundles the server programs into dist/backend. */
export async function buildServer() {
  await bundleForNode(serverEntries, serverDirectory);
}

/** Builds the client into dist/frontend unless the build there was made from the very same sources. @param {(line: string) => void} say */
export async function buildClient(say) {
  const fingerprint = fingerprintOf(clientSources);
  const stamp = join(clientDirectory, 'sources.sha256');
  if (existsSync(stamp) && readFileSync(stamp, 'utf8') === fingerprint) return;
  say('Building the client …');
  const fresh = join(repository, `dist/frontend.${process.pid}`);
  try {
    const ng = join(repository, 'node_modules/@angular/cli/bin/ng.js');
    await run(process.execPath, [ng, 'build', '--output-path', fresh, '--progress=false'], {
      cwd: repository,
      env: { ...process.env, NG_CLI_ANALYTICS: 'false', NODE_ENV: 'production' },
    });
    writeFileSync(join(fresh, 'sources.sha256'), fingerprint);
    rmSync(clientDirectory, { recursive: true, force: true });
    renameSync(fresh, clientDirectory);
  } finally {
    rmSync(fresh, { recursive: true, force: true });
  }
}

/** SHA-256 over names and contents of all files below the given paths, tests left out. @param {readonly string[]} paths */
function fingerprintOf(paths) {
  const hash = createHash('sha256');
  for (const path of paths) {
    for (const file of filesBelow(join(repository, path))) {
      hash.update(`${file}\0`).update(readFileSync(file)).update('\0');
    }
  }
  return hash.digest('hex');
}

/** @param {string} path @returns {string[]} */
function filesBelow(path) {
  if (!existsSync(path)) return [];
  if (!statSync(path).isDirectory()) return path.endsWith('.spec.ts') ? [] : [path];
  if (basename(path) === 'testing') return [];
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesBelow(join(path, name)));
}
