// Entry of `npm run bench`. Prints tables to standard output; the ratios in a table come from one run, each pair of
// times taken back to back.

import process from 'node:process';
import { benchContactSearch } from './contact-search.bench';
import { benchEigenvalues } from './eigenvalues.bench';
import { loadExamples } from './examples';
import { benchGuard } from './guard.bench';
import { benchStudyCommand } from './study-command.bench';

function print(line: string): void {
  process.stdout.write(`${line}\n`);
}

const examples = loadExamples();
// First, while this process is cold.
benchContactSearch(print, examples);
print('');
benchGuard(print, examples);
print('');
benchEigenvalues(print);
print('');
benchStudyCommand(print, examples);
