import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, MemoryStore, rateLimit } from 'express-rate-limit';
import { tooManyRequests } from '../problem';

/** What a limit may count by, beside the client's address. */
export interface LimitSubject {
  readonly params: unknown;
  readonly query: unknown;
  readonly body: unknown;
}

/**
 * How often a route may be called. Counts live in this process and for one application; a stop forgets them.
 */
export interface RateLimit {
  /** `address`: one count per client address, checked before anything else. Or a text out of the checked request. */
  readonly by: 'address' | ((subject: LimitSubject) => string);
  readonly limit: number;
  readonly windowMs: number;
  /** Only answers with an error count: a person who signs in rightly is never slowed down. */
  readonly failuresOnly?: boolean;
}

/** The checked parts of a request under way; the limit by account needs them beside Express's own request. */
const subjects = new WeakMap<Request, LimitSubject>();

export function setLimitSubject(request: Request, subject: LimitSubject): void {
  subjects.set(request, subject);
}

/** The middleware of one limit, with a count of its own. */
export function limitMiddleware({ by, limit, windowMs, failuresOnly = false }: RateLimit): RequestHandler {
  const addressOf = (request: Request) => ipKeyGenerator(request.ip ?? 'unknown');
  return rateLimit({
    windowMs,
    limit,
    store: new MemoryStore(),
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    skipSuccessfulRequests: failuresOnly,
    keyGenerator: (request) => {
      if (by === 'address') return addressOf(request);
      const subject = subjects.get(request);
      return subject === undefined ? addressOf(request) : by(subject);
    },
    handler: (_request, _response, next) => next(tooManyRequests(Math.ceil(windowMs / 1000))),
  });
}
