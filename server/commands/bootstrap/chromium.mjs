import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import process from 'node:process';
import { SetupFailure } from './setup-failure.mjs';

/** Where Debian's packages put the browser. */
const PLACES = ['/usr/bin/chromium', '/usr/bin/chromium-browser'];

const BY_HAND = 'install it for the browser tests (Debian: apt-get install chromium)';

/**
 * Starts a program with its output on standard error, since standard output belongs to the command.
 *
 * @typedef {(program: string, args: readonly string[]) => { succeeded: boolean }} RunInstaller
 */

/** @type {RunInstaller} */
function runInstaller(program, args) {
  const { status } = spawnSync(program, args, {
    stdio: ['ignore', 2, 2],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  });
  return { succeeded: status === 0 };
}

/**
 * @param {readonly string[]} places
 * @returns {string | undefined} the browser's program
 */
export function findChromium(places = PLACES) {
  return places.find((place) => existsSync(place));
}

/**
 * Installs Chromium from the system's packages.
 *
 * @param {{ isRoot: boolean, run: RunInstaller }} options
 * @throws {SetupFailure} that says what to install, where it is not permitted or fails
 */
export function installChromium({ isRoot, run }) {
  if (!isRoot || !run('apt-get', ['--version']).succeeded) {
    throw new SetupFailure(`Chromium is not installed: ${BY_HAND}`);
  }
  process.stderr.write('tareline: installing Chromium (apt-get)\n');
  const installed =
    run('apt-get', ['update', '--quiet']).succeeded &&
    run('apt-get', ['install', '--yes', '--quiet', '--no-install-recommends', 'chromium']).succeeded;
  if (!installed) throw new SetupFailure(`Chromium could not be installed by apt-get: ${BY_HAND}`);
}

/**
 * The browser that the tests drive, installed where it is absent and the system permits it.
 *
 * @returns {string} its program
 * @throws {SetupFailure} that says what to install
 */
export function requireChromium() {
  const found = findChromium();
  if (found !== undefined) return found;
  installChromium({ isRoot: process.getuid?.() === 0, run: runInstaller });
  const installed = findChromium();
  if (installed === undefined) throw new SetupFailure(`Chromium is not installed: ${BY_HAND}`);
  return installed;
}
