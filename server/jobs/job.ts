import type { z } from 'zod';
import type { Log } from '../platform/log';

/** What a handler knows of the work it is given, beside the job's own payload. */
export interface JobContext {
  /** Aborted when the worker stops: the handler leaves as soon as it can, and the job is begun anew later. */
  readonly signal: AbortSignal;
  readonly log: Log;
}

/** One kind of work. A job may be begun more than once, where a worker died in between: handlers stand that. */
export interface JobHandler {
  /** Stable name of the kind of work; jobs in the database carry it. */
  readonly task: string;
  /** When it is done without being asked for, as crontab states it, in UTC. */
  readonly schedule: string | undefined;
  readonly run: (payload: unknown, context: JobContext) => Promise<void>;
}

/** Describes work that is done when it is asked for; see `enqueueJob`. */
export function defineJob<Payload extends z.ZodType>(definition: {
  readonly task: string;
  readonly payload: Payload;
  readonly run: (payload: z.output<Payload>, context: JobContext) => Promise<void>;
}): JobHandler {
  const { task, payload: schema, run } = definition;
  return {
    task,
    schedule: undefined,
    // A promise even for a payload of another version that no longer fits.
    run: async (payload, context) => run(schema.parse(payload), context),
  };
}

/** Describes work that comes round by itself. */
export function defineRoutine(definition: {
  readonly task: string;
  readonly schedule: string;
  readonly run: (context: JobContext) => Promise<void>;
}): JobHandler {
  const { task, schedule, run } = definition;
  return { task, schedule, run: (_payload, context) => run(context) };
}
