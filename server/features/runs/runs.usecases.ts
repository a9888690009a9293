import { type Db, inTransaction, recordInAudit, type Tx } from '../../db';
import { enqueueJob } from '../../jobs';
import { COMPUTE_RUN } from './compute-run';
import { addRunEvent, deleteProgressEvents } from './run-events';
import { noRevision, noRun, runIsOver } from './runs.errors';
import { cancelOpenRun, findRevision, findRun, insertRun } from './runs.repository';

/** Who does it, for the audit. */
export interface Act {
  readonly personId: string;
  readonly requestId?: string;
}

export interface RunRequest extends Act {
  readonly scenarioId: string;
  /** Number of the revision. */
  readonly revision: number;
  /** The engine that will most likely compute it; the one that has done it is written down in the end. */
  readonly engineVersion: string;
}

/**
 * Puts a run of a saved revision into the queue, where one person's runs wait for one another.
 *
 * @returns its id
 * @throws Problem not-found
 */
export async function requestRun(
  tx: Tx,
  { scenarioId, revision, engineVersion, personId, requestId }: RunRequest,
): Promise<string> {
  const found = await findRevision(tx, scenarioId, revision);
  if (found === undefined) throw noRevision();
  const { id: scenarioRevisionId, studyHash, answerHash } = found;
  const runId = await insertRun(tx, {
    ...{ scenarioRevisionId, studyHash, answerHash, engineVersion },
    requestedBy: personId,
  });
  await enqueueJob(tx, { task: COMPUTE_RUN, payload: { runId }, queue: `runs of ${personId}` });
  await recordInAudit(tx, {
    ...{ personId, requestId },
    ...{ action: 'run.start', objectKind: 'run', objectId: runId, data: { scenarioId, revision } },
  });
  await addRunEvent(tx, { runId, scenarioId, kind: 'queued', progress: 0 });
  return runId;
}

/**
 * Cancels a run that waits or computes; whoever computes it notices and stops.
 *
 * @throws Problem run-over, not-found
 */
export function cancelRun(db: Db, runId: string, { personId, requestId }: Act): Promise<void> {
  return inTransaction(db, async (tx) => {
    const isCancelled = await cancelOpenRun(tx, runId);
    const run = await findRun(tx, runId);
    if (run === undefined) throw noRun();
    if (!isCancelled) throw runIsOver(run.state);
    const { scenarioId, progress } = run;
    await recordInAudit(tx, {
      ...{ personId, requestId },
      ...{ action: 'run.cancel', objectKind: 'run', objectId: runId, data: { scenarioId } },
    });
    await deleteProgressEvents(tx, runId);
    await addRunEvent(tx, { runId, scenarioId, kind: 'cancelled', progress });
  });
}
