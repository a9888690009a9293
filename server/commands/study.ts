// The study command: a study file in, its result out. Needs no database and no server.
//
//   study FILE [--map] [--pretty] [--require]        FILE may be - for standard input
//
// Exit status: 0 the analysis ran, 1 with --require and a verdict other than "holds", 2 the study is not usable.

import { createHash } from 'node:crypto';
import process from 'node:process';
import { performance } from 'node:perf_hooks';
import { canonicalText, readStudy, type Result, StudyFaultError, type Warning } from '../../shared/contracts';
import { analyse, composeStudy } from '../../shared/engine';
import { readArguments, UsageError } from './study/arguments';
import { readInput } from './study/input';

const UNUSABLE = 2;
const NOT_HOLDING = 1;

function say(line: string): void {
  process.stderr.write(`${line}\n`);
}

function warn({ path, message }: Warning): void {
  say(`warning: ${path}: ${message}`);
}

function run(text: string, map: boolean): Result {
  const { study, warnings } = readStudy(text);
  const composed = composeStudy(study);
  const digest = createHash('sha256').update(canonicalText(study)).digest('hex');
  const result = analyse(composed, { studyHash: `sha256:${digest}`, clock: () => performance.now(), map });
  const all = [...warnings, ...(result.warnings ?? [])];
  all.forEach(warn);
  return all.length === 0 ? result : { ...result, warnings: all };
}

try {
  const { file, map, pretty, require } = readArguments(process.argv.slice(2));
  const result = run(await readInput(file), map);
  process.stdout.write(`${JSON.stringify(result, null, pretty ? 2 : 0)}\n`);
  if (require && result.bands.verdict !== 'holds') process.exitCode = NOT_HOLDING;
} catch (error) {
  if (error instanceof StudyFaultError)
    for (const { path, message } of error.faults) say(`${path}: ${message}`);
  else if (error instanceof UsageError) say(error.message);
  else throw error;
  process.exitCode = UNUSABLE;
}
