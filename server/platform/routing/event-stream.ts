import type { Request, Response } from 'express';
import type { StreamEvent } from './stream-event';

/** Proxies and browsers give up on a connection that stays silent. */
const HEARTBEAT_MS = 15_000;
/** How long a browser waits before it connects again. */
const RETRY_MS = 2_000;

/** The id that the browser has seen last, from its header; undefined where it is missing or not ours. */
export function lastEventId(request: Request): number | undefined {
  const stated = request.get('last-event-id');
  return stated !== undefined && /^\d{1,15}$/.test(stated) ? Number(stated) : undefined;
}

function frame({ id, kind, data }: StreamEvent): string {
  return `id: ${id}\nevent: ${kind}\ndata: ${JSON.stringify(data)}\n\n`;
}

function drained(response: Response, signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    const done = () => {
      response.off('drain', done);
      signal.removeEventListener('abort', done);
      resolve();
    };
    response.on('drain', done);
    signal.addEventListener('abort', done);
  });
}

/**
 * Writes events as `text/event-stream` until the signal ends it or the events end. A slow reader holds back
 * the reading of events instead of filling the memory.
 */
export async function sendEvents(
  response: Response,
  events: AsyncIterable<StreamEvent>,
  signal: AbortSignal,
): Promise<void> {
  response.status(200).set({
    'Content-Type': 'text/event-stream',
    'Cache-Control': 'no-store',
    // Asks a proxy in between to pass events on at once.
    'X-Accel-Buffering': 'no',
  });
  response.flushHeaders();
  response.write(`retry: ${RETRY_MS}\n\n`);
  const heartbeat = setInterval(() => response.write(': still here\n\n'), HEARTBEAT_MS);
  try {
    for await (const event of events) {
      if (signal.aborted) break;
      if (!response.write(frame(event))) await drained(response, signal);
    }
  } finally {
    clearInterval(heartbeat);
    response.end();
  }
}
