import { EventEmitter } from 'node:events';
import {
  type JobHelpers,
  parseCronItems,
  run,
  type Runner,
  type TaskList,
  type WorkerPool,
} from 'graphile-worker';
import type { Database } from '../db';
import type { Log } from '../platform/log';
import { enqueueJob } from './enqueue';
import { type Heartbeat, startHeartbeat } from './heartbeat';
import type { JobHandler } from './job';
import { queueLog } from './queue-log';

export interface WorkOptions {
  readonly database: Database;
  readonly handlers: readonly JobHandler[];
  /** Most jobs at a time. */
  readonly concurrency: number;
  readonly log: Log;
}

/** A worker on the queue, in this process. */
export interface Work {
  /** Breaks off what is under way; it is begun anew by whoever works next. */
  stop(): Promise<void>;
}

/** New jobs are announced; this is how often the worker looks for those whose time has come. */
const LOOK_MS = 2_000;
/** Pause before a worker that broke is begun again. */
const RESTART_MS = 2_000;

/**
 * Works on the queue until it is stopped. Several may do so at once, in this process or in others.
 *
 * @throws Error where the database cannot be reached
 */
export async function startWorking({ database, handlers, concurrency, log }: WorkOptions): Promise<Work> {
  const { db, pool } = database;
  const stopping = new AbortController();

  const perform = async (handler: JobHandler, payload: unknown, helpers: JobHelpers): Promise<void> => {
    const { job } = helpers;
    const jobLog = log.child({ job: job.id, task: handler.task });
    try {
      await handler.run(payload, { signal: stopping.signal, log: jobLog });
    } catch (error) {
      if (!stopping.signal.aborted) {
        jobLog.error({ error }, 'a job failed');
        throw error;
      }
      // It did not fail, it was broken off: a new order costs neither an attempt nor a pause.
      const queue = (await helpers.getQueueName()) ?? undefined;
      await enqueueJob(db, { task: handler.task, payload, queue, first: true });
    }
  };

  const taskList: TaskList = Object.fromEntries(
    handlers.map((handler) => [
      handler.task,
      (payload: unknown, helpers: JobHelpers) => perform(handler, payload, helpers),
    ]),
  );
  const parsedCronItems = parseCronItems(
    handlers.flatMap(({ task, schedule }) => (schedule === undefined ? [] : [{ task, match: schedule }])),
  );

  const begin = async (): Promise<{ runner: Runner; heartbeat: Heartbeat }> => {
    const events = new EventEmitter();
    const created = new Promise<string>((resolve) => {
      events.once('pool:create', ({ workerPool }: { workerPool: WorkerPool }) => resolve(workerPool.id));
    });
    const runner = await run({
      pgPool: pool,
      ...{ taskList, parsedCronItems, concurrency, events },
      pollInterval: LOOK_MS,
      noHandleSignals: true,
      logger: queueLog(log),
      // What is done is written down before a stop is over: batches are waited for, single statements are not.
      preset: { worker: { completeJobBatchDelay: 0, failJobBatchDelay: 0 } },
    });
    return { runner, heartbeat: startHeartbeat({ db, workerId: await created, log }) };
  };

  let restart: NodeJS.Timeout | undefined;
  let current = await begin();
  /** The queue gives up for good where the database stays away for long; the server does not. */
  const watchOver = ({ runner, heartbeat }: typeof current): void => {
    const beginAgain = async () => {
      await heartbeat.stop();
      current = await begin();
      watchOver(current);
    };
    const later = (error: unknown) => {
      if (stopping.signal.aborted) return;
      log.error({ error }, 'the worker on the queue broke; it is begun again');
      restart = setTimeout(() => void beginAgain().catch(later), RESTART_MS);
    };
    runner.promise.then(() => later(undefined), later);
  };
  watchOver(current);

  return {
    stop: async () => {
      stopping.abort();
      clearTimeout(restart);
      const { runner, heartbeat } = current;
      await runner.stop().catch((error: unknown) => log.warn({ error }, 'the worker on the queue had ended'));
      await heartbeat.stop();
    },
  };
}
