import { eq } from 'drizzle-orm';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { connectDatabase, type Database } from '../../server/db';
import { runEvents, runs } from '../../server/db/schema';
import { computeRunJob, summariesOf } from '../../server/features/runs';
import type { AnalysisAnswer, Engine, EngineCall } from '../../server/jobs';
import { StudyFaultError } from '../../shared/contracts';
import { type MemoryLog, memoryLog } from './support/memory-log';
import { createTestDatabase, type TestDatabase } from './support/test-database';
import { makePerson, type TestPerson } from './support/test-people';
import { makeRun, makeScenario, type MadeScenario } from './support/test-runs';

const ANSWER: AnalysisAnswer = {
  engineVersion: '7',
  result: '{"format":"tareline-result"}',
  figures: {
    ...{ unit: 'kg', verdict: 'holds', proof: 'proved', approximated: false, ratedLow: 0, ratedHigh: 480 },
    ...{
      provedLow: 0,
      provedHigh: 500.5,
      failsAt: 501,
      failsBelow: null,
      plate: null,
      limiting: 'stability',
    },
  },
  map: undefined,
};

/** An engine that does what the test says. */
function engineThat(analyse: (call: EngineCall) => Promise<AnalysisAnswer>): Engine {
  return {
    version: () => Promise.resolve('7'),
    analyse: (_study, _map, call = {}) => analyse(call),
    map: () => Promise.reject(new Error('no map is asked for')),
    close: () => Promise.resolve(),
  };
}

/** Rejects when the signal aborts, as the engine does. */
function untilAborted({ signal }: EngineCall): Promise<never> {
  return new Promise((_resolve, reject) => {
    const stop = () => reject(new Error('aborted'));
    if (signal?.aborted === true) stop();
    else signal?.addEventListener('abort', stop);
  });
}

