import { HttpErrorResponse } from '@angular/common/http';
import { TestBed } from '@angular/core/testing';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Api, Refusal } from '../../../core/api';
import { DraftKeeper } from './draft-keeper';

const PATH = '/api/scenarios/s/draft';
const AT = '2026-01-02T12:04:00.000Z';

interface Put {
  readonly version: number;
  readonly study: unknown;
}

/** A server that keeps one draft and refuses what was not made from it. */
class DraftServer {
  version = 0;
  study: unknown;
  readonly puts: Put[] = [];
  readonly deletes: string[] = [];
  reachable = true;

  send(_method: string, _path: string, _schema: unknown, body: Put): Promise<unknown> {
    this.puts.push(body);
    if (!this.reachable) return Promise.reject(Refusal.of(new HttpErrorResponse({ status: 0 })));
    if (body.version !== this.version) return Promise.reject(this.conflict());
    this.version += 1;
    this.study = body.study;
    return Promise.resolve({ baseRevision: 1, version: this.version, study: body.study, at: AT });
  }

  act(_method: string, path: string): Promise<void> {
    this.deletes.push(path);
    this.version = 0;
    return Promise.resolve();
  }

  private conflict(): Refusal {
    const current =
      this.version === 0 ? null : { baseRevision: 1, version: this.version, study: this.study, at: AT };
    const error = { type: 't', title: 't', status: 409, detail: '', code: 'draft-changed', current };
    return Refusal.of(new HttpErrorResponse({ status: 409, error }));
  }
}

function open(version = 0) {
  const server = new DraftServer();
  server.version = version;
  TestBed.configureTestingModule({ providers: [DraftKeeper, { provide: Api, useValue: server }] });
  const keeper = TestBed.inject(DraftKeeper);
  keeper.open({ path: PATH, baseRevision: 1, version }, version > 0 ? AT : undefined);
  return { server, keeper };
}

const rest = () => vi.advanceTimersByTimeAsync(700);

describe('DraftKeeper', () => {
  beforeEach(() => vi.useFakeTimers());
  afterEach(() => vi.useRealTimers());

  it('saves once the hand rests, the newest alone, and says so', async () => {
    const { server, keeper } = open();
    keeper.keep({ k: 1 });
    keeper.keep({ k: 2 });
    expect(keeper.keeping()).toEqual({ kind: 'saving' });
    await rest();
    expect(server.puts).toMatchObject([{ version: 0, study: { k: 2 } }]);
    expect(keeper.keeping()).toEqual({ kind: 'saved', at: AT });
  });

  it('saves on top of what it saved before', async () => {
    const { server, keeper } = open();
    keeper.keep({ k: 1 });
    await rest();
    keeper.keep({ k: 2 });
    await rest();
    expect(server.puts.map(({ version }) => version)).toEqual([0, 1]);
  });

  it('throws the draft away once nothing differs any more', async () => {
    const { server, keeper } = open(3);
    keeper.keep(undefined);
    await rest();
    expect(server.deletes).toEqual([`${PATH}?version=3`]);
    expect(keeper.keeping()).toEqual({ kind: 'none' });
  });

  it('tells of a draft that another window changed, and sends nothing until one is chosen', async () => {
    const { server, keeper } = open(1);
    server.version = 2;
    server.study = { k: 'theirs' };
    keeper.keep({ k: 'mine' });
    await rest();
    expect(keeper.keeping()).toMatchObject({
      kind: 'conflict',
      current: { version: 2, study: { k: 'theirs' } },
    });
    keeper.keep({ k: 'mine again' });
    await rest();
    expect(server.puts).toHaveLength(1);
    keeper.keepMine({ k: 'mine again' });
    await rest();
    expect(server.study).toEqual({ k: 'mine again' });
    expect(keeper.keeping()).toEqual({ kind: 'saved', at: AT });
  });

  it('tells of a draft that another window threw away', async () => {
    const { server, keeper } = open(1);
    server.version = 0;
    keeper.keep({ k: 1 });
    await rest();
    expect(keeper.keeping()).toEqual({ kind: 'conflict', current: null });
  });

  it('tries again where the server did not answer', async () => {
    const { server, keeper } = open();
    server.reachable = false;
    keeper.keep({ k: 1 });
    await rest();
    expect(keeper.keeping()).toMatchObject({ kind: 'failed' });
    server.reachable = true;
    await vi.advanceTimersByTimeAsync(5000);
    expect(server.study).toEqual({ k: 1 });
    expect(keeper.keeping()).toEqual({ kind: 'saved', at: AT });
  });

  it('sends at once when the page goes', async () => {
    const { server, keeper } = open();
    keeper.keep({ k: 1 });
    TestBed.resetTestingModule();
    await vi.advanceTimersByTimeAsync(0);
    expect(server.study).toEqual({ k: 1 });
  });

  it('begins anew on the revision that the draft was saved as', async () => {
    const { server, keeper } = open();
    keeper.keep({ k: 1 });
    await rest();
    await keeper.drop(2);
    expect(server.deletes).toEqual([`${PATH}?version=1`]);
    keeper.keep({ k: 2 });
    await rest();
    expect(server.puts.at(-1)).toMatchObject({ baseRevision: 2, version: 0 });
  });
});
