import { randomUUID } from 'node:crypto';
import type { RequestHandler, Response } from 'express';
import type { Log } from '../log';
import { withoutTokens } from '../opaque-token';

/** What belongs to one request and is no part of it. */
export interface RequestContext {
  readonly requestId: string;
  readonly log: Log;
}

const contexts = new WeakMap<Response, RequestContext>();

/** An id that a proxy gave is kept, so that both logs speak of the same request. */
const ACCEPTED_ID = /^[\w-]{8,64}$/;

/** @throws Error for a response that did not pass the middleware */
export function requestContext(response: Response): RequestContext {
  const context = contexts.get(response);
  if (context === undefined) throw new Error('the request has no context');
  return context;
}

/**
 * Gives every request an id, told in X-Request-Id, and writes one line when it is answered. Neither query nor
 * headers nor bodies are logged: they may hold what is secret, and a token in the path is left out.
 */
export function giveContext(log: Log): RequestHandler {
  return (request, response, next) => {
    const stated = request.get('x-request-id');
    const requestId = stated !== undefined && ACCEPTED_ID.test(stated) ? stated : randomUUID();
    const requestLog = log.child({ requestId });
    contexts.set(response, { requestId, log: requestLog });
    response.set('X-Request-Id', requestId);
    const started = performance.now();
    const { method } = request;
    const path = withoutTokens(request.originalUrl.split('?', 1)[0]);
    response.on('close', () => {
      const milliseconds = Math.round(performance.now() - started);
      const status = response.headersSent ? response.statusCode : 'none';
      requestLog.info({ method, path, status, milliseconds }, 'request');
    });
    next();
  };
}
