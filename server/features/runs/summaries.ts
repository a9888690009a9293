import { desc, inArray, sql } from 'drizzle-orm';
import type { RunFigures, RunSummary } from '../../../shared/contracts/api';
import type { Executor } from '../../db';
import { runs } from '../../db/schema';

const NO_FIGURES: RunFigures = {
  ...{ unit: null, verdict: null, proof: null, approximated: false },
  ...{ ratedLow: null, ratedHigh: null, provedLow: null, provedHigh: null, failsAt: null, failsBelow: null },
  ...{ plate: null, limiting: null },
};

/** What is under way comes first, then what is done: a failed or cancelled repetition takes no answer away. */
const standing = sql`case ${runs.state} when 'queued' then 0 when 'running' then 0 when 'done' then 1 else 2 end`;

/**
 * The run that stands for each revision, as lists show it.
 *
 * @param revisionIds of scenario revisions
 * @returns by revision; nothing for one that was never run
 */
export async function summariesOf(
  db: Executor,
  revisionIds: readonly string[],
): Promise<Map<string, RunSummary>> {
  if (revisionIds.length === 0) return new Map();
  const { id, state, queuedAt, finishedAt, figures, scenarioRevisionId } = runs;
  const rows = await db
    .selectDistinctOn([scenarioRevisionId], { id, state, queuedAt, finishedAt, figures, scenarioRevisionId })
    .from(runs)
    .where(inArray(scenarioRevisionId, [...revisionIds]))
    .orderBy(scenarioRevisionId, standing, desc(queuedAt), desc(id));
  return new Map(
    rows.map((row) => [
      row.scenarioRevisionId,
      {
        id: row.id,
        state: row.state,
        at: (row.finishedAt ?? row.queuedAt).toISOString(),
        ...(row.figures ?? NO_FIGURES),
      },
    ]),
  );
}
