import { setMaxListeners } from 'node:events';
import { type Request, type RequestHandler, type Response, Router } from 'express';
import type { z } from 'zod';
import { methodNotAllowed, notFound } from '../problem';
import { requestContext } from '../http/request-context';
import type { AccessControl } from './access-control';
import { lastEventId, sendEvents } from './event-stream';
import { readJsonBody } from './json-body';
import { limitMiddleware, setLimitSubject } from './rate-limit';
import { JsonText, Reply, type ReplyOptions } from './reply';
import type { CheckedCall, Route } from './route';
import { readParts } from './validate';

export interface MountOptions<Rule> {
  readonly routes: readonly Route<Rule>[];
  readonly access: AccessControl<Rule>;
  /** The address that people use; undefined on loopback, where it is the one that the request names. */
  readonly origin: string | undefined;
  /** Aborted when the server stops: ends streams that would keep it from stopping. */
  readonly stopping: AbortSignal;
}

/** Runs a middleware as a step of a handler; it may refuse by an error, but never answer by itself. */
function step(middleware: RequestHandler, request: Request, response: Response): Promise<void> {
  return new Promise((resolve, reject) => {
    const next = (error?: unknown) => {
      if (error === undefined) resolve();
      else reject(error instanceof Error ? error : new Error('a middleware failed'));
    };
    void middleware(request, response, next);
  });
}

function signalOf(response: Response, stopping: AbortSignal): AbortSignal {
  const over = new AbortController();
  const end = () => {
    stopping.removeEventListener('abort', end);
    over.abort();
  };
  stopping.addEventListener('abort', end);
  response.on('close', end);
  if (stopping.aborted) end();
  return over.signal;
}

function applyOptions(response: Response, { headers = {}, cookies = [] }: ReplyOptions): void {
  response.set(headers);
  for (const cookie of cookies) response.append('Set-Cookie', cookie);
}

function sendJson(
  response: Response,
  status: number,
  schema: z.ZodType | undefined,
  returned: unknown,
): void {
  response.status(status);
  if (returned instanceof JsonText) {
    applyOptions(response, returned.options);
    response.type('application/json').send(returned.text);
    return;
  }
  const body: unknown = returned instanceof Reply ? returned.body : returned;
  // Before the headers: a body that breaks its own promise is a fault of the server, and answered as one.
  const parsed = schema?.parse(body);
  if (returned instanceof Reply) applyOptions(response, returned);
  if (schema === undefined) response.end();
  else response.json(parsed);
}

function handlerOf<Rule>(
  route: Route<Rule>,
  { access, origin, stopping }: Pick<MountOptions<Rule>, 'access' | 'origin' | 'stopping'>,
): RequestHandler {
  const byAddress = route.limits.filter(({ by }) => by === 'address').map(limitMiddleware);
  const byContent = route.limits.filter(({ by }) => by !== 'address').map(limitMiddleware);

  return async (request, response) => {
    for (const limit of byAddress) await step(limit, request, response);

    const pathParams = request.params as Record<string, string>;
    const params = route.params?.safeParse(pathParams);
    if (params?.success === false) throw notFound();

    const caller = await access.identify(request.headers);
    const product = await access.check(route.policy, caller, pathParams);

    const sent = route.body === undefined ? undefined : await readJsonBody(request, response);
    const { query, body } = readParts({
      query: { schema: route.query, value: request.query },
      body: { schema: route.body, value: sent },
    });
    setLimitSubject(request, { params: params?.data, query, body });
    for (const limit of byContent) await step(limit, request, response);

    const { requestId, log } = requestContext(response);
    const call: CheckedCall = {
      ...{ params: params?.data, query, body, caller, product, requestId, log },
      address: request.ip ?? '',
      userAgent: request.get('user-agent') ?? '',
      origin: origin ?? `http://${request.get('host') ?? ''}`,
      signal: signalOf(response, stopping),
    };
    const { answer } = route;
    if (answer.kind === 'events') {
      await sendEvents(response, answer.open(call, lastEventId(request)), call.signal);
    } else sendJson(response, answer.status, answer.schema, await answer.handle(call));
  };
}

/** A route whose path and parameters do not fit is a mistake of whoever wrote it; found at the first start. */
function checkRoutes<Rule>(routes: readonly Route<Rule>[]): void {
  const seen = new Set<string>();
  for (const { method, path } of routes) {
    const key = `${method} ${path.replace(/:\w+/g, ':')}`;
    if (seen.has(key)) throw new Error(`two routes answer ${method} ${path}`);
    seen.add(key);
  }
}

/** The routes of the API, to be mounted under /api; anything else there is answered 404 or 405. */
export function mountRoutes<Rule>({ routes, ...options }: MountOptions<Rule>): Router {
  // One listener a request under way: many are no leak.
  setMaxListeners(0, options.stopping);
  checkRoutes(routes);
  const router = Router({ caseSensitive: true, strict: true });
  const methods = new Map<string, string[]>();
  for (const route of routes) {
    const method = route.method.toLowerCase() as Lowercase<typeof route.method>;
    router[method](route.path, handlerOf(route, options));
    const shape = route.path.replace(/:\w+/g, ':x');
    methods.set(shape, [...(methods.get(shape) ?? []), route.method]);
  }
  return withRefusals(router, methods);
}

function withRefusals(router: Router, methods: ReadonlyMap<string, string[]>): Router {
  for (const [shape, allowed] of methods) {
    let parameter = 0;
    router.all(
      shape.replace(/:x/g, () => `:p${parameter++}`),
      () => {
        throw methodNotAllowed(allowed);
      },
    );
  }
  router.use(() => {
    throw notFound();
  });
  return router;
}
