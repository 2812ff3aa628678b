/** The steps of `npm test`, the longest first. Each check counts as one, each test of a runner as one. */
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import { buildClient, repository } from '../database/build.mjs';
import { CommandFailed, run } from '../database/processes.mjs';

const reports = join(repository, '.cache/test-reports');
const programs = {
  eslint: 'node_modules/eslint/bin/eslint.js',
  prettier: 'node_modules/prettier/bin/prettier.cjs',
  tsc: 'node_modules/typescript/bin/tsc',
  ngc: 'node_modules/@angular/compiler-cli/bundles/src/bin/ngc.js',
  madge: 'node_modules/madge/bin/cli.js',
  jest: 'node_modules/jest/bin/jest.js',
  playwright: 'node_modules/@playwright/test/cli.js',
};

/** @type {import('./step-runner.mjs').Step[]} */
export const steps = [
  { name: 'build: client', run: () => counted(() => buildClient(() => undefined)) },
  jest('backend'),
  jest('frontend'),
  check('types: frontend', 'ngc', ['--noEmit', '-p', 'frontend/tsconfig.json']),
  lint('frontend'),
  lint('backend', 'database'),
  jest('shared'),
  lint('shared', 'e2e', '.lint', '*.mjs'),
  check('types: backend', 'tsc', ['-p', 'backend/tsconfig.json']),
  check('types: shared', 'tsc', ['-p', 'shared/tsconfig.json']),
  check('types: e2e', 'tsc', ['-p', 'e2e/tsconfig.json']),
  check('types: scripts', 'tsc', ['-p', 'database/tsconfig.scripts.json']),
  check('cycles', 'madge', [
    ...['--circular', '--no-spinner', '--extensions', 'ts', '--ts-config', 'tsconfig.json'],
    ...['shared', 'backend', 'database', 'frontend/src', 'e2e'],
  ]),
  check('format', 'prettier', ['--check', '--log-level', 'warn', '.']),
  { name: 'house', run: houseTests },
  { name: 'e2e', after: ['build: client'], alone: true, run: playwright },
];

/** A check that counts as one. @param {string} name @param {keyof typeof programs} program @param {string[]} args @returns {import('./step-runner.mjs').Step} */
function check(name, program, args) {
  return { name, run: () => counted(() => runNode(program, args)) };
}

/** ESLint over some folders; in several steps, because each builds the type information of what it looks at. @param {string[]} folders */
function lint(...folders) {
  return check(`lint: ${folders[0]}`, 'eslint', ['--max-warnings', '0', ...folders]);
}

/** One Jest project. @param {string} project @returns {import('./step-runner.mjs').Step} */
function jest(project) {
  return {
    name: `jest: ${project}`,
    run: async () => {
      const report = newReport(`jest-${project}.json`);
      const args = ['--selectProjects', project, '--maxWorkers', '1', '--json', '--outputFile', report];
      const output = await outputOf(() => runNode('jest', args));
      if (!existsSync(report)) return { passed: 0, failed: 1, output };
      const result = JSON.parse(readFileSync(report, 'utf8'));
      const failed = result.numFailedTests + result.numRuntimeErrorTestSuites;
      const silentFailure = failed === 0 && result.success !== true ? 1 : 0;
      return { passed: result.numPassedTests, failed: failed + silentFailure, output: withoutReport(output) };
    },
  };
}

/** Tests of the starter, of this runner and of the lint rules, by Node's own runner. @returns {Promise<import('./step-runner.mjs').Outcome>} */
async function houseTests() {
  const files = ['database/starter.test.mjs', 'e2e/runner.test.mjs', '.lint/house-rules.test.mjs'];
  const output = await outputOf(() =>
    run(process.execPath, ['--test', '--test-reporter=tap', ...files], { cwd: repository }),
  );
  const count = (/** @type {string} */ what) => Number(new RegExp(`^# ${what} (\\d+)$`, 'm').exec(output)?.[1] ?? 0);
  const [passed, failed] = [count('pass'), count('fail') + count('cancelled') + count('skipped') + count('todo')];
  return { passed, failed: passed + failed === 0 ? 1 : failed, output };
}

/** The journeys in Chromium against the built product. @returns {Promise<import('./step-runner.mjs').Outcome>} */
async function playwright() {
  const report = newReport('playwright.json');
  const env = { ...process.env, PLAYWRIGHT_JSON_OUTPUT_NAME: report };
  const output = await outputOf(() => runNode('playwright', ['test', '--reporter=list,json'], env));
  if (!existsSync(report)) return { passed: 0, failed: 1, output };
  const { stats, errors } = JSON.parse(readFileSync(report, 'utf8'));
  // A skipped or flaky journey has not shown what it is there to show.
  const failed = stats.unexpected + stats.flaky + stats.skipped + errors.length;
  const nothingRan = failed + stats.expected === 0 ? 1 : 0;
  return { passed: stats.expected, failed: failed + nothingRan, output };
}

/** @param {keyof typeof programs} program @param {string[]} args @param {NodeJS.ProcessEnv} [env] */
function runNode(program, args, env = process.env) {
  // Jest and the Angular build behave as in a terminal only when not told that they are in production.
  return run(process.execPath, [join(repository, programs[program]), ...args], {
    cwd: repository,
    env: { ...env, NODE_ENV: 'test', NO_COLOR: '1' },
  });
}

/** @param {() => Promise<unknown>} work @returns {Promise<import('./step-runner.mjs').Outcome>} */
async function counted(work) {
  await work();
  return { passed: 1, failed: 0, output: '' };
}

/** What a command printed, whether it succeeded or not. @param {() => Promise<string>} work */
async function outputOf(work) {
  try {
    return await work();
  } catch (error) {
    if (error instanceof CommandFailed) return error.output;
    throw error;
  }
}

/** @param {string} name */
function newReport(name) {
  mkdirSync(reports, { recursive: true });
  const report = join(reports, name);
  rmSync(report, { force: true });
  return report;
}

/** Jest's JSON goes to the file; what it prints to the terminal is kept. @param {string} output */
function withoutReport(output) {
  return output
    .split('\n')
    .filter((line) => !line.startsWith('{"num'))
    .join('\n');
}
