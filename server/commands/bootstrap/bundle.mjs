import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { withFolderLock } from './folder-lock.mjs';
import { isUnchanged, originOf, readOrigin, replaceFile } from './origin.mjs';
import { SetupFailure } from './setup-failure.mjs';

/** What the bundle depends on beside the sources that the bundler reports. */
const RECIPE = 'server/commands/bootstrap/bundle.mjs';

/**
 * Where the packages of a bundle are: `inside` starts in a third of the time, `outside` is for the server, whose
 * packages bring files and workers of their own.
 *
 * @typedef {'inside' | 'outside'} Packages
 */

/**
 * @param {string} root
 * @param {string} entry
 * @param {Packages} packages
 * @returns {Promise<{ code: Uint8Array, sources: string[] }>}
 */
async function build(root, entry, packages) {
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
      packages: packages === 'inside' ? 'bundle' : 'external',
      // The module form of a package can be stripped of what is not used; its CommonJS form cannot.
      mainFields: ['module', 'main'],
      minifySyntax: true,
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
 * Builds the bundle of a command unless the one at hand is made from the same sources and packages.
 *
 * @param {string} root
 * @param {string} name
 * @param {string} entry the command's entry point, from the root
 * @param {string} lockDigest digest of package-lock.json
 * @param {Packages} [packages]
 * @returns {Promise<string>} path of the bundle
 */
export async function freshBundle(root, name, entry, lockDigest, packages = 'inside') {
  const folder = join(root, 'dist', 'commands');
  const file = join(folder, `${name}.mjs`);
  const originFile = join(folder, `${name}.json`);
  const isFresh = () => isUnchanged(root, readOrigin(originFile), lockDigest);
  if (isFresh()) return file;
  await withFolderLock(join(root, 'dist', 'locks', name), `building ${entry}`, async () => {
    if (isFresh()) return;
    const started = Date.now();
    const { code, sources } = await build(root, entry, packages);
    mkdirSync(folder, { recursive: true });
    replaceFile(file, code);
    replaceFile(originFile, JSON.stringify(originOf(root, [RECIPE, ...sources], lockDigest, started)));
  });
  return file;
}
