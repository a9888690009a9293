import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, readdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import process from 'node:process';
import { SetupFailure } from '../bootstrap/setup-failure.mjs';

/** Where Debian puts the programs of each major version. */
const VERSIONS_FOLDER = '/usr/lib/postgresql';
const CLUSTER_SETTINGS = '/etc/postgresql-common/createcluster.d';

const BY_HAND =
  'install PostgreSQL 13 or newer (Debian, Ubuntu: apt-get install postgresql), ' +
  'or set DATABASE_URL to a server that is there';

/** The programs of one major version of PostgreSQL. */
export interface Programs {
  readonly major: number;
  readonly initdb: string;
  readonly control: string;
}

function programsOf(folder: string, major: number): Programs | undefined {
  const bin = join(folder, String(major), 'bin');
  const [initdb, control, server] = ['initdb', 'pg_ctl', 'postgres'].map((name) => join(bin, name));
  return [initdb, control, server].every((file) => existsSync(file)) ? { major, initdb, control } : undefined;
}

/**
 * The newest installed programs, or those of one major version: data can only be read by the version that wrote
 * them.
 */
export function findPrograms(major?: number, folder = VERSIONS_FOLDER): Programs | undefined {
  if (major !== undefined) return programsOf(folder, major);
  if (!existsSync(folder)) return undefined;
  return readdirSync(folder)
    .map(Number)
    .filter((version) => version >= 13)
    .sort((a, b) => b - a)
    .map((version) => programsOf(folder, version))
    .find((programs) => programs !== undefined);
}

/** Starts a program with its output on standard error, since standard output belongs to the command. */
export type RunInstaller = (program: string, args: readonly string[]) => { succeeded: boolean };

const runInstaller: RunInstaller = (program, args) => {
  const { status } = spawnSync(program, args, {
    stdio: ['ignore', 2, 2],
    env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
  });
  return { succeeded: status === 0 };
};

export interface InstallOptions {
  readonly isRoot: boolean;
  readonly run: RunInstaller;
  readonly settingsFolder: string;
}

/**
 * Installs PostgreSQL from the system's packages. These would start a server of their own at once, with data
 * outside of this checkout; a setting written beforehand keeps them from it.
 *
 * @throws SetupFailure that says what to install, where it is not permitted or fails
 */
export function installPrograms({ isRoot, run, settingsFolder }: InstallOptions): void {
  if (!isRoot || !run('apt-get', ['--version']).succeeded) {
    throw new SetupFailure(`PostgreSQL is not installed: ${BY_HAND}`);
  }
  mkdirSync(settingsFolder, { recursive: true });
  writeFileSync(join(settingsFolder, 'tareline.conf'), 'create_main_cluster = false\n');
  process.stderr.write('tareline: installing PostgreSQL (apt-get)\n');
  const installed =
    run('apt-get', ['update', '--quiet']).succeeded &&
    run('apt-get', ['install', '--yes', '--quiet', '--no-install-recommends', 'postgresql']).succeeded;
  if (!installed) throw new SetupFailure(`PostgreSQL could not be installed by apt-get: ${BY_HAND}`);
}

/**
 * The programs of PostgreSQL, installed where they are absent and the system permits it.
 *
 * @param major the version that wrote the data at hand, undefined where there are none
 * @throws SetupFailure that says what to install
 */
export function requirePrograms(major?: number): Programs {
  const found = findPrograms(major);
  if (found !== undefined) return found;
  if (major !== undefined) {
    throw new SetupFailure(
      `the database of this checkout was made by PostgreSQL ${major}, which is no longer installed: install it ` +
        `again (apt-get install postgresql-${major})`,
    );
  }
  installPrograms({
    isRoot: process.getuid?.() === 0,
    run: runInstaller,
    settingsFolder: CLUSTER_SETTINGS,
  });
  const installed = findPrograms();
  if (installed === undefined) throw new SetupFailure(`PostgreSQL is not installed: ${BY_HAND}`);
  return installed;
}
