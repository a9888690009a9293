import express, { type Express } from 'express';
import type { HttpConfiguration } from '../configuration';
import type { Log } from '../log';
import { type AccessControl, mountRoutes, type Route } from '../routing';
import { answerProblems } from './answer-problems';
import { servePages } from './pages';
import { giveContext } from './request-context';
import { requireSameOrigin } from './same-origin';
import { securityHeaders } from './security-headers';

export interface AssembleOptions<Rule> {
  readonly http: Pick<HttpConfiguration, 'origin' | 'trustedProxies'>;
  readonly log: Log;
  readonly routes: readonly Route<Rule>[];
  readonly access: AccessControl<Rule>;
  /** Folder of the built pages. */
  readonly pages: string;
  /** Aborted when the server stops. */
  readonly stopping: AbortSignal;
}

/** Whether people reach the server by https. */
export function usesHttps({ origin }: Pick<HttpConfiguration, 'origin'>): boolean {
  return origin?.startsWith('https:') === true;
}

/** Puts together what every request passes through: protection first, then the API, then the pages. */
export function assembleApp<Rule>(options: AssembleOptions<Rule>): Express {
  const { http, log, routes, access, pages, stopping } = options;
  const app = express();
  app.disable('x-powered-by');
  app.disable('etag');
  app.set('trust proxy', [...http.trustedProxies]);
  app.use(giveContext(log), securityHeaders({ https: usesHttps(http) }), requireSameOrigin(http.origin));
  app.use('/api', (_request, response, next) => {
    response.set('Cache-Control', 'no-store');
    next();
  });
  app.use('/api', mountRoutes({ routes, access, origin: http.origin, stopping }));
  app.use(servePages(pages));
  app.use(answerProblems);
  return app;
}
