/** Bundles the benchmark and runs it with the garbage collector exposed; arguments are passed on (--json). */
import { spawnSync } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const root = resolve(dirname(fileURLToPath(import.meta.url)), '../..');
// Inside node_modules, so that the packages left out of the bundle are found from there.
const folder = mkdtempSync(join(root, 'node_modules', '.bench-'));
try {
  const outfile = join(folder, 'main.mjs');
  await build({
    entryPoints: [join(root, 'shared/bench/main.ts')],
    outfile,
    bundle: true,
    platform: 'node',
    format: 'esm',
    target: 'node20',
    packages: 'external',
    tsconfig: join(root, 'tsconfig.json'),
    logLevel: 'warning',
  });
  const run = spawnSync(process.execPath, ['--expose-gc', outfile, ...process.argv.slice(2)], { stdio: 'inherit' });
  process.exitCode = run.status ?? 1;
} finally {
  rmSync(folder, { recursive: true, force: true });
}
