import { TestBed } from '@angular/core/testing';
import { Subject } from 'rxjs';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { HttpErrorResponse } from '@angular/common/http';
import type { Study } from '../../../../../shared/contracts';
import { Api, Refusal } from '../../../core/api';
import { EngineClient, type LiveAnswer } from '../../../engine';
import { exampleResult, exampleStudy } from './testing/example';
import { LiveAnswers } from './live-answers';

class FakeEngine {
  readonly asked: { study: Study; answers: Subject<LiveAnswer> }[] = [];

  live(study: Study) {
    const answers = new Subject<LiveAnswer>();
    this.asked.push({ study, answers });
    return answers;
  }
}

interface Preview {
  readonly body: { study: Study; supersedes: string };
  readonly answer: (result: unknown) => void;
  readonly refuse: (error: unknown) => void;
  readonly until: AbortSignal;
}

class FakeApi {
  readonly previews: Preview[] = [];

  send(_method: string, path: string, _schema: unknown, body: Preview['body'], until: AbortSignal) {
    if (path !== '/api/preview') throw new Error(`not expected: ${path}`);
    return new Promise((answer, refuse) => this.previews.push({ body, answer, refuse, until }));
  }
}

function setUp() {
  const engine = new FakeEngine();
  const api = new FakeApi();
  TestBed.configureTestingModule({
    providers: [LiveAnswers, { provide: EngineClient, useValue: engine }, { provide: Api, useValue: api }],
  });
  return { engine, api, live: TestBed.inject(LiveAnswers) };
}

const proving = (provedTo: number, complete: boolean): LiveAnswer => ({
  complete,
  result: exampleResult({ provedTo, stretch: 2 }),
});
const study = (low: number): Study => exampleStudy({ low });
const provedTo = (live: LiveAnswers) => live.answer()?.result.largestPayload?.provedTo;

describe('LiveAnswers', () => {
  beforeEach(() => vi.useFakeTimers());
  afterEach(() => vi.useRealTimers());

  it('answers at once, with the stretch of before until the new one comes', () => {
    const { engine, live } = setUp();
    live.follow(study(120), exampleResult({ provedTo: 500, stretch: 1.5 }));
    engine.asked[0].answers.next(proving(550, false));
    expect(live.answer()).toMatchObject({ complete: false, by: 'browser' });
    expect(provedTo(live)).toBe(550);
    expect(live.answer()?.result.bandStretch?.provedTo).toBe(1.5);
    engine.asked[0].answers.next(proving(550, true));
    expect(live.answer()).toMatchObject({ complete: true });
    expect(live.answer()?.result.bandStretch?.provedTo).toBe(2);
  });

  it('asks the server only at rest, and shows its digits where they differ', async () => {
    const { engine, api, live } = setUp();
    live.follow(study(120), undefined);
    await vi.advanceTimersByTimeAsync(249);
    live.follow(study(121), undefined);
    await vi.advanceTimersByTimeAsync(249);
    expect(api.previews).toHaveLength(0);
    await vi.advanceTimersByTimeAsync(1);
    expect(api.previews.map(({ body }) => body.study)).toEqual([study(121)]);
    engine.asked[0].answers.next(proving(550, true));
    expect(provedTo(live)).toBe(550);
    expect(live.confirmation()).toEqual({ kind: 'waiting' });
    api.previews[0].answer(exampleResult({ provedTo: 549.5, stretch: 2 }));
    await vi.advanceTimersByTimeAsync(0);
    expect(provedTo(live)).toBe(549.5);
    expect(live.answer()).toMatchObject({ by: 'server' });
    expect(live.confirmation()).toEqual({ kind: 'confirmed' });
  });

  it('does not let a late answer of the browser replace the confirmed one', async () => {
    const { engine, api, live } = setUp();
    live.follow(study(120), undefined);
    await vi.advanceTimersByTimeAsync(250);
    api.previews[0].answer(exampleResult({ provedTo: 549.5, stretch: 2 }));
    await vi.advanceTimersByTimeAsync(0);
    engine.asked[0].answers.next(proving(1, true));
    expect(provedTo(live)).toBe(549.5);
  });

  it('drops what the server says of a study that is no longer wanted', async () => {
    const { api, live } = setUp();
    live.follow(study(120), undefined);
    await vi.advanceTimersByTimeAsync(250);
    live.follow(study(121), undefined);
    expect(api.previews[0].until.aborted).toBe(true);
    api.previews[0].answer(exampleResult({ provedTo: 1, stretch: 2 }));
    await vi.advanceTimersByTimeAsync(250);
    expect(live.answer()).toBeUndefined();
    expect(api.previews).toHaveLength(2);
    expect(new Set(api.previews.map(({ body }) => body.supersedes)).size).toBe(1);
  });

  it('keeps the old figures while a study has faults, tells them, and does not ask the server', async () => {
    const { engine, api, live } = setUp();
    live.follow(study(120), undefined);
    engine.asked[0].answers.next(proving(550, true));
    engine.asked[0].answers.complete();
    live.follow(study(121), undefined);
    engine.asked[1].answers.next({ faults: [{ path: 'control.kp', message: 'unknown name' }] });
    expect(live.faults()).toEqual([{ path: 'control.kp', message: 'unknown name' }]);
    expect(provedTo(live)).toBe(550);
    await vi.advanceTimersByTimeAsync(1000);
    expect(api.previews).toHaveLength(0);
    live.follow(study(122), undefined);
    await vi.advanceTimersByTimeAsync(250);
    engine.asked[1].answers.complete();
    engine.asked[2].answers.next(proving(560, true));
    await vi.advanceTimersByTimeAsync(250);
    expect([live.faults(), provedTo(live)]).toEqual([[], 560]);
    expect(api.previews).toHaveLength(1);
  });

  it('says that the server did not confirm', async () => {
    const { api, live } = setUp();
    live.follow(study(120), undefined);
    await vi.advanceTimersByTimeAsync(250);
    api.previews[0].refuse(Refusal.of(new HttpErrorResponse({ status: 0 })));
    await vi.advanceTimersByTimeAsync(0);
    expect(live.confirmation()).toMatchObject({ kind: 'failed' });
  });
});
