import { Client, escapeIdentifier } from 'pg';
import type { Log } from '../platform/log';

export interface ListenerOptions {
  readonly url: string;
  readonly channel: string;
  readonly log: Log;
  /** Pause before a broken connection is made anew. */
  readonly reconnectMs?: number;
}

/** Wakes whoever waits for a notification of the database. */
export interface Listener {
  /**
   * The next notification. Ask for it before looking at what it tells of, wait for it afterwards: then none is
   * missed in between. Also ends when the connection was made anew, since then one may have been missed.
   */
  next(): Promise<void>;
  close(): Promise<void>;
}

const RECONNECT_MS = 1_000;

interface Wake {
  readonly promise: Promise<void>;
  readonly resolve: () => void;
}

function newWake(): Wake {
  let resolve = () => {};
  const promise = new Promise<void>((settle) => {
    resolve = settle;
  });
  return { promise, resolve };
}

/**
 * Listens on one channel of the database, on a connection of its own, made anew whenever it breaks.
 *
 * @throws Error where the first connection cannot be made
 */
export async function listen({
  url,
  channel,
  log,
  reconnectMs = RECONNECT_MS,
}: ListenerOptions): Promise<Listener> {
  let wake = newWake();
  let closed = false;
  let client: Client | undefined;
  let timer: NodeJS.Timeout | undefined;

  const announce = () => {
    const current = wake;
    wake = newWake();
    current.resolve();
  };
  const connect = async () => {
    const fresh = new Client({ connectionString: url, application_name: 'tareline events', keepAlive: true });
    fresh.on('notification', announce);
    fresh.on('error', (error) => log.warn({ error }, 'the connection for notifications broke'));
    fresh.on('end', () => {
      if (fresh === client) reconnectLater();
    });
    await fresh.connect();
    await fresh.query(`listen ${escapeIdentifier(channel)}`);
    client = fresh;
    if (closed) await fresh.end();
  };
  const reconnectLater = () => {
    client = undefined;
    if (closed) return;
    timer = setTimeout(() => {
      connect().then(announce, (error: unknown) => {
        log.warn({ error }, 'no connection for notifications');
        reconnectLater();
      });
    }, reconnectMs);
  };

  await connect();
  return {
    next: () => wake.promise,
    close: async () => {
      closed = true;
      clearTimeout(timer);
      const open = client;
      client = undefined;
      await open?.end();
    },
  };
}
