/** Builds of the server programs (esbuild, well under a second) and of the client (Angular, half a minute). */
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';

export const repository = dirname(dirname(fileURLToPath(import.meta.url)));

/**
 * Bundles TypeScript entry points for Node: one CommonJS file each, packages left in node_modules, `@shared/…` resolved.
 * @param {Record<string, string>} entries output name → source file relative to the repository
 * @param {string} directory output directory inside the repository, so that packages resolve
 */
export async function bundleForNode(entries, directory) {
  const { build } = await import('esbuild');
  await build({
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
    logLevel: 'silent',
  });
}
