import { describe, expect, it } from 'vitest';
import { StudyFaultError, type MapAnswer, type Result } from '../../../shared/contracts';
import { EngineBrokenError, type LiveAnswer } from './engine-client';
import type { EngineReply, EngineRequest } from './engine-messages';
import { WorkerEngineClient, type EngineWorker } from './worker-engine-client';

class FakeWorker implements EngineWorker {
  readonly requests: EngineRequest[] = [];
  isTerminated = false;
  onmessage: EngineWorker['onmessage'] = null;
  onmessageerror: EngineWorker['onmessageerror'] = null;
  onerror: EngineWorker['onerror'] = null;

  postMessage(request: EngineRequest): void {
    this.requests.push(request);
  }

  terminate(): void {
    this.isTerminated = true;
  }

  answer(...replies: EngineReply[]): void {
    for (const data of replies) this.onmessage?.(new MessageEvent('message', { data }));
  }
}

function clientWithWorkers() {
  const workers: FakeWorker[] = [];
  const client = new WorkerEngineClient(() => {
    const worker = new FakeWorker();
    workers.push(worker);
    return worker;
  });
  return { client, workers };
}

/** What an observer is told, in order. */
function recorder<T>() {
  const told: (T | string)[] = [];
  let failure: unknown;
  return {
    told,
    failure: () => failure,
    next: (value: T) => told.push(value),
    error: (error: unknown) => {
      told.push('error');
      failure = error;
    },
    complete: () => told.push('complete'),
  };
}

const answer = (complete: boolean): LiveAnswer => ({
  result: { nominal: { stable: true } as Result['nominal'] },
  complete,
});
const map: MapAnswer = {
  x: [0, 1],
  y: [0, 1],
  measure: 'phaseMargin',
  values: [
    [1, 2],
    [3, null],
  ],
};
const grid = { columns: 2, rows: 2 };

describe('WorkerEngineClient', () => {
  it('starts one worker with the first subscription and hands answers to whom they belong', () => {
    const { client, workers } = clientWithWorkers();
    const live = client.live({ name: 'a' });
    expect(workers).toHaveLength(0);
    const first = recorder<LiveAnswer>();
    const second = recorder<MapAnswer>();
    live.subscribe(first);
    client.map({ name: 'b' }, grid).subscribe(second);
    expect(workers).toHaveLength(1);
    expect(workers[0].requests).toEqual([
      { kind: 'live', id: 1, study: { name: 'a' } },
      { kind: 'map', id: 2, study: { name: 'b' }, grid },
    ]);
    workers[0].answer(
      { kind: 'map', id: 2, map },
      { kind: 'live', id: 1, answer: answer(false) },
      { kind: 'live', id: 1, answer: answer(true) },
      { kind: 'done', id: 1 },
      { kind: 'done', id: 2 },
    );
    expect(first.told).toEqual([answer(false), answer(true), 'complete']);
    expect(second.told).toEqual([map, 'complete']);
    expect(workers[0].requests).toHaveLength(2);
  });

  it('cancels what nobody waits for any longer, and drops what still comes of it', () => {
    const { client, workers } = clientWithWorkers();
    const seen = recorder<LiveAnswer>();
    const subscription = client.live({}).subscribe(seen);
    workers[0].answer({ kind: 'live', id: 1, answer: answer(false) });
    subscription.unsubscribe();
    expect(workers[0].requests.at(-1)).toEqual({ kind: 'cancel', id: 1 });
    workers[0].answer({ kind: 'live', id: 1, answer: answer(true) });
    expect(seen.told).toEqual([answer(false)]);
  });

  it('fails with the faults of a map, and with an error of the engine', () => {
    const { client, workers } = clientWithWorkers();
    const faulty = recorder<MapAnswer>();
    const broken = recorder<LiveAnswer>();
    client.map({}, grid).subscribe(faulty);
    client.live({}).subscribe(broken);
    workers[0].answer(
      { kind: 'faults', id: 1, faults: [{ path: 'map', message: 'is missing' }] },
      { kind: 'broken', id: 2, message: 'out of order' },
    );
    expect(faulty.failure()).toBeInstanceOf(StudyFaultError);
    expect((faulty.failure() as StudyFaultError).faults).toEqual([{ path: 'map', message: 'is missing' }]);
    expect(broken.failure()).toEqual(new EngineBrokenError('out of order'));
    expect(workers[0].requests).toHaveLength(2);
    expect(workers[0].isTerminated).toBe(false);
  });

  it('fails all that wait when the worker breaks, and starts another for the next request', () => {
    const { client, workers } = clientWithWorkers();
    const seen = [recorder<LiveAnswer>(), recorder<MapAnswer>(), recorder<LiveAnswer>()] as const;
    client.live({}).subscribe(seen[0]);
    client.map({}, grid).subscribe(seen[1]);
    const [worker] = workers;
    worker.onerror?.(new ErrorEvent('error', { message: 'out of memory' }));
    expect(seen[0].failure()).toEqual(new EngineBrokenError('out of memory'));
    expect(seen[1].failure()).toEqual(new EngineBrokenError('out of memory'));
    expect(worker.isTerminated).toBe(true);
    client.live({}).subscribe(seen[2]);
    expect(workers).toHaveLength(2);
    // A late word of the broken one ends nothing of the new one.
    worker.onerror?.(new ErrorEvent('error', { message: 'again' }));
    workers[1].answer({ kind: 'live', id: 3, answer: answer(true) }, { kind: 'done', id: 3 });
    expect(seen[2].told).toEqual([answer(true), 'complete']);
  });
});
