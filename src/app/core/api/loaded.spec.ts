import { provideHttpClient } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import { ApplicationRef, signal } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { describe, expect, it } from 'vitest';
import { listOf } from './schema';
import { loaded } from './loaded';

const numbers = listOf({
  parse(value: unknown): number {
    if (typeof value !== 'number') throw new TypeError('a number was expected');
    return value;
  },
});

function setUp() {
  TestBed.configureTestingModule({ providers: [provideHttpClient(), provideHttpClientTesting()] });
  const path = signal<string | undefined>('/api/a');
  const list = TestBed.runInInjectionContext(() => loaded(() => path(), numbers, 'this list'));
  const http = TestBed.inject(HttpTestingController);
  const settled = (): Promise<void> => TestBed.inject(ApplicationRef).whenStable();
  TestBed.tick();
  return { path, list, http, settled };
}

describe('loaded', () => {
  it('goes from loading to ready', async () => {
    const { list, http, settled } = setUp();
    expect(list.state()).toEqual({ kind: 'loading', old: undefined });
    http.expectOne('/api/a').flush({ items: [1, 2] });
    await settled();
    expect(list.state()).toEqual({ kind: 'ready', value: [1, 2] });
  });

  it('keeps the old value while it loads the same again, and after that failed', async () => {
    const { list, http, settled } = setUp();
    http.expectOne('/api/a').flush({ items: [1] });
    await settled();
    list.reload();
    TestBed.tick();
    expect(list.state()).toEqual({ kind: 'loading', old: [1] });
    http.expectOne('/api/a').flush('', { status: 503, statusText: 'Unavailable' });
    await settled();
    expect(list.state()).toMatchObject({ kind: 'failed', old: [1], failure: { kind: 'broken' } });
    expect(list.value()).toEqual([1]);
  });

  it('drops the old value for another path', async () => {
    const { path, list, http, settled } = setUp();
    http.expectOne('/api/a').flush({ items: [1] });
    await settled();
    path.set('/api/b');
    TestBed.tick();
    expect(list.state()).toEqual({ kind: 'loading', old: undefined });
    http.expectOne('/api/b').flush({ title: 'Forbidden' }, { status: 403, statusText: 'Forbidden' });
    await settled();
    expect(list.state()).toMatchObject({
      kind: 'failed',
      failure: { kind: 'forbidden', title: 'You may not see this list' },
    });
  });

  it('is idle without a path', () => {
    const { path, list, http } = setUp();
    http.expectOne('/api/a');
    path.set(undefined);
    TestBed.tick();
    expect(list.state()).toEqual({ kind: 'idle' });
  });

  it('does not take an answer that breaks the contract', async () => {
    const { list, http, settled } = setUp();
    http.expectOne('/api/a').flush({ items: ['1'] });
    await settled();
    expect(list.state()).toMatchObject({
      kind: 'failed',
      failure: { kind: 'broken', title: 'The answer could not be read' },
    });
  });
});
