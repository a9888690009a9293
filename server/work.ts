import { availableParallelism } from 'node:os';
import type { Database } from './db';
import { computeRunJob, forgetPreviewsJob } from './features/runs';
import { createEngine, startWorking, type Work } from './jobs';
import type { Log } from './platform/log';

export interface WorkDependencies {
  readonly database: Database;
  readonly log: Log;
  /** Most jobs at a time, each in a thread of its own; left out: all processors but one. */
  readonly threads?: number;
}

/** Works on the queue with what the features have to do: in the server's process, or in one of its own. */
export async function startWork({
  database,
  log,
  threads = Math.max(1, availableParallelism() - 1),
}: WorkDependencies): Promise<Work> {
  const { db } = database;
  const engine = createEngine({ threads, log });
  const handlers = [computeRunJob({ db, engine, clock: () => performance.now() }), forgetPreviewsJob({ db })];
  try {
    const work = await startWorking({ database, handlers, concurrency: threads, log });
    return {
      stop: async () => {
        await work.stop();
        await engine.close();
      },
    };
  } catch (error) {
    await engine.close();
    throw error;
  }
}
