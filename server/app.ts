import type { Express } from 'express';
import { checkRules, createAccess } from './access';
import { type Database, type EventFeed, readSchemaState } from './db';
import { auditRoutes } from './features/audit';
import { authRoutes, createIdentify, createPasswords } from './features/auth';
import { mailRoutes } from './features/mail';
import { peopleRoutes } from './features/people';
import { productRoutes } from './features/products';
import { previewRoutes, runsRoutes, summariesOf as summariesOfRuns } from './features/runs';
import { scenarioRoutes, type SummariesOf } from './features/scenarios';
import { variantRoutes } from './features/variants';
import type { Engine } from './jobs';
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
  /** What happens to runs, whoever computes them. */
  readonly events: EventFeed;
  /** For what is computed while somebody waits. */
  readonly engine: Engine;
  readonly log: Log;
  /** The program's version, as package.json states it. */
  readonly version: string;
  /** Folder of the built pages. */
  readonly pages: string;
  /** Aborted when the server stops. */
  readonly stopping: AbortSignal;
  /** The present moment; another one in tests of what expires. */
  readonly clock?: () => Date;
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
export function createApp(dependencies: AppDependencies): App {
  const { http, database, events, engine, log, version, pages, stopping } = dependencies;
  const { clock = () => new Date() } = dependencies;
  const { db } = database;
  const cookie = sessionCookie({ https: usesHttps(http) });
  const passwords = createPasswords();

  const summariesOf: SummariesOf = (revisionIds) => summariesOfRuns(db, revisionIds);

  const features: Route<AccessRule>[] = [
    ...healthRoutes({ version, findObstacles: () => findObstacles(database) }),
    ...authRoutes({ db, cookie, passwords, clock }),
    ...peopleRoutes({ db, cookie, passwords, clock }),
    ...auditRoutes({ db }),
    ...mailRoutes({ db }),
    ...productRoutes({ db }),
    ...variantRoutes({ db, summariesOf }),
    ...scenarioRoutes({ db, summariesOf }),
    ...runsRoutes({ db, engine, events }),
    ...previewRoutes({ db, engine }),
  ];
  const routes = [...features, openApiRoute(features, version)];
  checkRules(routes);
  const access = createAccess({ db, identify: createIdentify({ db, cookie, clock }) });
  return { express: assembleApp({ http, log, routes, access, pages, stopping }), routes };
}
