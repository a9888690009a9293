import { and, asc, gt, type SQL, sql } from 'drizzle-orm';
import type { StreamEvent } from '../platform/routing';
import type { Db } from './client';
import type { Listener } from './listener';
import { runEvents } from './schema';

export interface FollowOptions {
  /** The last event that was seen; only later ones follow. Undefined: only those from now on. */
  readonly after: number | undefined;
  /** Which events to follow, on `runEvents`; every event where left out. */
  readonly where?: SQL;
  readonly signal: AbortSignal;
}

/** Events of runs, as they are written, from the database: what another process writes is seen as well. */
export interface EventFeed {
  follow(options: FollowOptions): AsyncGenerator<StreamEvent>;
}

const BATCH = 200;

/** Waits for either; leaves nothing on the signal, which may live for days. */
function wokenOrAborted(woken: Promise<void>, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const done = () => {
      signal.removeEventListener('abort', done);
      resolve();
    };
    signal.addEventListener('abort', done);
    void woken.then(done);
  });
}

/** @param listener on the channel `run_events` */
export function createEventFeed(db: Db, listener: Listener): EventFeed {
  const latest = async () => {
    const [row] = await db
      .select({ id: sql<number>`coalesce(max(${runEvents.id}), 0)::int8` })
      .from(runEvents);
    return Number(row.id);
  };
  return {
    follow: async function* ({ after, where, signal }) {
      let last = after ?? (await latest());
      while (!signal.aborted) {
        const woken = listener.next();
        const events = await db
          .select()
          .from(runEvents)
          .where(and(gt(runEvents.id, last), where))
          .orderBy(asc(runEvents.id))
          .limit(BATCH);
        for (const { id, kind, runId, data, createdAt } of events) {
          last = id;
          yield { id, kind, data: { runId, at: createdAt.toISOString(), ...data } };
        }
        if (events.length < BATCH && !signal.aborted) await wokenOrAborted(woken, signal);
      }
    },
  };
}
