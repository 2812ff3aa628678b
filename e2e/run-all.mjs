/**
 * `npm test`: everything that must hold before a change is taken, in one command with its own set-up.
 * `npm test -- --only jest,lint` runs the steps whose names begin so; `npm test -- --list` names them.
 */
import { cpus } from 'node:os';
import { stopChildren } from '../database/processes.mjs';
import { Refusal } from '../database/refusal.mjs';
import { runSteps } from './step-runner.mjs';
import { steps } from './test-steps.mjs';
import { setUp } from './test-set-up.mjs';

const argumentsGiven = process.argv.slice(2);
const only = argumentsGiven[argumentsGiven.indexOf('--only') + 1]?.split(',') ?? [];
const chosen = argumentsGiven.includes('--only')
  ? steps.filter(({ name }) => only.some((beginning) => name.startsWith(beginning)))
  : steps;

const say = (/** @type {string} */ line) => console.log(line);

for (const signal of /** @type {const} */ (['SIGINT', 'SIGTERM'])) {
  process.on(signal, async () => {
    await stopChildren();
    process.exit(1);
  });
}

async function main() {
  if (argumentsGiven.includes('--list')) return console.log(steps.map(({ name }) => name).join('\n'));
  if (chosen.length === 0)
    throw new Refusal(`No step begins with ${only.join(' or ')}. npm test -- --list names them all.`);
  await setUp(say);
  const { passed, failed, seconds } = await runSteps(chosen, Math.min(2, cpus().length), say);
  console.log(`\nTook ${Math.round(seconds)} s.\n${passed} passed, ${failed} failed`);
  process.exitCode = failed === 0 ? 0 : 1;
}

main().catch((/** @type {unknown} */ error) => {
  console.error(error instanceof Refusal ? `\n${error.message}` : error);
  console.log('\n0 passed, 1 failed');
  process.exitCode = 1;
});