describe('computing a run', () => {
  let testDatabase: TestDatabase;
  let database: Database;
  let memory: MemoryLog;
  let author: TestPerson;
  let scenario: MadeScenario;
  let runId: string;
  let now = 0;

  beforeEach(async () => {
    testDatabase = await createTestDatabase();
    memory = memoryLog();
    database = connectDatabase({ url: testDatabase.url, log: memory.log });
    author = await makePerson(database.db, 'http://127.0.0.1');
    scenario = await makeScenario(database.db, author);
    runId = await makeRun(database.db, author, scenario);
  });
  afterEach(async () => {
    await database.close();
    await testDatabase.drop();
  });

  const compute = (engine: Engine, signal = new AbortController().signal) =>
    computeRunJob({ db: database.db, engine, clock: () => now }).run({ runId }, { signal, log: memory.log });
  const readRun = async () => (await database.db.select().from(runs).where(eq(runs.id, runId)))[0];
  const kinds = async () =>
    (await database.db.select().from(runEvents).orderBy(runEvents.id)).map(({ kind }) => kind);
  const cancel = () =>
    database.db.update(runs).set({ state: 'cancelled', finishedAt: new Date() }).where(eq(runs.id, runId));

  it('keeps answer, figures and the version of the engine that computed', async () => {
    await compute(engineThat(() => Promise.resolve(ANSWER)));
    const { result, figures, engineVersion } = ANSWER;
    expect(await readRun()).toMatchObject({ state: 'done', attempts: 1, result, figures, engineVersion });
    expect(await kinds()).toEqual(['started', 'done']);
  });

  it('fails with every fault of the study', async () => {
    const faults = [
      { path: 'control.kp', message: 'must be a number' },
      { path: 'machine', message: 'is missing' },
    ];
    await compute(engineThat(() => Promise.reject(new StudyFaultError(faults))));
    const error = 'control.kp: must be a number\nmachine: is missing';
    expect(await readRun()).toMatchObject({ state: 'failed', error, result: null });
    expect(await kinds()).toEqual(['started', 'failed']);
  });

  it('fails with a neutral text where the server is at fault, and tells the log why', async () => {
    await compute(engineThat(() => Promise.reject(new Error('a thread ran out of memory'))));
    const { state, error } = await readRun();
    expect(state).toBe('failed');
    expect(error).toMatch(/went wrong on the server/);
    expect(error).not.toMatch(/thread/);
    const line = memory.lines.find((text) => text.includes('a thread ran out of memory'));
    expect(line).toMatch(/runs-compute\.spec/);
    expect(line).toContain(runId);
  });

  it('leaves a run alone that is over', async () => {
    await cancel();
    await compute(engineThat(() => Promise.reject(new Error('nothing is to be computed'))));
    expect(await readRun()).toMatchObject({ state: 'cancelled', attempts: 0 });
    expect(await kinds()).toEqual([]);
  });

  it('stops when the run is cancelled, and changes nothing any more', async () => {
    const engine = engineThat(async (call) => {
      await cancel();
      call.onProgress?.(0.5);
      return untilAborted(call);
    });
    await compute(engine);
    expect(await readRun()).toMatchObject({ state: 'cancelled', result: null });
  });

  it('takes no answer that comes after the run was cancelled', async () => {
    await compute(
      engineThat(async () => {
        await cancel();
        return ANSWER;
      }),
    );
    expect(await readRun()).toMatchObject({ state: 'cancelled', result: null });
    expect(await kinds()).toEqual(['started']);
  });

  it('takes no answer of an attempt that was given up in favour of a newer one', async () => {
    const late = { ...ANSWER, result: '"late"' };
    await compute(
      engineThat(async () => {
        await compute(engineThat(() => Promise.resolve(ANSWER)));
        return late;
      }),
    );
    expect(await readRun()).toMatchObject({ state: 'done', attempts: 2, result: ANSWER.result });
  });

  it('puts the run back where the worker stops, as if it had not been begun', async () => {
    const stopping = new AbortController();
    const engine = engineThat((call) => {
      stopping.abort();
      return untilAborted(call);
    });
    await expect(compute(engine, stopping.signal)).rejects.toThrow('aborted');
    expect(await readRun()).toMatchObject({ state: 'queued', attempts: 0, progress: 0 });
    expect(await kinds()).toEqual(['started', 'queued']);
  });

  it('begins a run anew that a dead worker had begun, but not for ever', async () => {
    for (let attempts = 1; attempts <= 3; attempts++) {
      await database.db.update(runs).set({ state: 'running', attempts }).where(eq(runs.id, runId));
      if (attempts < 3) await compute(engineThat(() => Promise.resolve(ANSWER)));
      else await compute(engineThat(() => Promise.reject(new Error('it takes the worker with it'))));
      if (attempts < 3) {
        expect(await readRun()).toMatchObject({ state: 'done', attempts: attempts + 1 });
        const again = { state: 'running', result: null, finishedAt: null } as const;
        await database.db.update(runs).set(again).where(eq(runs.id, runId));
      }
    }
    const { state, error } = await readRun();
    expect(state).toBe('failed');
    expect(error).toMatch(/broke off 3 times/);
    expect(memory.lines.join('')).not.toMatch(/takes the worker with it/);
  });

  it('tells progress no more often than once a second of the clock, and always the truth in the run', async () => {
    const told: number[] = [];
    const engine = engineThat(async ({ onProgress }) => {
      const shares: [number, number][] = [
        [0, 0.1],
        [400, 0.2],
        [999, 0.3],
        [1000, 0.4],
        [1500, 0.5],
        [2000, 0.5],
        [9000, 0.505],
      ];
      for (const [time, share] of shares) {
        now = time;
        onProgress?.(share);
        await expect.poll(async () => (await readRun()).progress).toBeCloseTo(share, 5);
        // What is passed on is written right after; the next look finds it there.
        await expect
          .poll(async () => (await kinds()).filter((kind) => kind === 'progress').length)
          .toBe(time < 1000 ? 1 : time < 2000 ? 2 : 3);
      }
      const rows = await database.db.select().from(runEvents).where(eq(runEvents.kind, 'progress'));
      told.push(...rows.map(({ data }) => Number(data.progress)));
      return ANSWER;
    });
    await compute(engine);
    expect(told).toEqual([0.1, 0.4, 0.5]);
    expect(await kinds()).toEqual(['started', 'done']);
  });

  it('stands in lists: what is under way first, what is done before what failed', async () => {
    const { db } = database;
    const standing = async () =>
      (await summariesOf(db, [scenario.scenarioRevisionId])).get(scenario.scenarioRevisionId);
    expect(await standing()).toMatchObject({ id: runId, state: 'queued', verdict: null, provedHigh: null });
    await compute(engineThat(() => Promise.resolve(ANSWER)));
    expect(await standing()).toMatchObject({ id: runId, state: 'done', ...ANSWER.figures });
    const first = runId;
    runId = await makeRun(db, author, scenario);
    expect(await standing()).toMatchObject({ id: runId, state: 'queued' });
    await compute(engineThat(() => Promise.reject(new Error('broken'))));
    expect(await standing()).toMatchObject({ id: first, state: 'done' });
    const other = await makeScenario(db, author);
    const all = await summariesOf(db, [scenario.scenarioRevisionId, other.scenarioRevisionId]);
    expect([...all.keys()]).toEqual([scenario.scenarioRevisionId]);
    expect(await summariesOf(db, [])).toEqual(new Map());
  });
});
