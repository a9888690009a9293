import { readFileSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import { isIPv6, type AddressInfo } from 'node:net';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { createApp } from './app';
import { connectDatabase, createEventFeed, listen as listenToDatabase, requireCurrentSchema } from './db';
import { startMailDelivery } from './features/mail';
import { createEngine } from './jobs';
import type { Configuration } from './platform/configuration';
import type { Log } from './platform/log';
import { smtpTransport } from './platform/mail/smtp-transport';
import { packageRoot } from './platform/package-root';
import { startWork } from './work';

/** How long requests under way may take when the server stops. */
const PATIENCE_MS = 10_000;

export interface ServeOptions {
  readonly configuration: Configuration;
  /** The application's role. */
  readonly databaseUrl: string;
  readonly log: Log;
  /** Whether this process also works on the queue, as it does unless stated; runs need somebody who does. */
  readonly works?: boolean;
}

export interface RunningServer {
  /** Where people reach it. */
  readonly address: string;
  /** Stops accepting, lets requests under way finish, closes the database's connections. */
  stop(): Promise<void>;
}

/** The port is taken, or cannot be had; the message is all that the person needs. */
export class ListenError extends Error {
  override readonly name = 'ListenError';
}

function listenFault(error: unknown, host: string, port: number): unknown {
  if (!(error instanceof Error) || !('code' in error)) return error;
  if (error.code === 'EADDRINUSE') {
    const another = port < 65535 ? port + 1 : port - 1;
    return new ListenError(
      `port ${port} on ${host} is taken; stop what uses it, or choose another port: PORT=${another} npm start`,
    );
  }
  if (error.code === 'EACCES') {
    return new ListenError(`port ${port} needs more rights; choose one from 1024 on: PORT=4300 npm start`);
  }
  if (error.code === 'EADDRNOTAVAIL' || error.code === 'ENOTFOUND') {
    return new ListenError(`this machine has no address ${host}; set HOST to one of its own`);
  }
  return error;
}

/** @throws ListenError where the address cannot be had */
function listen(server: Server, host: string, port: number): Promise<AddressInfo> {
  return new Promise((resolve, reject) => {
    server.once('error', (error) => {
      const fault = listenFault(error, host, port);
      reject(fault instanceof Error ? fault : error);
    });
    server.listen(port, host, () => {
      server.removeAllListeners('error');
      const address = server.address();
      if (address === null || typeof address === 'string') reject(new Error('the server has no port'));
      else resolve(address);
    });
  });
}

function close(server: Server): Promise<void> {
  return new Promise((resolve) => {
    const hurry = setTimeout(() => server.closeAllConnections(), PATIENCE_MS);
    server.close(() => {
      clearTimeout(hurry);
      resolve();
    });
    server.closeIdleConnections();
  });
}

/**
 * Tells at once whether an address can be had, before anything else is set going.
 *
 * @throws ListenError
 */
export async function requireFreeAddress({ host, port }: { host: string; port: number }): Promise<void> {
  const probe = createServer();
  await listen(probe, host, port);
  await close(probe);
}

function programVersion(): string {
  const content = JSON.parse(readFileSync(join(packageRoot, 'package.json'), 'utf8')) as { version: string };
  return content.version;
}

/**
 * Opens the server.
 *
 * @throws ListenError where the address cannot be had
 * @throws SchemaMismatchError where the database is not up to date
 */
export async function serve(options: ServeOptions): Promise<RunningServer> {
  const { configuration, databaseUrl, log, works = true } = options;
  const { http, mail } = configuration;
  const stopping = new AbortController();
  /** How to end what is running, the last one first. */
  const endings: (() => Promise<void>)[] = [];
  const stop = async () => {
    stopping.abort();
    for (const end of endings) {
      // What cannot be ended properly keeps nothing else from it.
      await end().catch((error: unknown) => log.warn({ error }, 'a part of the server did not end in order'));
    }
  };
  try {
    const database = connectDatabase({ url: databaseUrl, log });
    endings.unshift(() => database.close());
    await requireCurrentSchema(database.pool);
    const listener = await listenToDatabase({ url: databaseUrl, channel: 'run_events', log });
    endings.unshift(() => listener.close());
    const engine = createEngine({ threads: Math.max(2, availableParallelism() - 1), ready: 1, log });
    endings.unshift(() => engine.close());
    if (works) {
      const work = await startWork({ database, log });
      endings.unshift(() => work.stop());
    }
    const app = createApp({
      ...{ http, database, engine, log },
      events: createEventFeed(database.db, listener),
      version: programVersion(),
      pages: join(packageRoot, 'dist', 'web'),
      stopping: stopping.signal,
    });
    if (mail !== undefined) {
      const delivery = startMailDelivery({ db: database.db, transport: smtpTransport(mail), log });
      endings.unshift(() => delivery.stop());
    }
    const server = createServer(app.express);
    const { port } = await listen(server, http.host, http.port);
    endings.unshift(() => close(server));
    const host = isIPv6(http.host) ? `[${http.host}]` : http.host;
    return { address: http.origin ?? `http://${host}:${port}`, stop };
  } catch (error) {
    await stop();
    throw error;
  }
}
