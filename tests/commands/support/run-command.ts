import { spawnSync } from 'node:child_process';
import process from 'node:process';
import { ROOT } from './example-studies';

/** A study that is not answered within this time hangs, ms. */
const HANGS = 40_000;

export interface Outcome {
  /** null where the process was stopped because it hung. */
  readonly status: number | null;
  readonly output: string;
  /** Standard error without notices of the bootstrap, which may have to wait for another test's build. */
  readonly messages: string;
}

/** The study command in a process of its own. */
export function runCommand(
  words: readonly string[],
  { input = '', startedIn }: { readonly input?: string; readonly startedIn?: string } = {},
): Outcome {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['server/commands/bootstrap.mjs', 'study', ...words],
    {
      cwd: ROOT,
      input,
      encoding: 'utf8',
      timeout: HANGS,
      maxBuffer: 64 * 1024 * 1024,
      env: { ...process.env, INIT_CWD: startedIn ?? ROOT },
    },
  );
  return { status, output: stdout, messages: stderr.replace(/^tareline: .*\n/gm, '') };
}
