import { mkdirSync, readFileSync, renameSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { withFolderLock } from './folder-lock.mjs';
import { SetupFailure } from './setup-failure.mjs';

/**
 * What a bundle was made from: the packages, and of each source its size and time of change. Equality with
 * what is found decides, not "newer than": a file brought back from an older revision is a change too.
 *
 * @typedef {{ lockDigest: string, sources: Record<string, string> }} Origin
 */

/** What the bundle depends on beside the sources that the bundler reports. */
const RECIPE = 'server/commands/bootstrap/bundle.mjs';

/**
 * @param {string} root
 * @param {string} source
 */
function stateOf(root, source) {
  const stat = statSync(join(root, source), { throwIfNoEntry: false });
  return stat === undefined ? 'missing' : `${stat.size} ${stat.mtimeMs}`;
}

/**
 * @param {string} root
 * @param {string} originFile
 * @param {string} lockDigest
 */
function isFresh(root, originFile, lockDigest) {
  /** @type {Origin} */
  let origin;
  try {
    origin = JSON.parse(readFileSync(originFile, 'utf8'));
  } catch {
    return false;
  }
  if (origin.lockDigest !== lockDigest) return false;
  return Object.entries(origin.sources).every(([source, state]) => state === stateOf(root, source));
}

/**
 * @param {string} file
 * @param {string | Uint8Array} content
 */
function replaceFile(file, content) {
  const prepared = `${file}.${process.pid}`;
  writeFileSync(prepared, content);
  renameSync(prepared, file);
}

/**
 * @param {string} root
 * @param {string} entry
 * @returns {Promise<{ code: Uint8Array, sources: string[] }>}
 */
async function build(root, entry) {
  const { build: esbuild, formatMessages } = await import('esbuild');
  try {
    const { outputFiles, metafile } = await esbuild({
      absWorkingDir: root,
      entryPoints: [entry],
      bundle: true,
      write: false,
      metafile: true,
      platform: 'node',
      format: 'esm',
      target: 'node20',
      // The module form of a package can be stripped of what is not used; its CommonJS form cannot.
      mainFields: ['module', 'main'],
      minifySyntax: true,
      minifyWhitespace: true,
      legalComments: 'none',
      logLevel: 'silent',
    });
    const sources = Object.keys(metafile.inputs).filter((source) => !source.startsWith('node_modules/'));
    return { code: outputFiles[0].contents, sources };
  } catch (failure) {
    if (!(failure instanceof Error) || !('errors' in failure) || !Array.isArray(failure.errors))
      throw failure;
    const messages = await formatMessages(failure.errors, { kind: 'error' });
    throw new SetupFailure(`${entry} could not be built\n${messages.join('')}`);
  }
}

/**
 * Builds the bundle of a command, its packages included, unless the one at hand is made from the same sources
 * and packages.
 *
 * @param {string} root
 * @param {string} name
 * @param {string} entry the command's entry point, from the root
 * @param {string} lockDigest digest of package-lock.json
 * @returns {Promise<string>} path of the bundle
 */
export async function freshBundle(root, name, entry, lockDigest) {
  const folder = join(root, 'dist', 'commands');
  const file = join(folder, `${name}.mjs`);
  const originFile = join(folder, `${name}.json`);
  if (isFresh(root, originFile, lockDigest)) return file;
  await withFolderLock(join(root, 'dist', 'locks', name), `building ${entry}`, async () => {
    if (isFresh(root, originFile, lockDigest)) return;
    const started = Date.now();
    const { code, sources } = await build(root, entry);
    /** @type {Origin} */
    const origin = { lockDigest, sources: {} };
    for (const source of [RECIPE, ...sources]) {
      // What was changed while it was being read must be read again.
      const changed =
        (statSync(join(root, source), { throwIfNoEntry: false })?.mtimeMs ?? Infinity) >= started;
      origin.sources[source] = changed ? 'changed while building' : stateOf(root, source);
    }
    mkdirSync(folder, { recursive: true });
    replaceFile(file, code);
    replaceFile(originFile, JSON.stringify(origin));
  });
  return file;
}
