import { and, desc, eq, inArray, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { mapValues, people, runs, scenarioRevisions } from '../../db/schema';
import type { RunFigures } from '../../../shared/contracts/api';

const OPEN = ['queued', 'running'] as const;
const MOST_LISTED = 200;

/** A revision as a run needs it. */
export async function findRevision(db: Executor, scenarioId: string, number: number) {
  const { id, studyHash, answerHash } = scenarioRevisions;
  const [row] = await db
    .select({ id, studyHash, answerHash })
    .from(scenarioRevisions)
    .where(and(eq(scenarioRevisions.scenarioId, scenarioId), eq(scenarioRevisions.number, number)));
  return row;
}

const listed = {
  id: runs.id,
  scenarioId: scenarioRevisions.scenarioId,
  revision: scenarioRevisions.number,
  state: runs.state,
  progress: runs.progress,
  engine: runs.engineVersion,
  studyHash: runs.studyHash,
  requestedBy: people.name,
  queuedAt: runs.queuedAt,
  startedAt: runs.startedAt,
  finishedAt: runs.finishedAt,
  error: runs.error,
  figures: runs.figures,
};

function selectListed(db: Executor) {
  return db
    .select(listed)
    .from(runs)
    .innerJoin(scenarioRevisions, eq(scenarioRevisions.id, runs.scenarioRevisionId))
    .innerJoin(people, eq(people.id, runs.requestedBy))
    .$dynamic();
}

export type RunRow = Awaited<ReturnType<typeof selectListed>>[number];

export async function findRun(db: Executor, runId: string) {
  const [row] = await db
    .select({ ...listed, result: runs.result })
    .from(runs)
    .innerJoin(scenarioRevisions, eq(scenarioRevisions.id, runs.scenarioRevisionId))
    .innerJoin(people, eq(people.id, runs.requestedBy))
    .where(eq(runs.id, runId));
  return row;
}

/** Newest first. */
export function listRuns(db: Executor, scenarioId: string): Promise<RunRow[]> {
  return selectListed(db)
    .where(eq(scenarioRevisions.scenarioId, scenarioId))
    .orderBy(desc(runs.queuedAt), desc(runs.id))
    .limit(MOST_LISTED);
}

export async function insertRun(tx: Tx, values: typeof runs.$inferInsert): Promise<string> {
  const [{ id }] = await tx.insert(runs).values(values).returning({ id: runs.id });
  return id;
}

/** Marks a run as cancelled unless it is over. */
export async function cancelOpenRun(tx: Tx, runId: string): Promise<boolean> {
  const changed = await tx
    .update(runs)
    .set({ state: 'cancelled', cancelRequestedAt: sql`now()`, finishedAt: sql`now()` })
    .where(and(eq(runs.id, runId), inArray(runs.state, OPEN)))
    .returning({ id: runs.id });
  return changed.length > 0;
}

/**
 * Marks a run as begun by whoever calls.
 *
 * @returns undefined where it is over already
 */
export async function beginOpenRun(tx: Tx, runId: string) {
  const [begun] = await tx
    .update(runs)
    .set({
      state: 'running',
      attempts: sql`${runs.attempts} + 1`,
      startedAt: sql`coalesce(${runs.startedAt}, now())`,
      progress: 0,
    })
    .from(scenarioRevisions)
    .where(
      and(eq(runs.id, runId), eq(scenarioRevisions.id, runs.scenarioRevisionId), inArray(runs.state, OPEN)),
    )
    .returning({
      attempt: runs.attempts,
      scenarioId: scenarioRevisions.scenarioId,
      study: scenarioRevisions.study,
    });
  return begun;
}

/** One computation of a run; where the run was begun anew or is over, the older one changes nothing any longer. */
export interface Attempt {
  readonly runId: string;
  readonly attempt: number;
}

async function changeAttempt(
  db: Executor,
  { runId, attempt }: Attempt,
  changes: Parameters<ReturnType<Executor['update']>['set']>[0],
): Promise<boolean> {
  const changed = await db
    .update(runs)
    .set(changes)
    .where(and(eq(runs.id, runId), eq(runs.state, 'running'), eq(runs.attempts, attempt)))
    .returning({ id: runs.id });
  return changed.length > 0;
}

/** @returns whether the attempt still counts; so of all that follow */
export function setProgress(db: Executor, attempt: Attempt, progress: number): Promise<boolean> {
  return changeAttempt(db, attempt, { progress });
}

export function setDone(
  tx: Tx,
  attempt: Attempt,
  answer: { engineVersion: string; result: string; figures: RunFigures },
): Promise<boolean> {
  const { engineVersion, result, figures } = answer;
  return changeAttempt(tx, attempt, {
    ...{ state: 'done', progress: 1, engineVersion, result, figures },
    finishedAt: sql`now()`,
  });
}

export function setFailed(tx: Tx, attempt: Attempt, error: string): Promise<boolean> {
  return changeAttempt(tx, attempt, { state: 'failed', error, finishedAt: sql`now()` });
}

/** Broken off by a stop of the worker, which is no attempt of the run's. */
export function setQueuedAgain(tx: Tx, attempt: Attempt): Promise<boolean> {
  return changeAttempt(tx, attempt, { state: 'queued', progress: 0, attempts: attempt.attempt - 1 });
}

export async function insertMap(tx: Tx, map: typeof mapValues.$inferInsert): Promise<void> {
  await tx.insert(mapValues).values(map);
}

export async function findMap(db: Executor, runId: string) {
  const [row] = await db.select().from(mapValues).where(eq(mapValues.runId, runId));
  return row;
}
