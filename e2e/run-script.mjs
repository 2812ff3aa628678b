/** Runs a TypeScript script of the repository: `node e2e/run-script.mjs <file.ts> [arguments]`. */
import { spawnSync } from 'node:child_process';
import { rmSync } from 'node:fs';
import { basename, dirname, join, resolve } from 'node:path';
import { pathToFileURL } from 'node:url';
import { build } from 'esbuild';
import { repository } from '../database/build.mjs';

const [file, ...rest] = process.argv.slice(2);
if (file === undefined) throw new Error('Name the script to run: node e2e/run-script.mjs <file.ts>');
const bundle = join(repository, '.cache/scripts', `${basename(file, '.ts')}.${process.pid}.mjs`);
await build({
  absWorkingDir: repository,
  entryPoints: [file],
  outfile: bundle,
  bundle: true,
  platform: 'node',
  target: 'node20',
  format: 'esm',
  packages: 'external',
  alias: { '@shared': join(repository, 'shared/src') },
  sourcemap: 'inline',
  logLevel: 'warning',
  plugins: [
    {
      // The starter's modules find the repository by their own place, so they are loaded from there.
      name: 'own-modules-stay',
      setup(bundler) {
        bundler.onResolve({ filter: /^\..*\.mjs$/ }, ({ path, importer }) => ({
          path: pathToFileURL(resolve(dirname(importer), path)).href,
          external: true,
        }));
      },
    },
  ],
});
const { status } = spawnSync(process.execPath, ['--enable-source-maps', bundle, ...rest], {
  stdio: 'inherit',
  cwd: repository,
});
rmSync(bundle, { force: true });
process.exitCode = status ?? 1;
