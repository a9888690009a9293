import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { findPrograms, installPrograms } from './programs';

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'tareline-programs-'));
});
afterEach(() => rmSync(folder, { recursive: true }));

function install(version: string, programs = ['initdb', 'pg_ctl', 'postgres']): void {
  const bin = join(folder, version, 'bin');
  mkdirSync(bin, { recursive: true });
  for (const program of programs) writeFileSync(join(bin, program), '');
}

describe('findPrograms', () => {
  it('prefers the newest version, by number', () => {
    for (const version of ['9.6', '13', '15', '100']) install(version);
    expect(findPrograms(undefined, folder)?.major).toBe(100);
  });

  it('passes over versions without a server, and those that are too old', () => {
    install('12');
    install('14');
    install('16', ['initdb']);
    expect(findPrograms(undefined, folder)?.major).toBe(14);
  });

  it('finds the version that made the data, or none', () => {
    install('13');
    install('15');
    expect(findPrograms(13, folder)?.control).toBe(join(folder, '13', 'bin', 'pg_ctl'));
    expect(findPrograms(14, folder)).toBeUndefined();
  });

  it('finds none where nothing is installed', () => {
    expect(findPrograms(undefined, join(folder, 'absent'))).toBeUndefined();
  });
});

describe('installPrograms', () => {
  const settingsFolder = () => join(folder, 'createcluster.d');

  function installWith(isRoot: boolean, works: (command: string) => boolean): string[] {
    const commands: string[] = [];
    installPrograms({
      isRoot,
      settingsFolder: settingsFolder(),
      run: (program, args) => {
        const command = [program, args[0]].join(' ');
        commands.push(command);
        if (args[0] === 'install') {
          const setting = readFileSync(join(settingsFolder(), 'tareline.conf'), 'utf8');
          expect(setting).toBe('create_main_cluster = false\n');
        }
        return { succeeded: works(command) };
      },
    });
    return commands;
  }

  it('keeps the packages from starting a server of their own', () => {
    expect(installWith(true, () => true)).toEqual(['apt-get --version', 'apt-get update', 'apt-get install']);
  });

  it('says what to install where it is not permitted, and touches nothing', () => {
    expect(() => installWith(false, () => true)).toThrow(/apt-get install postgresql.*DATABASE_URL/);
    expect(existsSync(settingsFolder())).toBe(false);
  });

  it('says what to install where there is no apt, or it fails', () => {
    expect(() => installWith(true, () => false)).toThrow(/is not installed: install PostgreSQL/);
    expect(() => installWith(true, (command) => command !== 'apt-get install')).toThrow(
      /could not be installed/,
    );
  });
});
