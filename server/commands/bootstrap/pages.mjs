import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { runAside } from './child-process.mjs';
import { withFolderLock } from './folder-lock.mjs';
import { isUnchanged, originOf, readOrigin, replaceFile } from './origin.mjs';
import { SetupFailure } from './setup-failure.mjs';

/** What the pages are made of, files and whole folders. */
const INGREDIENTS = ['angular.json', 'tsconfig.json', 'tsconfig.app.json', 'src', 'shared', 'fonts'];

/**
 * @param {string} root
 * @returns {string[]} the files, from the root, tests left out
 */
function sourcesOf(root) {
  return INGREDIENTS.filter((path) => existsSync(join(root, path))).flatMap((path) =>
    path.includes('.')
      ? [path]
      : readdirSync(join(root, path), { recursive: true, withFileTypes: true })
          .filter((entry) => entry.isFile() && !entry.name.endsWith('.spec.ts'))
          .map((entry) => join(entry.parentPath, entry.name).slice(root.length + 1)),
  );
}

/**
 * @param {string} root
 * @param {string} originFile
 * @param {string} lockDigest
 */
function isFresh(root, originFile, lockDigest) {
  const origin = readOrigin(originFile);
  const known = Object.keys(origin?.sources ?? {});
  return (
    existsSync(join(root, 'dist', 'web', 'index.html')) &&
    known.length === sourcesOf(root).length &&
    isUnchanged(root, origin, lockDigest)
  );
}

/**
 * Builds the pages unless those at hand are made from the same sources and packages.
 *
 * @param {string} root
 * @param {string} lockDigest digest of package-lock.json
 * @throws {SetupFailure} where they cannot be built
 */
export async function freshPages(root, lockDigest) {
  if (!existsSync(join(root, 'angular.json'))) {
    process.stderr.write(
      'tareline: there are no pages to build yet (no angular.json); serving the API alone\n',
    );
    return;
  }
  const originFile = join(root, 'dist', 'web.json');
  if (isFresh(root, originFile, lockDigest)) return;
  await withFolderLock(join(root, 'dist', 'locks', 'web'), 'building the pages', async () => {
    if (isFresh(root, originFile, lockDigest)) return;
    process.stderr.write('tareline: building the pages (ng build)\n');
    const started = Date.now();
    const status = await runAside(root, {
      label: 'pages',
      script: 'node_modules/@angular/cli/bin/ng.js',
      args: ['build'],
    });
    if (status !== 0) throw new SetupFailure('the pages could not be built');
    replaceFile(originFile, JSON.stringify(originOf(root, sourcesOf(root), lockDigest, started)));
  });
}
