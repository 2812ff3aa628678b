/** Runs steps in lanes, each as soon as what it waits for has passed, and adds up what they counted. */
import { stripVTControlCharacters } from 'node:util';
import { CommandFailed } from '../database/processes.mjs';

/**
 * @typedef {object} Outcome
 * @property {number} passed
 * @property {number} failed
 * @property {string} output shown in full when something failed
 *
 * @typedef {object} Step
 * @property {string} name
 * @property {string[]} [after] steps that must have ended before, when they run at all
 * @property {boolean} [alone] needs the whole machine
 * @property {() => Promise<Outcome>} run
 */

/** @param {readonly Step[]} steps in order of preference @param {number} lanes @param {(line: string) => void} say */
export async function runSteps(steps, lanes, say) {
  const begin = performance.now();
  const waiting = [...steps];
  /** @type {Map<Step, Promise<void>>} */
  const running = new Map();
  const totals = { passed: 0, failed: 0, seconds: 0 };

  const mayStart = (/** @type {Step} */ step) => {
    const unfinished = new Set([...waiting, ...running.keys()].map(({ name }) => name));
    if (step.after?.some((name) => unfinished.has(name))) return false;
    if ([...running.keys()].some(({ alone }) => alone)) return false;
    return running.size < (step.alone ? 1 : lanes);
  };
  const start = (/** @type {Step} */ step) => {
    waiting.splice(waiting.indexOf(step), 1);
    running.set(
      step,
      runStep(step, say).then(({ passed, failed }) => {
        totals.passed += passed;
        totals.failed += failed;
        running.delete(step);
      }),
    );
  };

  while (waiting.length > 0 || running.size > 0) {
    for (let next = waiting.find(mayStart); next !== undefined; next = waiting.find(mayStart)) start(next);
    await Promise.race(running.values());
  }
  totals.seconds = (performance.now() - begin) / 1000;
  return totals;
}

/** @param {Step} step @param {(line: string) => void} say @returns {Promise<Outcome>} */
async function runStep(step, say) {
  say(`   ${step.name} …`);
  const begin = performance.now();
  /** @type {Outcome} */
  let outcome;
  try {
    outcome = await step.run();
  } catch (error) {
    outcome = { passed: 0, failed: 1, output: describe(error) };
  }
  const time = `${((performance.now() - begin) / 1000).toFixed(1)} s`;
  const verdict = outcome.failed === 0 ? 'ok  ' : 'FAIL';
  if (outcome.failed > 0)
    say(
      `\n──── ${step.name} ${'─'.repeat(Math.max(0, 70 - step.name.length))}\n${stripVTControlCharacters(outcome.output).trimEnd()}`,
    );
  say(`${verdict} ${step.name}: ${outcome.passed} passed, ${outcome.failed} failed (${time})`);
  return outcome;
}

/** A failed command is told by what it printed; anything else by where it happened. @param {unknown} error */
function describe(error) {
  if (error instanceof CommandFailed) return error.message;
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
