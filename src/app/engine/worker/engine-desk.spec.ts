import { describe, expect, it } from 'vitest';
import { readStudyValue } from '../../../../shared/contracts';
import { analyse, composeStudy, MapCourse } from '../../../../shared/engine';
import type { EngineReply } from '../engine-messages';
import { EngineDesk } from './engine-desk';

/** A motor on a shaft with a load: gain and load have bands. */
function shaft(load: number) {
  return {
    format: 'tareline-study',
    version: 1,
    machine: {
      coordinates: ['a'],
      mass: [['J + m']],
      damping: [['d']],
      stiffness: [[0]],
      inputs: { torque: [1] },
      outputs: { angle: { position: [1] } },
    },
    parameters: [
      { id: 'm', nominal: load, low: 1, high: 4, minimum: 0 },
      { id: 'd', nominal: 2, low: 1, high: 3, minimum: 0 },
      { id: 'J', nominal: 1 },
      { id: 'lag', unit: 's', nominal: 0.1, low: 0.05, high: 0.2, minimum: 0.01 },
    ],
    payload: 'm',
    searchUpTo: 100,
    control: { law: 'pid', input: 'torque', output: 'angle', kp: 2, ki: 0, kd: 1, derivativeTime: 0.05 },
    actuator: { lag: 'lag' },
    requirements: [{ measure: 'stability' }, { measure: 'phaseMargin', atLeast: 0.2 }],
    rating: { tests: [{ name: 'overload', factor: 1.25, requirements: [{ measure: 'stability' }] }] },
    map: { x: 'm', y: 'd', measure: 'phaseMargin' },
  };
}

/** A desk whose messages and turns the test hands on one by one; every look at the clock takes `tick` ms. */
class FakeSurroundings {
  readonly replies: EngineReply[] = [];
  private turns = 0;
  private now = 0;
  readonly desk: EngineDesk;

  constructor(tick: number) {
    this.desk = new EngineDesk({
      reply: (reply) => this.replies.push(structuredClone(reply)),
      clock: () => (this.now += tick),
      askForTurn: () => this.turns++,
    });
  }

  /** @returns false where nothing is left to do */
  takeTurn(): boolean {
    if (this.turns === 0) return false;
    this.turns--;
    this.desk.takeTurn();
    return true;
  }

  takeTurns(): number {
    let taken = 0;
    while (this.takeTurn()) taken++;
    return taken;
  }

  of(id: number): EngineReply[] {
    return this.replies.filter((reply) => reply.id === id);
  }
}

/** `work` has the extra search of the bands in it, and the hash is the server's. */
function digits(result: object) {
  return JSON.stringify({ ...result, work: undefined, studyHash: undefined });
}

function liveResults(replies: readonly EngineReply[]) {
  return replies.flatMap((reply) =>
    reply.kind === 'live' && 'result' in reply.answer ? [reply.answer] : [],
  );
}

describe('EngineDesk, live answers', () => {
  const { study } = readStudyValue(shaft(2));
  const whole = analyse(composeStudy(study), { studyHash: '', clock: () => 0, map: false });

  it('tells the first answers, then the rating, then all, with the digits of the whole analysis', () => {
    const fake = new FakeSurroundings(1);
    fake.desk.receive({ kind: 'live', id: 1, study: shaft(2) });
    fake.takeTurns();
    expect(fake.replies.map(({ kind }) => kind)).toEqual(['live', 'live', 'live', 'done']);
    const [first, rated, all] = liveResults(fake.replies);
    expect(Object.keys(first.result).sort()).toEqual(['bands', 'largestPayload', 'nominal']);
    expect(first.result.nominal).toEqual(whole.nominal);
    expect(first.result.largestPayload).toEqual(whole.largestPayload);
    expect(first.result.bands?.verdict).toBe(whole.bands.verdict);
    expect(rated.result.rating).toEqual(whole.rating);
    expect(whole.rating?.plate).toBeGreaterThan(0);
    expect(all.complete).toBe(true);
    expect(digits(all.result)).toBe(digits(whole));
    expect([first.complete, rated.complete]).toEqual([false, false]);
  });

  it('computes in turns of a few milliseconds', () => {
    const fake = new FakeSurroundings(1);
    fake.desk.receive({ kind: 'live', id: 1, study: shaft(2) });
    expect(fake.takeTurns()).toBeGreaterThan(10);
    const quick = new FakeSurroundings(0);
    quick.desk.receive({ kind: 'live', id: 1, study: shaft(2) });
    // One turn to each answer, and one to the end.
    expect(quick.takeTurns()).toBeLessThanOrEqual(4);
    expect(liveResults(quick.replies).map(({ result }) => digits(result))).toEqual(
      liveResults(fake.replies).map(({ result }) => digits(result)),
    );
  });

  it('gives an older study up for a newer one', () => {
    const fake = new FakeSurroundings(1);
    fake.desk.receive({ kind: 'live', id: 1, study: shaft(3) });
    fake.takeTurn();
    fake.desk.receive({ kind: 'live', id: 2, study: shaft(2) });
    fake.takeTurns();
    expect(fake.of(1)).toEqual([{ kind: 'done', id: 1 }]);
    const all = liveResults(fake.of(2)).at(-1);
    expect(all?.complete).toBe(true);
    expect(digits(all?.result ?? {})).toBe(digits(whole));
  });

  it('stops where it is told to, and says nothing more', () => {
    const fake = new FakeSurroundings(1);
    fake.desk.receive({ kind: 'live', id: 1, study: shaft(2) });
    fake.takeTurn();
    fake.desk.receive({ kind: 'cancel', id: 1 });
    expect(fake.takeTurns()).toBeLessThanOrEqual(1);
    expect(fake.replies).toEqual([]);
  });

  it('answers a study with faults by the faults, and goes on', () => {
    const fake = new FakeSurroundings(1);
    fake.desk.receive({ kind: 'live', id: 1, study: { ...shaft(2), payload: 'nobody' } });
    fake.takeTurns();
    const [answer, end] = fake.of(1);
    expect(answer).toMatchObject({ kind: 'live', answer: { faults: [{ path: 'payload' }] } });
    expect(end).toEqual({ kind: 'done', id: 1 });
    fake.desk.receive({ kind: 'live', id: 2, study: shaft(2) });
    fake.takeTurns();
    expect(liveResults(fake.of(2)).at(-1)?.complete).toBe(true);
  });
});

