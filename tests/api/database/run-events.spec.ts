import { eq, sql } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { createEventFeed, databaseCode, type EventFeed, type Listener, listen } from '../../../server/db';
import { LOCK_NOT_AVAILABLE } from '../../../server/db/database-errors';
import { runEvents } from '../../../server/db/schema';
import { memoryLog } from '../support/memory-log';
import { useApi } from '../support/test-api';
import { makeRun } from '../support/test-runs';

const api = useApi();
let listener: Listener;
let feed: EventFeed;
let runId: string;
let stop: AbortController;
beforeAll(async () => {
  const { database } = api();
  listener = await listen({
    url: database.url,
    channel: 'run_events',
    log: memoryLog().log,
    reconnectMs: 5,
  });
  feed = createEventFeed(database.db, listener);
  runId = await makeRun(database.db, await api().person());
});
afterAll(() => listener.close());
beforeEach(() => {
  stop = new AbortController();
  return () => stop.abort();
});

const add = async (kind: string) => {
  const [event] = await api().database.db.insert(runEvents).values({ runId, kind }).returning();
  return event.id;
};

describe('the feed of events', () => {
  it('gives what was there after the last seen event, then what comes', async () => {
    const seen = await add('seen');
    const missed = await add('missed');
    const events = feed.follow({ after: seen, signal: stop.signal });
    expect((await events.next()).value).toMatchObject({ id: missed, kind: 'missed', data: { runId } });
    const next = events.next();
    const fresh = await add('fresh');
    expect((await next).value).toMatchObject({ id: fresh, kind: 'fresh' });
  });

  it('gives only what it is asked for', async () => {
    const start = await add('start');
    const where = eq(runEvents.kind, 'wanted');
    const events = feed.follow({ after: start, where, signal: stop.signal });
    const next = events.next();
    await add('other');
    const wanted = await add('wanted');
    expect((await next).value).toMatchObject({ id: wanted });
  });

  it('goes on after its connection broke, and misses nothing meanwhile', async () => {
    const start = await add('start');
    const events = feed.follow({ after: start, signal: stop.signal });
    const next = events.next();
    await api().database.db.execute(sql`
      select pg_terminate_backend(pid) from pg_stat_activity
      where application_name = 'tareline events' and datname = current_database()`);
    const after = await add('after the break');
    expect((await next).value).toMatchObject({ id: after });
  });

  it('ends by its signal', async () => {
    const events = feed.follow({ after: await add('last'), signal: stop.signal });
    const next = events.next();
    stop.abort();
    expect(await next).toEqual({ done: true, value: undefined });
  });
});

describe('ids of events', () => {
  it('cannot become visible out of order: one transaction that adds events waits for another', async () => {
    const { db } = api().database;
    await db.transaction(async (first) => {
      await first.insert(runEvents).values({ runId, kind: 'first' });
      const second = db.transaction(async (tx) => {
        await tx.execute(sql`set local lock_timeout = '50ms'`);
        await tx.insert(runEvents).values({ runId, kind: 'second' });
      });
      const refused = await second.then(
        () => 'not made to wait',
        (error: unknown) => databaseCode(error),
      );
      expect(refused).toBe(LOCK_NOT_AVAILABLE);
    });
  });
});
