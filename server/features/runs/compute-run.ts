import { z } from 'zod';
import { StudyFaultError } from '../../../shared/contracts';
import { type Db, inTransaction } from '../../db';
import { type AnalysisAnswer, createThrottle, defineJob, type Engine, type JobContext } from '../../jobs';
import { addRunEvent, deleteProgressEvents } from './run-events';
import {
  type Attempt,
  beginOpenRun,
  insertMap,
  setDone,
  setFailed,
  setProgress,
  setQueuedAgain,
} from './runs.repository';

export const COMPUTE_RUN = 'compute-run';

/** A run that took its worker with it so often will do so again. */
const MOST_ATTEMPTS = 3;
const BROKEN_OFF = `The computation broke off ${MOST_ATTEMPTS} times without an answer.`;
const UNKNOWN_FAULT = 'Something went wrong on the server; the administrators find it in the log.';
/** A page needs no more to show that something moves. */
const PROGRESS_MS = 1_000;

export interface ComputeDependencies {
  readonly db: Db;
  readonly engine: Engine;
  /** In milliseconds. */
  readonly clock: () => number;
}

interface BegunRun extends Attempt {
  readonly scenarioId: string;
  readonly study: string;
}

/** A map's values as the database keeps them. */
function mapRowOf(runId: string, map: NonNullable<AnalysisAnswer['map']>) {
  return { runId, columns: map.x.length, rows: map.y.length, ...map };
}

function begin(db: Db, runId: string): Promise<BegunRun | undefined> {
  return inTransaction(db, async (tx) => {
    const begun = await beginOpenRun(tx, runId);
    if (begun === undefined) return undefined;
    const { scenarioId, attempt } = begun;
    if (attempt > MOST_ATTEMPTS) {
      await setFailed(tx, { runId, attempt }, BROKEN_OFF);
      await addRunEvent(tx, { runId, scenarioId, kind: 'failed', progress: 0 });
      return undefined;
    }
    await addRunEvent(tx, { runId, scenarioId, kind: 'started', progress: 0 });
    return { runId, ...begun };
  });
}

function finish(db: Db, run: BegunRun, answer: AnalysisAnswer): Promise<void> {
  const { runId, scenarioId } = run;
  return inTransaction(db, async (tx) => {
    if (!(await setDone(tx, run, answer))) return;
    if (answer.map !== undefined) await insertMap(tx, mapRowOf(runId, answer.map));
    await deleteProgressEvents(tx, runId);
    await addRunEvent(tx, { runId, scenarioId, kind: 'done', progress: 1 });
  });
}

function fail(db: Db, run: BegunRun, error: string): Promise<void> {
  const { runId, scenarioId } = run;
  return inTransaction(db, async (tx) => {
    if (!(await setFailed(tx, run, error))) return;
    await deleteProgressEvents(tx, runId);
    await addRunEvent(tx, { runId, scenarioId, kind: 'failed', progress: 0 });
  });
}

function putBack(db: Db, run: BegunRun): Promise<void> {
  const { runId, scenarioId } = run;
  return inTransaction(db, async (tx) => {
    if (!(await setQueuedAgain(tx, run))) return;
    await deleteProgressEvents(tx, runId);
    await addRunEvent(tx, { runId, scenarioId, kind: 'queued', progress: 0 });
  });
}

/** Writes down how far a run is, and notices when it no longer counts. */
function followProgress(
  { db, clock }: ComputeDependencies,
  run: BegunRun,
  { log }: JobContext,
  onOver: () => void,
): (share: number) => void {
  const isDue = createThrottle({ clock, everyMs: PROGRESS_MS });
  const { runId, scenarioId } = run;
  let underWay = false;
  let told = 0;

  const write = async (progress: number) => {
    if (!(await setProgress(db, run, progress))) {
      onOver();
      return;
    }
    // To what shows as per cent, nothing has moved.
    if (progress - told < 0.01 || !isDue()) return;
    told = progress;
    await addRunEvent(db, { runId, scenarioId, kind: 'progress', progress });
  };
  return (share) => {
    if (underWay) return;
    underWay = true;
    write(share)
      .catch((error: unknown) => log.warn({ error, runId }, 'progress could not be written'))
      .finally(() => {
        underWay = false;
      });
  };
}

async function compute(dependencies: ComputeDependencies, runId: string, context: JobContext): Promise<void> {
  const { db, engine } = dependencies;
  const run = await begin(db, runId);
  if (run === undefined) return;
  const over = new AbortController();
  let answer: AnalysisAnswer;
  try {
    answer = await engine.analyse(run.study, true, {
      signal: AbortSignal.any([context.signal, over.signal]),
      onProgress: followProgress(dependencies, run, context, () => over.abort()),
    });
  } catch (error) {
    if (over.signal.aborted) return;
    if (context.signal.aborted) {
      await putBack(db, run);
      throw error;
    }
    if (error instanceof StudyFaultError) await fail(db, run, error.message);
    else {
      context.log.error({ error, runId }, 'a run failed');
      await fail(db, run, UNKNOWN_FAULT);
    }
    return;
  }
  await finish(db, run, answer);
}

/** Computes runs of the queue. */
export function computeRunJob(dependencies: ComputeDependencies) {
  return defineJob({
    task: COMPUTE_RUN,
    payload: z.object({ runId: z.uuid() }),
    run: ({ runId }, context) => compute(dependencies, runId, context),
  });
}
