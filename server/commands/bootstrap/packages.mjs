import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { withFolderLock } from './folder-lock.mjs';
import { SetupFailure } from './setup-failure.mjs';

/** Inside node_modules, so that whatever removes the packages removes the claim that they are complete. */
const STAMP = join('node_modules', '.tareline-lock-sha256');

/**
 * @param {string} root
 * @param {string} lockDigest
 */
function isInstalled(root, lockDigest) {
  try {
    return readFileSync(join(root, STAMP), 'utf8').trim() === lockDigest;
  } catch {
    return false;
  }
}

/** @param {string} root */
function runNpmCi(root) {
  // The npm that started this process, where there is one: it need not be the first on the path.
  const npm = process.env.npm_execpath;
  const options = ['ci', '--include=dev', '--no-audit', '--no-fund', '--loglevel=error'];
  const [command, args] =
    npm?.endsWith('npm-cli.js') === true ? [process.execPath, [npm, ...options]] : ['npm', options];
  // Standard output belongs to the command: what npm prints goes to standard error.
  const { status, error } = spawnSync(command, args, { cwd: root, stdio: ['ignore', 2, 2] });
  if (error !== undefined) throw new SetupFailure(`npm could not be started: ${error.message}`);
  if (status !== 0) throw new SetupFailure('npm ci failed; the packages are not installed');
}

/**
 * Installs the packages of package-lock.json unless exactly these are installed already. The lock file's
 * content decides, not its time: a checkout or a copy changes times at will.
 *
 * @param {string} root
 * @returns {Promise<string>} the digest of package-lock.json
 */
export async function installPackages(root) {
  const lockDigest = createHash('sha256')
    .update(readFileSync(join(root, 'package-lock.json')))
    .digest('hex');
  if (isInstalled(root, lockDigest)) return lockDigest;
  await withFolderLock(join(root, 'dist', 'locks', 'packages'), 'installing the packages', () => {
    if (isInstalled(root, lockDigest)) return;
    process.stderr.write('tareline: installing the packages (npm ci)\n');
    runNpmCi(root);
    writeFileSync(join(root, STAMP), `${lockDigest}\n`);
  });
  return lockDigest;
}
