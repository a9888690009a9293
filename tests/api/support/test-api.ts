import { join } from 'node:path';
import { afterAll, beforeAll } from 'vitest';
import { type App, createApp } from '../../../server/app';
import { connectDatabase, createEventFeed, type Database, listen } from '../../../server/db';
import { createEngine } from '../../../server/jobs';
import type { ProductRole } from '../../../server/policies';
import { startWork } from '../../../server/work';
import { HttpClient } from './http-client';
import { type Listening, listenLocally } from './listening';
import { memoryLog } from './memory-log';
import { createTestDatabase, type TestDatabase } from './test-database';
import { makePerson, makeProduct, type PersonOptions, type TestPerson } from './test-people';

/** The whole application on a database of its own. */
export interface TestApi {
  readonly app: App;
  readonly database: Database;
  readonly testDatabase: TestDatabase;
  readonly address: string;
  /** Lines of the log so far. */
  readonly logLines: readonly string[];
  /** Somebody without a session. */
  readonly anybody: HttpClient;
  person(options?: PersonOptions): Promise<TestPerson>;
  product(createdBy: TestPerson, roles?: readonly (readonly [TestPerson, ProductRole])[]): Promise<string>;
}

export interface UseApiOptions {
  readonly clock?: () => Date;
  readonly works?: boolean;
}

/**
 * Gives a test file the application: built and listening before its first test, gone after its last.
 *
 *     const api = useApi();
 *     it('lists letters', async () => {
 *       const administrator = await api().person({ organisationRole: 'administrator' });
 *       expect((await administrator.get('/api/mail')).status).toBe(200);
 *     });
 *
 * @param clock of the application, for tests of what expires
 * @param works whether somebody works on the queue
 */
export function useApi({ clock, works = false }: UseApiOptions = {}): () => TestApi {
  let api: TestApi | undefined;
  const stopping = new AbortController();
  /** How to end what is running, the last one first. */
  const endings: (() => Promise<void>)[] = [];

  beforeAll(async () => {
    const testDatabase = await createTestDatabase();
    endings.unshift(() => testDatabase.drop());
    const { log, lines } = memoryLog();
    const { url } = testDatabase;
    const database = connectDatabase({ url, log });
    endings.unshift(() => database.close());
    const listener = await listen({ url, channel: 'run_events', log });
    endings.unshift(() => listener.close());
    const engine = createEngine({ threads: 1, log });
    endings.unshift(() => engine.close());
    if (works) {
      const work = await startWork({ database, log, threads: 1 });
      endings.unshift(() => work.stop());
    }
    const app = createApp({
      http: { origin: undefined, trustedProxies: ['loopback'] },
      ...{ database, engine, log },
      events: createEventFeed(database.db, listener),
      version: '0.0.0-test',
      pages: join(import.meta.dirname, 'no-pages'),
      stopping: stopping.signal,
      clock,
    });
    const listening: Listening = await listenLocally(app.express);
    endings.unshift(() => listening.close());
    const { address } = listening;
    api = {
      ...{ app, database, testDatabase, address },
      logLines: lines,
      anybody: new HttpClient(address),
      person: (options) => makePerson(database.db, address, options, clock?.()),
      product: (createdBy, roles) => makeProduct(database.db, createdBy, roles),
    };
  });

  afterAll(async () => {
    stopping.abort();
    for (const end of endings) await end();
  });

  return () => {
    if (api === undefined) throw new Error('the application is not there before the first test');
    return api;
  };
}
