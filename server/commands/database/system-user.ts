import { execFileSync, spawn, spawnSync } from 'node:child_process';
import process from 'node:process';
import { SetupFailure } from '../bootstrap/setup-failure.mjs';

/** The user that the database server runs as. */
export interface SystemUser {
  readonly uid: number;
  readonly gid: number;
}

function idOf(flag: '-u' | '-g'): number {
  return Number(
    execFileSync('id', [flag, 'postgres'], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'ignore'] }),
  );
}

/**
 * The server refuses to run as root: there the user `postgres`, which its packages make.
 *
 * @returns undefined where the server runs as the present user
 * @throws SetupFailure as root without a user `postgres`
 */
export function serverUser(): SystemUser | undefined {
  if (process.getuid?.() !== 0) return undefined;
  try {
    return { uid: idOf('-u'), gid: idOf('-g') };
  } catch {
    throw new SetupFailure(
      'PostgreSQL does not run as root, and there is no user "postgres": add one (adduser --system --group postgres)',
    );
  }
}

/** Only what the programs need: settings of other servers (PGPORT, PGDATA...) must not reach ours. */
const ENVIRONMENT = { PATH: '/usr/bin:/bin', LC_ALL: 'C.UTF-8' };

export interface Outcome {
  readonly status: number | null;
  readonly output: string;
}

/** Runs a program as the given user, in a folder that every user can be in. */
export function runAs(
  user: SystemUser | undefined,
  program: string,
  args: readonly string[],
): Promise<Outcome> {
  return new Promise((resolve, reject) => {
    // Apart from this process's terminal group: Ctrl-C is for the command, which then stops what it started.
    const child = spawn(program, args, {
      ...user,
      cwd: '/',
      env: ENVIRONMENT,
      detached: true,
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let output = '';
    const add = (chunk: Buffer) => {
      output += chunk.toString();
    };
    child.stdout.on('data', add);
    child.stderr.on('data', add);
    child.on('error', reject);
    child.on('close', (status) => resolve({ status, output }));
  });
}

/** Whether a user can enter a folder, and every folder above it. */
export function canEnter(user: SystemUser | undefined, folder: string): boolean {
  return spawnSync('test', ['-x', folder], { ...user, cwd: '/', env: ENVIRONMENT }).status === 0;
}
