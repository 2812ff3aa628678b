/** `npm start`: from a fresh clone to an address in the browser, and back to nothing running on Ctrl-C or SIGTERM. */
import { createRequire } from 'node:module';
import { join } from 'node:path';
import { serverDirectory } from './build.mjs';
import { startProduct } from './product.mjs';
import { stopChildren } from './processes.mjs';
import { Refusal, fileSystemRefusal } from './refusal.mjs';
import { readSettings } from './settings.mjs';

const say = (/** @type {string} */ line) => console.log(line);

/** Why we are stopping, once we are. @type {NodeJS.Signals | undefined} */
let stopping;
const abort = new AbortController();
const signalled = new Promise((/** @type {(value: 'signal') => void} */ resolve) => {
  for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM', 'SIGHUP'])) {
    process.on(signal, () => {
      if (stopping !== undefined) return;
      stopping = signal;
      abort.abort();
      resolve('signal');
    });
  }
});

async function main() {
  const settings = readSettings();
  const starting = startProduct(settings, { say, signal: abort.signal });
  const outcome = await Promise.race([starting, signalled]);
  if (outcome === 'signal') {
    // Cut the running step short; the start then fails and undoes what it had done.
    await stopChildren();
    const late = await starting.catch(() => undefined);
    await late?.stop();
    say('Stopped before it was ready; the next start takes up from here.');
    process.exitCode = 1;
    return;
  }
  say(`\nDeltaproof is ready:  ${outcome.url}\n`);
  if (settings.demo) announceDemonstration();
  say('Press Ctrl-C to stop.');
  const end = await Promise.race([outcome.serverEnded, signalled]);
  await outcome.stop();
  if (end !== 'signal')
    throw new Refusal(`The server ended by itself (${end}); what was committed is safe. Start it again.`);
  say('Stopped.');
}

function announceDemonstration() {
  const { DEMO_PEOPLE, DEMO_PASSWORD } = createRequire(import.meta.url)(join(serverDirectory, 'demo-people.cjs'));
  say(`Demonstration sign-ins (password for all: ${DEMO_PASSWORD})`);
  for (const { name, email, title } of DEMO_PEOPLE) say(`  ${email.padEnd(44)} ${name}, ${title}`);
  say('');
}

main().catch((/** @type {unknown} */ error) => {
  if (stopping !== undefined) return;
  const refusal = error instanceof Refusal ? error : fileSystemRefusal(error);
  console.error(refusal === undefined ? error : `\n${refusal.message}`);
  process.exitCode = refusal?.exitCode ?? 1;
});
