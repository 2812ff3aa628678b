/** The runner of `npm test` and the check of dependencies. */
import assert from 'node:assert/strict';
import { describe, it } from 'node:test';
import { dependencyFaults, isBelow } from './dependency-floors.mjs';
import { runSteps } from './step-runner.mjs';

const passes = (/** @type {number} */ passed) => async () => ({ passed, failed: 0, output: '' });
const quietly = () => undefined;

describe('steps', () => {
  it('are added up over all runners; one that throws counts as one failure', async () => {
    const { passed, failed } = await runSteps(
      [
        { name: 'a', run: passes(3) },
        { name: 'b', run: () => Promise.reject(new Error('broken')) },
        { name: 'c', run: async () => ({ passed: 2, failed: 4, output: 'four' }) },
      ],
      2,
      quietly,
    );
    assert.deepEqual({ passed, failed }, { passed: 5, failed: 5 });
  });

  it('run no more at once than there are lanes, wait for what they come after, and alone when they ask for it', async () => {
    /** @type {Set<string>} */
    const running = new Set();
    /** @type {string[][]} */
    const seen = [];
    const step = (/** @type {string} */ name, /** @type {object} */ extra = {}) => ({
      name,
      ...extra,
      run: async () => {
        running.add(name);
        seen.push([...running]);
        await new Promise((resolve) => setTimeout(resolve, 10));
        running.delete(name);
        return { passed: 1, failed: 0, output: '' };
      },
    });
    await runSteps(
      [step('alone', { alone: true, after: ['c'] }), step('b', { after: ['c'] }), step('c'), step('d')],
      2,
      quietly,
    );
    assert.ok(seen.every((names) => names.length <= 2));
    assert.ok(seen.every((names) => !names.includes('alone') || names.length === 1));
    assert.ok(seen.every((names) => !(names.includes('b') && names.includes('c'))));
    assert.equal(seen.length, 4);
  });
});

describe('dependency floors', () => {
  const rules = { floors: [{ package: 'qs', atLeast: '6.16.0', advisory: 'a hole' }], installScripts: ['esbuild'] };

  it('hold for the lockfile of this repository', () => assert.deepEqual(dependencyFaults(), []));

  it('find a low version however deep it lies, a missing digest, and an unknown installation script', () => {
    const faults = dependencyFaults(
      {
        '': {},
        'node_modules/a/node_modules/qs': { version: '6.15.9', integrity: 'sha512-x' },
        'node_modules/b': { version: '1.0.0' },
        'node_modules/c': { version: '1.0.0', integrity: 'sha512-x', hasInstallScript: true },
        'node_modules/esbuild': { version: '1.0.0', integrity: 'sha512-x', hasInstallScript: true },
      },
      rules,
    );
    assert.deepEqual(faults, [
      'node_modules/a/node_modules/qs is 6.15.9, below 6.16.0 (a hole).',
      'node_modules/b has no integrity digest in package-lock.json.',
      'node_modules/c runs a script on installation and is not on the list of those that may.',
    ]);
  });

  it('compare numbers, not text, and put a pre-release below its release', () => {
    assert.equal(isBelow('6.9.0', '6.16.0'), true);
    assert.equal(isBelow('10.0.0', '9.1.0'), false);
    assert.equal(isBelow('15.2.0-rc.1', '15.2.0'), true);
    assert.equal(isBelow('15.2.0', '15.2.0'), false);
  });
});
