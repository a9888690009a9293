import type { Express } from 'express';
import { checkRules, createAccess } from './access';
import { type Database, readSchemaState } from './db';
import { createIdentify } from './features/auth';
import { mailRoutes } from './features/mail';
import type { HttpConfiguration } from './platform/configuration';
import { healthRoutes } from './platform/health';
import { assembleApp, usesHttps } from './platform/http/assemble';
import { sessionCookie } from './platform/http/session-cookie';
import type { Log } from './platform/log';
import { openApiRoute, type Route } from './platform/routing';
import type { AccessRule } from './policies';

export interface AppDependencies {
  readonly http: Pick<HttpConfiguration, 'origin' | 'trustedProxies'>;
  readonly database: Database;
  readonly log: Log;
  /** The program's version, as package.json states it. */
  readonly version: string;
  /** Folder of the built pages. */
  readonly pages: string;
  /** Aborted when the server stops. */
  readonly stopping: AbortSignal;
}

export interface App {
  readonly express: Express;
  /** Every route of the API, for tests that walk all of them. */
  readonly routes: readonly Route<AccessRule>[];
}

/** What keeps the server from working, in words. */
async function findObstacles({ pool }: Database): Promise<string[]> {
  try {
    const state = await readSchemaState(pool);
    return state === 'current' ? [] : ['the database has the schema of another version'];
  } catch {
    return ['the database cannot be reached'];
  }
}

/** Builds the application: where features, policies and the platform meet. Opens no socket. */
export function createApp({ http, database, log, version, pages, stopping }: AppDependencies): App {
  const { db } = database;
  const cookie = sessionCookie({ https: usesHttps(http) });

  const features: Route<AccessRule>[] = [
    ...healthRoutes({ version, findObstacles: () => findObstacles(database) }),
    ...mailRoutes({ db }),
  ];
  const routes = [...features, openApiRoute(features, version)];
  checkRules(routes);
  const access = createAccess({ db, identify: createIdentify({ db, cookie }) });
  return { express: assembleApp({ http, log, routes, access, pages, stopping }), routes };
}
