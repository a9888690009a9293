import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { type StreamEvent, streamRoute } from '../../../server/platform/routing';
import { openEvents } from '../support/event-reader';
import { useRoutes } from '../support/test-routes';

/** Ends that the streams of the test have come to. */
const ended: string[] = [];
let onEnd = () => {};

const counting = streamRoute({
  path: '/counts/:name',
  summary: 'Counts up to three, then waits',
  policy: { scope: 'public' },
  params: z.object({ name: z.string() }),
  events: { count: z.object({ value: z.number() }) },
  open: async function* ({ params, signal }, after): AsyncGenerator<StreamEvent> {
    try {
      for (let id = (after ?? 0) + 1; id <= 3; id++) yield { id, kind: 'count', data: { value: id * 10 } };
      await new Promise<void>((resolve) => signal.addEventListener('abort', () => resolve()));
    } finally {
      ended.push(params.name);
      onEnd();
    }
  },
});

const server = useRoutes([counting]);
const open = (name: string, headers?: Record<string, string>) =>
  openEvents(`${server().client.address}/api/counts/${name}`, headers);

describe('a stream of events', () => {
  it('sends events with ids and kinds', async () => {
    const stream = await open('first');
    expect([stream.status, stream.contentType]).toEqual([200, 'text/event-stream; charset=utf-8']);
    expect(await stream.next()).toEqual({ id: 1, kind: 'count', data: { value: 10 } });
    expect((await stream.next())?.id).toBe(2);
    stream.leave();
  });

  it('goes on after the last event that the browser has seen', async () => {
    const stream = await open('resumed', { 'last-event-id': '2' });
    expect(await stream.next()).toMatchObject({ id: 3 });
    stream.leave();
  });

  it('takes a last event that is no id of ours for none', async () => {
    const stream = await open('strange', { 'last-event-id': "1' or 1=1" });
    expect(await stream.next()).toMatchObject({ id: 1 });
    stream.leave();
  });

  it('is cleaned up when the browser leaves', async () => {
    const stream = await open('left');
    await stream.next();
    const cleaned = new Promise<void>((resolve) => {
      onEnd = resolve;
    });
    stream.leave();
    await cleaned;
    expect(ended).toContain('left');
  });

  it('ends when the server stops', async () => {
    const stream = await open('stopped', { 'last-event-id': '2' });
    await stream.next();
    server().stopping.abort();
    expect(await stream.next()).toBeUndefined();
  });
});
