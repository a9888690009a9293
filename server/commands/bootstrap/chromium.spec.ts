import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { findChromium, installChromium } from './chromium.mjs';

describe('findChromium', () => {
  it('takes the first place where there is one', () => {
    const folder = mkdtempSync(join(tmpdir(), 'tareline-chromium-'));
    try {
      const places = ['chromium', 'chromium-browser'].map((name) => join(folder, name));
      expect(findChromium(places)).toBeUndefined();
      writeFileSync(places[1], '');
      expect(findChromium(places)).toBe(places[1]);
      writeFileSync(places[0], '');
      expect(findChromium(places)).toBe(places[0]);
    } finally {
      rmSync(folder, { recursive: true });
    }
  });
});

describe('installChromium', () => {
  function installWith(isRoot: boolean, works: (command: string) => boolean): string[] {
    const commands: string[] = [];
    installChromium({
      isRoot,
      run: (program, args) => {
        commands.push(
          [program, ...args.filter((word) => !word.startsWith('--') || args.length === 1)].join(' '),
        );
        return { succeeded: works(commands[commands.length - 1]) };
      },
    });
    return commands;
  }

  it('takes it from the system’s packages', () => {
    expect(installWith(true, () => true)).toEqual([
      'apt-get --version',
      'apt-get update',
      'apt-get install chromium',
    ]);
  });

  it('says what to install where it is not permitted, there is no apt, or it fails', () => {
    const told = /Chromium .*apt-get install chromium/;
    expect(() => installWith(false, () => true)).toThrow(told);
    expect(() => installWith(true, () => false)).toThrow(told);
    expect(() => installWith(true, (command) => command !== 'apt-get install chromium')).toThrow(told);
    expect(() => installWith(true, (command) => command !== 'apt-get update')).toThrow(told);
  });
});
