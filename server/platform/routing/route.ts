import type { z } from 'zod';
import type { Log } from '../log';
import type { Caller, ProductAccess } from './caller';
import type { RateLimit } from './rate-limit';
import type { JsonText, Reply } from './reply';
import type { StreamEvent } from './stream-event';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

type Output<Schema> = Schema extends z.ZodType ? z.output<Schema> : undefined;
type Input<Schema> = Schema extends z.ZodType ? z.input<Schema> : undefined;

/** A rule whose scope is "public" lets through requests without a session; every other rule has a caller. */
type CallerUnder<Rule> = Rule extends { readonly scope: 'public' } ? Caller | undefined : Caller;

/** A request as a handler gets it: checked, typed, allowed. */
export interface Call<Rule, Params, Query, Body> {
  readonly params: Output<Params>;
  readonly query: Output<Query>;
  readonly body: Output<Body>;
  readonly caller: CallerUnder<Rule>;
  /** Of a rule about a product, else undefined. */
  readonly product: ProductAccess | undefined;
  readonly requestId: string;
  /** Of the client, as far as the trusted proxies tell. */
  readonly address: string;
  readonly userAgent: string;
  /** The address of the server as the client uses it, for links: `https://tareline.example`. */
  readonly origin: string;
  /** Aborted when the client has gone, or the server is stopping. */
  readonly signal: AbortSignal;
  readonly log: Log;
}

interface RouteCommon<Rule, Params, Query> {
  /** Under /api, parameters as `/products/:productId`. */
  readonly path: `/${string}`;
  /** One line of the API's description. */
  readonly summary: string;
  /** Who may call it; checked before query and body are read. */
  readonly policy: Rule;
  /** An object of strings; one that does not fit is answered 404: such a thing cannot exist. */
  readonly params?: Params;
  /** An object; values arrive as strings, so numbers need z.coerce. */
  readonly query?: Query;
  readonly limits?: readonly RateLimit[];
}

export interface RouteDefinition<Rule, Params, Query, Body, Response> extends RouteCommon<
  Rule,
  Params,
  Query
> {
  readonly method: Method;
  readonly body?: Body;
  /** 200 where left out, or 204 where there is no response. */
  readonly status?: 200 | 201 | 202;
  /**
   * The body of a successful answer. What the handler returns is read through it, so that nothing leaves which
   * is not stated here.
   */
  readonly response?: Response;
  readonly handler: (
    call: Call<Rule, Params, Query, Body>,
  ) => Promise<Input<Response> | Reply<Input<Response>> | JsonText>;
}

export interface StreamDefinition<Rule, Params, Query> extends RouteCommon<Rule, Params, Query> {
  /** The kinds of events, each with the schema of its data. */
  readonly events: Readonly<Record<string, z.ZodType>>;
  /**
   * @param after the id of the last event that the client has seen, undefined on its first connection
   * @returns events from there on, without end; ended by the call's signal
   */
  readonly open: (
    call: Call<Rule, Params, Query, undefined>,
    after: number | undefined,
  ) => AsyncIterable<StreamEvent>;
}

/** A call as the registry hands it to a route: checked, its types known to the route alone. */
export interface CheckedCall {
  readonly params: unknown;
  readonly query: unknown;
  readonly body: unknown;
  readonly caller: Caller | undefined;
  readonly product: ProductAccess | undefined;
  readonly requestId: string;
  readonly address: string;
  readonly userAgent: string;
  readonly origin: string;
  readonly signal: AbortSignal;
  readonly log: Log;
}

/** A route in the registry. */
export interface Route<Rule> {
  readonly method: Method;
  readonly path: `/${string}`;
  readonly summary: string;
  readonly policy: Rule;
  readonly limits: readonly RateLimit[];
  readonly params: z.ZodType | undefined;
  readonly query: z.ZodType | undefined;
  readonly body: z.ZodType | undefined;
  readonly answer:
    | {
        readonly kind: 'json';
        readonly status: number;
        readonly schema: z.ZodType | undefined;
        readonly handle: (call: CheckedCall) => Promise<unknown>;
      }
    | {
        readonly kind: 'events';
        readonly events: Readonly<Record<string, z.ZodType>>;
        readonly open: (call: CheckedCall, after: number | undefined) => AsyncIterable<StreamEvent>;
      };
}

/**
 * Describes one route: what it takes, who may call it, what it answers. Types of the handler come from the
 * schemas, checks at run time and the OpenAPI document too.
 */
export function route<
  const Rule,
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
  Response extends z.ZodType | undefined = undefined,
>(definition: RouteDefinition<Rule, Params, Query, Body, Response>): Route<Rule> {
  const { method, path, summary, policy, limits = [], params, query, body, response, handler } = definition;
  return {
    ...{ method, path, summary, policy, limits, params, query, body },
    answer: {
      kind: 'json',
      status: response === undefined ? 204 : (definition.status ?? 200),
      schema: response,
      // The registry calls a route only after reading the request by the schemas that these types come from.
      handle: (call) => handler(call as Call<Rule, Params, Query, Body>),
    },
  };
}

/** Describes a stream of server-sent events. */
export function streamRoute<
  const Rule,
  Params extends z.ZodType | undefined = undefined,
  Query extends z.ZodType | undefined = undefined,
>(definition: StreamDefinition<Rule, Params, Query>): Route<Rule> {
  const { path, summary, policy, limits = [], params, query, events, open } = definition;
  return {
    ...{ method: 'GET', path, summary, policy, limits, params, query, body: undefined },
    answer: {
      kind: 'events',
      events,
      open: (call, after) => open(call as Call<Rule, Params, Query, undefined>, after),
    },
  };
}
