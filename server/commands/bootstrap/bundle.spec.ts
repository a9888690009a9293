import { mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, utimesSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { freshBundle } from './bundle.mjs';

const yesterday = new Date(Date.now() - 86_400_000);

describe('freshBundle', () => {
  let root: string;
  beforeEach(() => {
    root = mkdtempSync(join(tmpdir(), 'tareline-bundle-'));
    write('server/commands/bootstrap/bundle.mjs', 'export {};');
    write('shared/weight.ts', 'export const weight: number = 41;');
    write('server/commands/study.ts', "import { weight } from '../../shared/weight';\nconsole.log(weight);");
  });
  afterEach(() => rmSync(root, { recursive: true }));

  /** Writes a source that was last changed well before any build. */
  function write(file: string, text: string, changed = yesterday): void {
    mkdirSync(join(root, file, '..'), { recursive: true });
    writeFileSync(join(root, file), text);
    utimesSync(join(root, file), changed, changed);
  }
  const bundle = (lockDigest = 'a') => freshBundle(root, 'study', 'server/commands/study.ts', lockDigest);
  const code = async () => readFileSync(await bundle(), 'utf8');

  it('puts the imported sources into one file', async () => {
    expect(await code()).toMatch(/41/);
  });

  it('leaves a bundle alone whose sources are unchanged', async () => {
    const before = statSync(await bundle()).ino;
    expect(statSync(await bundle()).ino).toBe(before);
  });

  it('builds again where a source was changed, also to one of an older date', async () => {
    await bundle();
    write('shared/weight.ts', 'export const weight: number = 42;', new Date(yesterday.getTime() - 1000));
    expect(await code()).toMatch(/42/);
  });

  it('builds again after other packages were installed', async () => {
    const before = statSync(await bundle('a')).ino;
    expect(statSync(await bundle('b')).ino).not.toBe(before);
  });

  it('does not trust a bundle whose source changed while it was built', async () => {
    write('shared/weight.ts', 'export const weight: number = 41;', new Date(Date.now() + 60_000));
    const before = statSync(await bundle()).ino;
    expect(statSync(await bundle()).ino).not.toBe(before);
  });

  it('tells what cannot be built and keeps no claim of freshness', async () => {
    write('server/commands/study.ts', "import { weight } from '../../shared/missing';\nconsole.log(weight);");
    await expect(bundle()).rejects.toThrow(/study\.ts could not be built[\s\S]*shared\/missing/);
    await expect(bundle()).rejects.toThrow(/could not be built/);
  });
});
