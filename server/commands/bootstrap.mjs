// Entry of every npm script: `node server/commands/bootstrap.mjs NAME [arguments]`.
//
// Uses Node's own modules only, since it must run on a fresh clone, and loads each further step when it is
// needed: the study command is started by people's own pipelines, where every hundredth of a second shows.
// Nothing here writes to standard output; that belongs to the command which is run.

import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { pathToFileURL } from 'node:url';
import { SetupFailure } from './bootstrap/setup-failure.mjs';
import { requireNodeVersion } from './bootstrap/node-version.mjs';
import { installPackages } from './bootstrap/packages.mjs';

/** Exit status when a command could not be set up; apart from those that the commands themselves use. */
const SETUP_FAILED = 3;

const root = join(import.meta.dirname, '..', '..');

/**
 * Commands that run as a bundle in this process: their entry points, and where their packages are.
 *
 * @type {ReadonlyMap<string, { entry: string, packages: 'inside' | 'outside' }>}
 */
const bundles = new Map([
  ['study', { entry: 'server/commands/study.ts', packages: 'inside' }],
  ['bench', { entry: 'tests/bench/bench.ts', packages: 'inside' }],
  ['start', { entry: 'server/commands/start.ts', packages: 'outside' }],
  ['database', { entry: 'server/commands/database.ts', packages: 'outside' }],
]);

/**
 * What commands run in threads of their own, from the file that stands beside theirs.
 *
 * @type {ReadonlyMap<string, { name: string, entry: string, packages: 'inside' | 'outside' }[]>}
 */
const threads = new Map([
  ['start', [{ name: 'engine-worker', entry: 'server/jobs/worker/engine-worker.ts', packages: 'inside' }]],
]);

/** Commands that check the project. */
const checks = ['test', 'types', 'lint'];

/**
 * @param {string} name
 * @param {string} lockDigest
 * @param {string[]} rest
 */
async function runBundle(name, lockDigest, rest) {
  const bundle = bundles.get(name);
  if (bundle === undefined) throw new SetupFailure(`no bundle ${name}`);
  const { freshBundle } = await import('./bootstrap/bundle.mjs');
  for (const thread of threads.get(name) ?? []) {
    await freshBundle(root, thread.name, thread.entry, lockDigest, thread.packages);
  }
  const file = await freshBundle(root, name, bundle.entry, lockDigest, bundle.packages);
  process.argv = [process.execPath, file, ...rest];
  await import(pathToFileURL(file).href);
}

/**
 * @param {string} name
 * @param {string[]} rest
 */
async function runCheck(name, rest) {
  const { runLint, runTests, runTypes } = await import('./bootstrap/checks.mjs');
  if (name === 'test') return runTests(root, rest);
  const failures = name === 'types' ? await runTypes(root) : await runLint(root);
  return failures === 0 ? 0 : 1;
}

/** @param {string[]} argv */
async function main([name = '', ...rest]) {
  const { engines } = JSON.parse(readFileSync(join(root, 'package.json'), 'utf8'));
  requireNodeVersion(process.versions.node, engines.node);

  const known = [...bundles.keys(), ...checks];
  if (!known.includes(name)) {
    throw new SetupFailure(`unknown command "${name}"; known: ${known.join(', ')}`);
  }
  const lockDigest = await installPackages(root);
  if (checks.includes(name)) {
    process.exitCode = await runCheck(name, rest);
    return;
  }
  if (name === 'start') {
    const { freshPages } = await import('./bootstrap/pages.mjs');
    await freshPages(root, lockDigest);
  }
  await runBundle(name, lockDigest, rest);
}

try {
  await main(process.argv.slice(2));
} catch (failure) {
  if (!(failure instanceof SetupFailure)) throw failure;
  process.stderr.write(`tareline: ${failure.message}\n`);
  process.exitCode = SETUP_FAILED;
}
