import { mkdirSync, mkdtempSync, readFileSync, rmSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { freshPages } from './pages.mjs';

const yesterday = new Date(Date.now() - 86_400_000);

describe('freshPages', () => {
  let root: string;
  beforeEach(() => {
    root = mkdtempSync(join(tmpdir(), 'tareline-pages-'));
    write('angular.json', '{}');
    write('src/main.ts', 'export {};');
    // A builder that counts its runs.
    write(
      'node_modules/@angular/cli/bin/ng.js',
      `const { appendFileSync, mkdirSync } = require('node:fs');
       mkdirSync('dist/web', { recursive: true });
       appendFileSync('dist/web/index.html', process.argv[2] + ' ');`,
    );
  });
  afterEach(() => rmSync(root, { recursive: true }));

  /** Writes a source that was last changed well before any build. */
  function write(file: string, text: string): void {
    mkdirSync(join(root, file, '..'), { recursive: true });
    writeFileSync(join(root, file), text);
    utimesSync(join(root, file), yesterday, yesterday);
  }
  const built = async (lockDigest = 'a') => {
    await freshPages(root, lockDigest);
    return readFileSync(join(root, 'dist', 'web', 'index.html'), 'utf8');
  };

  it('builds once for the same sources', async () => {
    expect(await built()).toBe('build ');
    expect(await built()).toBe('build ');
  });

  it.each([
    ['a source was changed', () => write('src/main.ts', 'export const changed = 1;')],
    ['a source was added', () => write('src/app/more.ts', 'export {};')],
    ['a source was removed', () => rmSync(join(root, 'src', 'main.ts'))],
    ['shared code was added', () => write('shared/units/mass.ts', 'export {};')],
  ])('builds again where %s', async (_what, change) => {
    await built();
    change();
    expect(await built()).toBe('build build ');
  });

  it('builds again after other packages were installed', async () => {
    await built('a');
    expect(await built('b')).toBe('build build ');
  });

  it('does not for a test beside the sources', async () => {
    await built();
    write('src/main.spec.ts', 'export {};');
    expect(await built()).toBe('build ');
  });

  it('fails where the builder does, and tries again', async () => {
    write('node_modules/@angular/cli/bin/ng.js', 'process.exit(1);');
    await expect(freshPages(root, 'a')).rejects.toThrow('the pages could not be built');
    await expect(freshPages(root, 'a')).rejects.toThrow('the pages could not be built');
  });
});
