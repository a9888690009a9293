import { readdirSync, readFileSync, rmSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { runShown, runTogether } from './child-process.mjs';

/** @typedef {import('./child-process.mjs').Task} Task */

/**
 * Compiles every tsconfig.NAME.json without writing anything; each stands for a set of globals that its files
 * may use.
 *
 * @param {string} root
 * @returns {Promise<number>} how many of them failed
 */
export function runTypes(root) {
  const projects = readdirSync(root).filter((file) => /^tsconfig\..+\.json$/.test(file));
  return runTogether(
    root,
    projects.map((project) => ({
      label: `types ${project}`,
      // Angular's own compiler, for the types in the templates.
      script:
        project === 'tsconfig.app.json'
          ? 'node_modules/@angular/compiler-cli/bundles/src/bin/ngc.js'
          : 'node_modules/typescript/bin/tsc',
      args: [
        ...['--project', project, '--noEmit', '--pretty', 'false', '--incremental'],
        ...['--tsBuildInfoFile', `dist/types/${project}.tsbuildinfo`],
      ],
    })),
  );
}

/**
 * @param {string} root
 * @returns {Promise<number>} how many of lint and format failed
 */
export function runLint(root) {
  return runTogether(root, [
    { label: 'lint', script: 'node_modules/eslint/bin/eslint.js', args: ['.', '--max-warnings', '0'] },
    {
      label: 'format',
      script: 'node_modules/prettier/bin/prettier.cjs',
      args: ['--check', '--log-level', 'warn', '.'],
    },
  ]);
}

/**
 * Test counts of a finished run. A file that could not be loaded has no tests to count and is one failure.
 *
 * @param {string} outcomeFile
 * @returns {{ passed: number, failed: number }}
 */
function readOutcome(outcomeFile) {
  /** @type {{ numPassedTests: number, numFailedTests: number, testResults: { status: string, assertionResults: { status: string }[] }[] }} */
  let outcome;
  try {
    outcome = JSON.parse(readFileSync(outcomeFile, 'utf8'));
  } catch {
    return { passed: 0, failed: 0 };
  }
  const unloadable = outcome.testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && !assertionResults.some((assertion) => assertion.status === 'failed'),
  );
  return { passed: outcome.numPassedTests, failed: outcome.numFailedTests + unloadable.length };
}

/**
 * @param {string} root
 * @param {string} outcomeFile what the run writes
 * @param {import('./child-process.mjs').Task} task
 */
async function runCounted(root, outcomeFile, task) {
  rmSync(outcomeFile, { force: true });
  const status = await runShown(root, task);
  const { passed, failed } = readOutcome(outcomeFile);
  // Errors outside of any test, and a run in which nothing was tested, must not look like success.
  const unseen = failed === 0 && (status !== 0 || passed === 0) ? 1 : 0;
  return { passed, failed: failed + unseen };
}

/**
 * @param {string} root
 * @param {string[]} filters passed on to the test runner, to run a part of the tests
 */
function runVitest(root, filters) {
  const outcomeFile = join(root, 'dist', 'test-outcome.json');
  return runCounted(root, outcomeFile, {
    label: 'tests',
    script: 'node_modules/vitest/vitest.mjs',
    args: ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${outcomeFile}`, ...filters],
  });
}

/**
 * Component tests are built by Angular before they run, hence a run of their own.
 *
 * @param {string} root
 */
function runPageTests(root) {
  const outcomeFile = join(root, 'dist', 'test-outcome-pages.json');
  return runCounted(root, outcomeFile, {
    label: 'tests of the pages',
    script: 'node_modules/@angular/cli/bin/ng.js',
    // The output file belongs to the reporter that is named first.
    args: ['test', '--no-watch', '--reporters=json', '--reporters=default', `--output-file=${outcomeFile}`],
  });
}

/**
 * Types, lint and tests, all of them even where an earlier one fails, and their sum on the last line.
 *
 * @param {string} root
 * @param {string[]} filters
 * @returns {Promise<number>} exit status
 */
export async function runTests(root, filters) {
  const types = await runTypes(root);
  const lint = await runLint(root);
  const tests = await runVitest(root, filters);
  const pages = filters.length === 0 ? await runPageTests(root) : { passed: 0, failed: 0 };
  const failed = types + lint + tests.failed + pages.failed;
  process.stdout.write(`\n${tests.passed + pages.passed} passed, ${failed} failed\n`);
  return failed === 0 ? 0 : 1;
}
