import { HttpErrorResponse, provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ApplicationRef, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { NEVER, of } from 'rxjs';
import { describe, expect, it } from 'vitest';
import type { Study } from '../../../../../shared/contracts';
import type { Scenario, ScenarioRevision } from '../../../../../shared/contracts/api';
import { RunEvents } from '../../../core/events';
import { EngineClient, type LiveAnswer } from '../../../engine';
import { withBandEnd } from './band-edits';
import { DraftKeeper } from './draft-keeper';
import { LiveAnswers } from './live-answers';
import { SCENARIO_ADDRESS } from './scenario-address';
import { ScenarioStore } from './scenario-store';
import { exampleResult, exampleStudy } from './testing/example';

const ID = '00000000-0000-4000-8000-000000000001';
const AT = '2026-01-02T12:04:00.000Z';

const revisionOf = (number: number, study: Study): ScenarioRevision => ({
  ...{ number, variantRevision: 1, study, studyHash: 'sha256:0', note: '', author: 'Dora Designer', at: AT },
  run: null,
});
const scenarioOf = (changes: Partial<Scenario>): Scenario => ({
  ...{ id: ID, variantId: ID, productId: ID, name: 'Rated', productName: 'Lifts', variantName: 'Short' },
  ...{ role: 'designer', head: revisionOf(1, exampleStudy({ low: 120 })), draft: null },
  ...changes,
});

/** Its proved figure is the low end of the stiffness: every study has its own. */
const engine = {
  live: (study: Study) =>
    of<LiveAnswer>({
      complete: true,
      result: exampleResult({ provedTo: Number(study.parameters[1].low), stretch: 2 }),
    }),
};

async function open(changes: Partial<Scenario> = {}, revision: string | null = null) {
  const address = { scenarioId: signal(ID), revision: signal(revision) };
  TestBed.configureTestingModule({
    providers: [
      provideHttpClient(),
      provideHttpClientTesting(),
      ...[DraftKeeper, LiveAnswers, ScenarioStore],
      { provide: SCENARIO_ADDRESS, useValue: address },
      { provide: EngineClient, useValue: engine },
      { provide: RunEvents, useValue: { events: NEVER, live: signal(true) } },
    ],
  });
  const store = TestBed.inject(ScenarioStore);
  const http = TestBed.inject(HttpTestingController);
  const settled = async () => {
    TestBed.tick();
    await TestBed.inject(ApplicationRef).whenStable();
    TestBed.tick();
  };
  const answer = async (scenario: Scenario) => {
    TestBed.tick();
    http.expectOne(`/api/scenarios/${ID}`).flush(scenario);
    http.match(`/api/scenarios/${ID}/revisions`).forEach((request) => request.flush({ items: [] }));
    await settled();
  };
  await answer(scenarioOf(changes));
  return { store, http, address, answer, settled };
}

const move = (store: ScenarioStore, value: number, open = false) =>
  store.edit((study) => withBandEnd(study, 'k', 'low', value), { what: 'move', gesture: 'k low', open });
const lowOf = (store: ScenarioStore) => store.study()?.parameters[1].low;

describe('ScenarioStore', () => {
  it('opens the newest revision where there is no draft', async () => {
    const { store } = await open();
    expect(lowOf(store)).toBe(120);
    expect(store.hasChanges()).toBe(false);
    expect(store.shown()).toBeUndefined();
  });

  it('opens the draft that was left, with its answer', async () => {
    const draft = { baseRevision: 1, version: 4, study: exampleStudy({ low: 130 }), at: AT };
    const { store } = await open({ draft });
    expect(lowOf(store)).toBe(130);
    expect(store.keeping()).toEqual({ kind: 'saved', at: AT });
    expect(store.shown()).toMatchObject({
      by: 'browser',
      renewing: false,
      result: { largestPayload: { provedTo: 130 } },
    });
    store.undo();
    expect([lowOf(store), store.hasChanges()]).toEqual([120, false]);
  });

  it('goes back to what is saved when the draft is discarded, and forth again', async () => {
    const { store } = await open();
    move(store, 125);
    store.discard();
    expect([lowOf(store), store.hasChanges()]).toEqual([120, false]);
    store.undo();
    expect(lowOf(store)).toBe(125);
  });

  it('answers every edit, undoes it and does it again', async () => {
    const { store } = await open();
    move(store, 125);
    expect(store.shown()?.result.largestPayload?.provedTo).toBe(125);
    store.edit((study) => ({ ...study, name: 'Other' }), { what: 'rename' });
    store.undo();
    expect([lowOf(store), store.undoes(), store.redoes()]).toEqual([125, 'move', 'rename']);
    store.undo();
    expect([lowOf(store), store.hasChanges()]).toEqual([120, false]);
    store.redo();
    expect(lowOf(store)).toBe(125);
  });

  it('undoes a drag as one step', async () => {
    const { store } = await open();
    for (const value of [121, 122, 123]) move(store, value, true);
    move(store, 124);
    store.undo();
    expect(lowOf(store)).toBe(120);
    expect(store.undoes()).toBeUndefined();
  });

  it('changes nothing for a viewer', async () => {
    const { store } = await open({ role: 'viewer' });
    move(store, 130);
    expect(lowOf(store)).toBe(120);
    expect(store.readOnly()).toBe(true);
  });

  it('shows an older revision as it is, beside the draft, and makes it the draft when asked', async () => {
    const { store, http, address, settled } = await open();
    move(store, 125);
    address.revision.set('1');
    TestBed.tick();
    http.expectOne(`/api/scenarios/${ID}/revisions/1`).flush(revisionOf(1, exampleStudy({ low: 110 })));
    await settled();
    expect([lowOf(store), store.readOnly()]).toEqual([110, true]);
    move(store, 140);
    expect(store.restore(store.revision()?.study, 'restore revision 1')).toBe(true);
    address.revision.set(null);
    expect([lowOf(store), store.undoes()]).toEqual([110, 'restore revision 1']);
    store.undo();
    expect(lowOf(store)).toBe(125);
  });

  it('takes up what somebody else saved, unless there is a draft: that is told instead', async () => {
    const { store, answer } = await open();
    const newer = (number: number) =>
      scenarioOf({ head: revisionOf(number, exampleStudy({ low: 100 + number })) });
    store.reload();
    await answer(newer(2));
    expect([lowOf(store), store.baseRevision()]).toEqual([102, 2]);
    move(store, 125);
    store.reload();
    await answer(newer(3));
    expect([lowOf(store), store.baseRevision()]).toEqual([125, 2]);
    expect(store.overtakenBy()?.number).toBe(3);
  });

  it('goes on from the revision that the draft was saved as, and runs it', async () => {
    const { store, http, settled } = await open();
    move(store, 125);
    const saving = store.saved(revisionOf(2, exampleStudy({ low: 125 })));
    expect([store.hasChanges(), store.baseRevision()]).toEqual([false, 2]);
    expect(store.shown()?.result.largestPayload?.provedTo).toBe(125);
    await settled();
    const run = http.expectOne(`/api/scenarios/${ID}/revisions/2/runs`);
    expect(run.request.method).toBe('POST');
    run.flush(null, new HttpErrorResponse({ status: 503, statusText: 'Unavailable' }));
    await expect(saving).rejects.toThrow('The server failed');
    expect(lowOf(store)).toBe(125);
    store.undo();
    expect([lowOf(store), store.hasChanges()]).toEqual([120, true]);
  });
});
