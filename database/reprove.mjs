/**
 * `npm run reprove`: recomputes every study from scratch and compares with what is stored. Works on the product's own
 * database, whether the product runs or not, or on the one that DATABASE_URL names.
 */
import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { buildServer, serverDirectory } from './build.mjs';
import { startCluster } from './cluster.mjs';
import { openDataDirectory } from './data-directory.mjs';
import { ensureDebianPackages, ensureNodeModules } from './install.mjs';
import { databaseName } from './prepare.mjs';
import { postgresPackage } from './product.mjs';
import { Refusal, fileSystemRefusal } from './refusal.mjs';
import { holdDataDirectory, liveHolder } from './running.mjs';
import { readSettings } from './settings.mjs';

async function main() {
  const settings = readSettings({ ...process.env, PUBLIC_URL: undefined, LOOPBACK_HTTP: '1' });
  const say = (/** @type {string} */ line) => console.log(line);
  await ensureNodeModules(say);
  await buildServer();
  if (settings.databaseUrl !== undefined) return reprove(settings.databaseUrl);

  await ensureDebianPackages([postgresPackage], say);
  const data = openDataDirectory(settings.dataDirectory);
  const productRuns = liveHolder(data) !== undefined;
  const letGo = productRuns ? () => undefined : holdDataDirectory(data, 'npm run reprove');
  try {
    const cluster = await startCluster(data);
    try {
      await reprove(cluster.url(databaseName(settings.demo)));
    } finally {
      if (!productRuns) await cluster.stop();
    }
  } finally {
    letGo();
  }
}

/** Runs the bundled re-proof; its exit code becomes ours. @param {string} databaseUrl */
function reprove(databaseUrl) {
  return new Promise((/** @type {(value: void) => void} */ resolve, reject) => {
    const child = spawn(
      process.execPath,
      ['--enable-source-maps', join(serverDirectory, 'reprove.cjs'), ...process.argv.slice(2)],
      {
        env: { ...process.env, DATABASE_URL: databaseUrl },
        stdio: 'inherit',
      },
    );
    child.once('error', reject);
    child.once('exit', (code) => {
      process.exitCode = code ?? 1;
      resolve();
    });
  });
}

main().catch((/** @type {unknown} */ error) => {
  const refusal = error instanceof Refusal ? error : fileSystemRefusal(error);
  console.error(refusal === undefined ? error : `\n${refusal.message}`);
  process.exitCode = refusal?.exitCode ?? 1;
});