describe('EngineDesk, maps', () => {
  it('tells a coarse map, then the one asked for, with the digits of the engine', () => {
    const fake = new FakeSurroundings(0);
    fake.desk.receive({ kind: 'map', id: 1, study: shaft(2), grid: { columns: 27, rows: 3 } });
    fake.takeTurns();
    const composed = composeStudy(readStudyValue(shaft(2)).study);
    const expected = [25, 27].map((columns) => {
      if (composed.map === undefined) throw new Error('the study has no map');
      const sweep = new MapCourse(composed).sweep({ ...composed.map, columns, rows: 3 });
      for (;;) {
        const { done, value } = sweep.next();
        if (done === true) return { kind: 'map', id: 1, map: value };
      }
    });
    expect(fake.replies).toEqual([...expected, { kind: 'done', id: 1 }]);
  });

  it('computes a coarse one once', () => {
    const fake = new FakeSurroundings(0);
    fake.desk.receive({ kind: 'map', id: 1, study: shaft(2), grid: { columns: 5, rows: 4 } });
    fake.takeTurns();
    expect(fake.replies.map(({ kind }) => kind)).toEqual(['map', 'done']);
  });

  it('goes before the rest of a live answer and after its first figures', () => {
    const fake = new FakeSurroundings(1);
    fake.desk.receive({ kind: 'map', id: 1, study: shaft(2), grid: { columns: 26, rows: 5 } });
    fake.takeTurn();
    fake.desk.receive({ kind: 'live', id: 2, study: shaft(2) });
    fake.takeTurns();
    expect(fake.replies.map(({ id, kind }) => `${kind} ${id}`)).toEqual([
      ...['live 2', 'map 1', 'live 2', 'live 2', 'done 2', 'map 1', 'done 1'],
    ]);
  });

  it('gives up an older map, not a live answer', () => {
    const fake = new FakeSurroundings(1);
    fake.desk.receive({ kind: 'live', id: 1, study: shaft(2) });
    fake.desk.receive({ kind: 'map', id: 2, study: shaft(2), grid: { columns: 5, rows: 5 } });
    fake.desk.receive({ kind: 'map', id: 3, study: shaft(2), grid: { columns: 5, rows: 5 } });
    fake.takeTurns();
    expect(fake.of(2)).toEqual([{ kind: 'done', id: 2 }]);
    expect(fake.of(3).map(({ kind }) => kind)).toEqual(['map', 'done']);
    expect(liveResults(fake.of(1)).at(-1)?.complete).toBe(true);
  });

  it('says that a study has no map', () => {
    const fake = new FakeSurroundings(0);
    fake.desk.receive({
      kind: 'map',
      id: 1,
      study: { ...shaft(2), map: undefined },
      grid: { columns: 5, rows: 5 },
    });
    fake.takeTurns();
    expect(fake.replies).toEqual([
      {
        kind: 'faults',
        id: 1,
        faults: [{ path: 'map', message: 'is missing; give the parameters of both axes' }],
      },
    ]);
  });
});
