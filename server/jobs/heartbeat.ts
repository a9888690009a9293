import { eq, sql } from 'drizzle-orm';
import { type Db, inTransaction } from '../db';
import { workerHeartbeats } from '../db/schema';
import type { Log } from '../platform/log';

const BEAT_MS = 1_000;
/** A worker that is silent for so long is dead. Wrongly taken for dead, its work is done twice, and kept once. */
const SILENCE_SECONDS = 5;

export interface Heartbeat {
  stop(): Promise<void>;
}

export interface HeartbeatOptions {
  readonly db: Db;
  /** The name under which the worker holds its jobs. */
  readonly workerId: string;
  readonly log: Log;
}

async function beat(db: Db, workerId: string): Promise<void> {
  await db
    .insert(workerHeartbeats)
    .values({ workerId })
    .onConflictDoUpdate({ target: workerHeartbeats.workerId, set: { beatAt: sql`now()` } });
}

/**
 * Takes the jobs of dead workers out of their hands, so that they are begun anew. The queue itself would hold them
 * for four hours.
 *
 * @returns the workers that are dead
 */
export function releaseJobsOfDead(db: Db): Promise<string[]> {
  return inTransaction(db, async (tx) => {
    // A worker that has just come up may hold a job before its first beat, but not for long.
    const { rows } = await tx.execute<{ locked_by: string }>(sql`
      select distinct locked_by from graphile_worker.jobs
      where locked_by is not null
        and locked_at < now() - make_interval(secs => ${SILENCE_SECONDS})
        and not exists (
          select from worker_heartbeats
          where worker_id = locked_by and beat_at > now() - make_interval(secs => ${SILENCE_SECONDS}))`);
    const dead = rows.map(({ locked_by }) => locked_by);
    if (dead.length > 0) {
      const ids = sql.join(
        dead.map((id) => sql`${id}`),
        sql`, `,
      );
      await tx.execute(sql`select graphile_worker.force_unlock_workers(array[${ids}]::text[])`);
      // Wakes the living: they look for new jobs only.
      await tx.execute(sql`select pg_notify('jobs:insert', json_build_object('count', 1)::text)`);
    }
    await tx.execute(sql`
      delete from worker_heartbeats where beat_at < now() - make_interval(secs => ${10 * SILENCE_SECONDS})`);
    return dead;
  });
}

/** Tells the others that this worker lives, and looks after them. */
export function startHeartbeat({ db, workerId, log }: HeartbeatOptions): Heartbeat {
  let stopped = false;
  let timer: NodeJS.Timeout | undefined;
  let underWay: Promise<void> = Promise.resolve();

  const round = async () => {
    try {
      await beat(db, workerId);
      const dead = await releaseJobsOfDead(db);
      if (dead.length > 0) log.warn({ dead }, 'workers have died; their jobs are begun anew');
    } catch (error) {
      log.warn({ error }, 'the heartbeat could not be written');
    }
    if (!stopped) timer = setTimeout(begin, BEAT_MS);
  };
  const begin = () => {
    underWay = round();
  };
  begin();
  return {
    stop: async () => {
      stopped = true;
      clearTimeout(timer);
      await underWay;
      await db
        .delete(workerHeartbeats)
        .where(eq(workerHeartbeats.workerId, workerId))
        // A heartbeat that is left behind stops by itself.
        .catch((error: unknown) => log.warn({ error }, 'the heartbeat could not be taken back'));
    },
  };
}
