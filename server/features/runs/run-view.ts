import type { ListedRun } from '../../../shared/contracts/api';
import type { RunRow } from './runs.repository';

/** A run as lists show it. */
export function listedRun({ queuedAt, startedAt, finishedAt, ...row }: RunRow): ListedRun {
  const isMeasured = startedAt !== null && finishedAt !== null;
  return {
    ...row,
    requestedAt: queuedAt.toISOString(),
    finishedAt: finishedAt?.toISOString() ?? null,
    milliseconds: isMeasured ? finishedAt.getTime() - startedAt.getTime() : null,
  };
}

/** JSON text of a run with its result, whose text goes out as it was stored, digit by digit. */
export function runText({ result, ...row }: RunRow & { result: string | null }): string {
  // A key without a value is left out of the text: a run has its result instead.
  const run = { ...listedRun(row), figures: undefined };
  return `${JSON.stringify(run).slice(0, -1)},"result":${result ?? 'null'}}`;
}
