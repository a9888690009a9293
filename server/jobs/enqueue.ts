import { sql } from 'drizzle-orm';
import type { Executor } from '../db';

export interface JobOrder {
  /** The handler's task. */
  readonly task: string;
  /** Of JSON. */
  readonly payload: unknown;
  /** Jobs of one queue are done one after the other; left out: as workers are free. */
  readonly queue?: string | undefined;
  /** Before others that wait, such as one that was begun already. */
  readonly first?: boolean;
}

/** Orders a job, in the transaction that makes it necessary: it is seen by workers when that one ends. */
export async function enqueueJob(tx: Executor, { task, payload, queue, first }: JobOrder): Promise<void> {
  await tx.execute(sql`
    select graphile_worker.add_job(
      identifier => ${task}::text,
      payload => ${JSON.stringify(payload)}::json,
      queue_name => ${queue ?? null}::text,
      priority => ${first === true ? -1 : 0}::int)`);
}
