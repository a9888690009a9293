import { and, eq } from 'drizzle-orm';
import type { Executor } from '../../db';
import { runEvents } from '../../db/schema';
import type { RunEvent } from '../../../shared/contracts/api';

/** An event as it is stored; its id and its run stand in columns of their own. */
export type RunEventKind = RunEvent['kind'];

/** Last in its transaction: it makes others that write events wait until that one ends. */
export async function addRunEvent(
  db: Executor,
  { runId, scenarioId, kind, progress }: Omit<RunEvent, 'id'>,
): Promise<void> {
  await db.insert(runEvents).values({ runId, kind, data: { scenarioId, progress } });
}

/** How far a run was at some moment is of no interest once it is over. */
export async function deleteProgressEvents(db: Executor, runId: string): Promise<void> {
  await db.delete(runEvents).where(and(eq(runEvents.runId, runId), eq(runEvents.kind, 'progress')));
}
