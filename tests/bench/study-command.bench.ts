import { spawnSync } from 'node:child_process';
import process from 'node:process';
import { type Result, resultSchema } from '../../shared/contracts';
import { type Example, ROOT } from './examples';
import { median, timed } from './timing';

const RUNS = 9;

function runStudy(file: string): Result {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['server/commands/bootstrap.mjs', 'study', file],
    { cwd: ROOT, encoding: 'utf8' },
  );
  if (status !== 0) throw new Error(`the study command left with ${status}: ${stderr}`);
  return resultSchema.parse(JSON.parse(stdout));
}

/**
 * The study command as people call it, each run a process of its own: the time of the whole process, and of the
 * analysis in it, which is cold there.
 */
export function benchStudyCommand(print: (line: string) => void, examples: readonly Example[]): void {
  print(
    `study command, a new process each time (median of ${RUNS}): ms of the process, of the analysis in it`,
  );
  for (const { name, file, study } of examples) {
    // The first run may have to build the command.
    runStudy(file);
    const inside: number[] = [];
    const whole = Array.from({ length: RUNS }, () =>
      timed(() => inside.push(runStudy(file).work.milliseconds)),
    );
    const bands = study.parameters.filter(({ hasBand }) => hasBand).length;
    print(
      `  ${name.padEnd(30)} ${String(bands).padStart(2)} bands ${median(whole).toFixed(0).padStart(6)} ${median(inside).toFixed(0).padStart(6)}`,
    );
  }
}
