import { join } from 'node:path';
import { afterAll, beforeAll } from 'vitest';
import { type App, createApp } from '../../../server/app';
import { connectDatabase, type Database } from '../../../server/db';
import type { ProductRole } from '../../../server/policies';
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
  product(
    createdBy: TestPerson,
    roles?: readonly (readonly [TestPerson, ProductRole])[],
  ): Promise<string>;
}

/**
 * Gives a test file the application: built and listening before its first test, gone after its last.
 *
 *     const api = useApi();
 *     it('lists letters', async () => {
 *       const administrator = await api().person({ organisationRole: 'administrator' });
 *       expect((await administrator.get('/api/mail')).status).toBe(200);
 *     });
 */
export function useApi(): () => TestApi {
  let api: TestApi | undefined;
  let listening: Listening | undefined;
  const stopping = new AbortController();

  beforeAll(async () => {
    const testDatabase = await createTestDatabase();
    const { log, lines } = memoryLog();
    const database = connectDatabase({ url: testDatabase.url, log });
    const app = createApp({
      http: { origin: undefined, trustedProxies: ['loopback'] },
      ...{ database, log },
      version: '0.0.0-test',
      pages: join(import.meta.dirname, 'no-pages'),
      stopping: stopping.signal,
    });
    listening = await listenLocally(app.express);
    const { address } = listening;
    api = {
      ...{ app, database, testDatabase, address },
      logLines: lines,
      anybody: new HttpClient(address),
      person: (options) => makePerson(database.db, address, options),
      product: (createdBy, roles) => makeProduct(database.db, createdBy, roles),
    };
  });

  afterAll(async () => {
    stopping.abort();
    await listening?.close();
    await api?.database.close();
    await api?.testDatabase.drop();
  });

  return () => {
    if (api === undefined) throw new Error('the application is not there before the first test');
    return api;
  };
}
