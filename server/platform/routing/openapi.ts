import { z } from 'zod';
import { route, type Route } from './route';

type JsonObject = Record<string, unknown>;

const PROBLEM: JsonObject = {
  type: 'object',
  required: ['type', 'code', 'title', 'status', 'detail', 'requestId'],
  properties: {
    type: { type: 'string' },
    code: { type: 'string', description: 'Stable name of the kind of problem.' },
    title: { type: 'string' },
    status: { type: 'integer' },
    detail: { type: 'string' },
    requestId: { type: 'string' },
    faults: {
      type: 'array',
      description: 'With the codes invalid-request and study-unusable: every fault and where it is.',
      items: {
        type: 'object',
        required: ['path', 'message'],
        properties: { path: { type: 'string' }, message: { type: 'string' } },
      },
    },
  },
};

function jsonSchema(schema: z.ZodType, io: 'input' | 'output'): JsonObject {
  const described: JsonObject = z.toJSONSchema(schema, {
    target: 'draft-2020-12',
    io,
    unrepresentable: 'any',
  });
  // The document as a whole says which version of JSON Schema it uses.
  delete described.$schema;
  return described;
}

/** The parameters of a path or query: one entry for each property of the schema's object. */
function parameters(schema: z.ZodType | undefined, place: 'path' | 'query'): JsonObject[] {
  if (schema === undefined) return [];
  const { properties = {}, required = [] } = jsonSchema(schema, 'input') as {
    properties?: Record<string, JsonObject>;
    required?: string[];
  };
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: place,
    required: place === 'path' || required.includes(name),
    schema: property,
  }));
}

function successOf<Rule>({ answer }: Route<Rule>): JsonObject {
  if (answer.kind === 'events') {
    const kinds = Object.keys(answer.events).join(', ');
    return {
      200: {
        description: `Server-sent events: ${kinds}`,
        content: { 'text/event-stream': { schema: { type: 'string' } } },
      },
    };
  }
  if (answer.schema === undefined) return { [answer.status]: { description: 'Done' } };
  const content = { 'application/json': { schema: jsonSchema(answer.schema, 'output') } };
  return { [answer.status]: { description: 'Done', content } };
}

function operation<Rule>(route: Route<Rule>): JsonObject {
  const body = route.body && {
    requestBody: {
      required: true,
      content: { 'application/json': { schema: jsonSchema(route.body, 'input') } },
    },
  };
  return {
    summary: route.summary,
    tags: [route.path.split('/')[1]],
    parameters: [...parameters(route.params, 'path'), ...parameters(route.query, 'query')],
    ...body,
    responses: { ...successOf(route), default: { $ref: '#/components/responses/problem' } },
  };
}

/** The OpenAPI 3.1 document of the routes. */
export function openApiDocument<Rule>(routes: readonly Route<Rule>[], version: string): JsonObject {
  const paths: Record<string, JsonObject> = {};
  for (const route of routes) {
    const path = `/api${route.path.replace(/:(\w+)/g, '{$1}')}`;
    paths[path] = { ...paths[path], [route.method.toLowerCase()]: operation(route) };
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Tareline', version },
    paths,
    components: {
      schemas: { problem: PROBLEM },
      responses: {
        problem: {
          description: 'A problem as RFC 9457 describes it',
          content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/problem' } } },
        },
      },
    },
  };
}

/** Serves the description of the given routes, itself included. */
export function openApiRoute<Rule>(routes: readonly Route<Rule>[], version: string) {
  let document: JsonObject = {};
  const self = route({
    method: 'GET',
    path: '/openapi.json',
    summary: 'The description of this API',
    policy: { scope: 'public' },
    response: z.record(z.string(), z.unknown()),
    handler: () => Promise.resolve(document),
  });
  document = openApiDocument<unknown>([...routes, self], version);
  return self;
}
