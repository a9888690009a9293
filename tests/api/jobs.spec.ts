import { sql } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { connectDatabase, type Database } from '../../server/db';
import { workerHeartbeats } from '../../server/db/schema';
import { defineJob, enqueueJob, type JobContext, startWorking, type Work } from '../../server/jobs';
import { type MemoryLog, memoryLog } from './support/memory-log';
import { createTestDatabase, type TestDatabase } from './support/test-database';

/** Something that a test waits for. */
function newSignal<T = void>() {
  let resolve: (value: T) => void = () => {};
  const promise = new Promise<T>((settle) => {
    resolve = settle;
  });
  return { promise, resolve };
}

function untilAborted({ signal }: JobContext): Promise<never> {
  return new Promise((_resolve, reject) => {
    signal.addEventListener('abort', () => reject(new Error('broken off')));
  });
}

describe('the queue', () => {
  let testDatabase: TestDatabase;
  let database: Database;
  let memory: MemoryLog;
  const workers: Work[] = [];

  beforeEach(async () => {
    testDatabase = await createTestDatabase();
    memory = memoryLog();
    database = connectDatabase({ url: testDatabase.url, log: memory.log });
  });
  afterEach(async () => {
    for (const work of workers.splice(0)) await work.stop();
    await database.close();
    await testDatabase.drop();
  });

  type Run = (number: number, context: JobContext) => Promise<void>;
  const work = async (run: Run, concurrency = 4): Promise<Work> => {
    const handler = defineJob({
      task: 'count',
      payload: z.object({ number: z.int() }),
      run: ({ number }, context) => run(number, context),
    });
    const started = await startWorking({ database, handlers: [handler], concurrency, log: memory.log });
    workers.push(started);
    return started;
  };
  const order = (number: number, queue?: string) =>
    enqueueJob(database.db, { task: 'count', payload: { number }, queue });
  const waiting = async () => {
    const { rows } = await database.db.execute<{ number: number; attempts: number; held: boolean }>(sql`
      select (payload->>'number')::int as number, attempts, locked_by is not null as held
      from graphile_worker._private_jobs order by id`);
    return rows;
  };
  const heartbeats = () => database.db.select().from(workerHeartbeats);

  it('hands over what is ordered, once the transaction that ordered it has ended', async () => {
    const done: number[] = [];
    const last = newSignal();
    await work((number) => {
      done.push(number);
      if (number === 3) last.resolve();
      return Promise.resolve();
    });
    const refused = database.db.transaction(async (tx) => {
      await enqueueJob(tx, { task: 'count', payload: { number: 1 } });
      throw new Error('changed my mind');
    });
    await expect(refused).rejects.toThrow('changed my mind');
    await database.db.transaction(async (tx) => {
      await enqueueJob(tx, { task: 'count', payload: { number: 2 }, queue: 'one' });
      await enqueueJob(tx, { task: 'count', payload: { number: 3 }, queue: 'one' });
    });
    await last.promise;
    expect(done).toEqual([2, 3]);
    await expect.poll(waiting).toEqual([]);
  });

  it('does the jobs of one queue one after the other, and those of others beside them', async () => {
    const steps: string[] = [];
    const gate = newSignal();
    const other = newSignal();
    const last = newSignal();
    await work(async (number) => {
      steps.push(`begin ${number}`);
      if (number === 1) await gate.promise;
      if (number === 9) other.resolve();
      steps.push(`end ${number}`);
      if (number === 2) last.resolve();
    });
    await order(1, 'anna');
    await order(2, 'anna');
    await order(9, 'bert');
    await other.promise;
    expect(steps).not.toContain('begin 2');
    gate.resolve();
    await last.promise;
    const own = steps.filter((step) => !step.endsWith('9'));
    expect(own).toEqual(['begin 1', 'end 1', 'begin 2', 'end 2']);
  });

  it('puts what a stop breaks off back in front, and it costs no attempt', async () => {
    const begun = newSignal();
    const first = await work((_number, context) => {
      begun.resolve();
      return untilAborted(context);
    }, 1);
    await order(1, 'anna');
    await order(2, 'anna');
    await begun.promise;
    await first.stop();
    workers.pop();
    expect(await heartbeats()).toEqual([]);
    expect((await waiting()).map(({ held }) => held)).toEqual([false, false]);
    expect((await waiting()).map(({ attempts }) => attempts)).toEqual([0, 0]);

    const done: number[] = [];
    const last = newSignal();
    await work((number) => {
      done.push(number);
      if (done.length === 2) last.resolve();
      return Promise.resolve();
    }, 1);
    await last.promise;
    expect(done).toEqual([1, 2]);
  });

  it('begins anew what a dead worker held, and leaves alone what a living one holds', async () => {
    const done: number[] = [];
    const gate = newSignal();
    const held = newSignal();
    const last = newSignal();
    await order(1, 'anna');
    await order(2, 'bert');
    // A worker that has died with the first job in its hands, and a living one with the second.
    await database.db.execute(sql`
      with jobs as (
        update graphile_worker._private_jobs set
          locked_at = now() - interval '10 seconds', attempts = 1,
          locked_by = case payload->>'number' when '1' then 'dead' else 'living' end
        returning job_queue_id, locked_by, locked_at)
      update graphile_worker._private_job_queues as queues
        set locked_by = jobs.locked_by, locked_at = jobs.locked_at
        from jobs where jobs.job_queue_id = queues.id`);
    await database.db.insert(workerHeartbeats).values([
      { workerId: 'dead', beatAt: sql`now() - interval '9 seconds'` },
      { workerId: 'living', beatAt: sql`now() + interval '1 hour'` },
    ]);
    await work(async (number) => {
      done.push(number);
      if (number === 1) {
        held.resolve();
        await gate.promise;
      }
      if (number === 3) last.resolve();
    }, 1);
    await held.promise;
    gate.resolve();
    await order(3);
    await last.promise;
    expect(done).toEqual([1, 3]);
    await expect.poll(waiting).toMatchObject([{ number: 2, held: true }]);
    expect(memory.lines.join('')).toMatch(/workers have died/);
  });

  it('tries a job that failed again later, and tells the log why it failed', async () => {
    const failed = newSignal();
    await work(() => {
      failed.resolve();
      return Promise.reject(new Error('out of paper'));
    });
    await order(1);
    await failed.promise;
    await expect.poll(waiting).toMatchObject([{ number: 1, attempts: 1, held: false }]);
    expect(memory.lines.find((line) => line.includes('out of paper'))).toMatch(/"task":"count"/);
  });
});
