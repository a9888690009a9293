import { join } from 'node:path';
import { afterAll, beforeAll } from 'vitest';
import { assembleApp } from '../../../server/platform/http/assemble';
import type { AccessControl, Route } from '../../../server/platform/routing';
import { HttpClient } from './http-client';
import { type Listening, listenLocally } from './listening';
import { type MemoryLog, memoryLog } from './memory-log';

interface PublicRule {
  readonly scope: 'public';
}

/** Lets everybody call everything: what is tried here is the platform, not the policies. */
const openToAll: AccessControl<PublicRule> = {
  identify: () => Promise.resolve(undefined),
  check: () => Promise.resolve(undefined),
};

export interface TestRoutes {
  readonly client: HttpClient;
  readonly logLines: readonly string[];
  /** Aborting it is what a stop of the server begins with. */
  readonly stopping: AbortController;
}

export interface TestRoutesOptions {
  readonly origin?: string;
  readonly trustedProxies?: readonly string[];
  /** Folder of built pages. */
  readonly pages?: string;
}

/** Gives a test file the platform with routes of the test's own. */
export function useRoutes(
  routes: readonly Route<PublicRule>[],
  { origin, trustedProxies = [], pages = join(import.meta.dirname, 'no-pages') }: TestRoutesOptions = {},
): () => TestRoutes {
  const stopping = new AbortController();
  const { log, lines }: MemoryLog = memoryLog();
  let listening: Listening | undefined;

  beforeAll(async () => {
    const app = assembleApp({
      http: { origin, trustedProxies },
      ...{ log, routes, pages },
      access: openToAll,
      stopping: stopping.signal,
    });
    listening = await listenLocally(app);
  });
  afterAll(() => listening?.close());

  return () => {
    if (listening === undefined) throw new Error('nothing listens before the first test');
    return { client: new HttpClient(listening.address), logLines: lines, stopping };
  };
}
