import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { conflict, defineProblem } from '../../../server/platform/problem';
import { JsonText, openApiRoute, Reply, route } from '../../../server/platform/routing';
import { useRoutes } from '../support/test-routes';

const policy = { scope: 'public' } as const;
const tooHeavy = defineProblem({ code: 'too-heavy', status: 422, title: 'Too heavy' });

const routes = [
  route({
    method: 'POST',
    path: '/carts/:cartId/loads',
    summary: 'Puts a load on a cart',
    policy,
    params: z.object({ cartId: z.uuid() }),
    query: z.object({ dry: z.stringbool().default(false), limit: z.coerce.number().max(9).optional() }),
    body: z.object({ name: z.string().min(1), weights: z.array(z.number().positive()) }),
    response: z.object({ cart: z.uuid(), dry: z.boolean(), total: z.number() }),
    status: 201,
    handler: ({ params, query, body }) =>
      Promise.resolve({
        cart: params.cartId,
        dry: query.dry,
        total: body.weights.reduce((sum, weight) => sum + weight, 0),
        passwordHash: 'must not leave',
      }),
  }),
  route({
    method: 'GET',
    path: '/fails/:how',
    summary: 'Fails',
    policy,
    params: z.object({ how: z.enum(['problem', 'conflict', 'error', 'answer']) }),
    response: z.object({ count: z.number() }),
    handler: ({ params: { how } }) => {
      if (how === 'problem') throw tooHeavy('The cart carries 480 kg.');
      if (how === 'conflict') throw conflict(undefined, { mine: 3, theirs: 4 });
      if (how === 'error') throw new Error('the password of the database is 1234');
      return Promise.resolve({ count: Number.NaN });
    },
  }),
  route({
    method: 'GET',
    path: '/stored',
    summary: 'A text that is JSON already',
    policy,
    response: z.object({ value: z.number() }),
    handler: () => Promise.resolve(new JsonText('{"value":1.50}', { headers: { 'X-Stored': 'yes' } })),
  }),
  route({
    method: 'DELETE',
    path: '/stored',
    summary: 'Answers nothing but a cookie',
    policy,
    handler: () => Promise.resolve(new Reply(undefined, { cookies: ['a=1', 'b=2'] })),
  }),
];

const server = useRoutes([...routes, openApiRoute(routes, '9.9.9')]);
const cart = '7f8f1d6e-6d7e-4f3a-9c55-0f6b9a2d1e11';
const loads = `/api/carts/${cart}/loads`;
const load = { name: 'pallet', weights: [40, 2.5] };

describe('a route', () => {
  it('gives the handler what was sent, read by its schemas', async () => {
    const answer = await server().client.post(`${loads}?dry=true`, load);
    expect(answer.status).toBe(201);
    expect(answer.body).toEqual({ cart, dry: true, total: 42.5 });
    expect(answer.headers['cache-control']).toBe('no-store');
  });

  it('lets nothing out that its response does not state', async () => {
    expect((await server().client.post(loads, load)).text).not.toContain('must not leave');
  });

  it('answers every fault of a request at once, each with its path', async () => {
    const answer = await server().client.post(`${loads}?limit=12`, { name: '', weights: [1, -2] });
    expect(answer.status).toBe(400);
    expect(answer.headers['content-type']).toBe('application/problem+json; charset=utf-8');
    const problem = answer.read(
      z.object({ code: z.string(), faults: z.array(z.object({ path: z.string() })) }),
    );
    expect(problem.code).toBe('invalid-request');
    expect(problem.faults.map(({ path }) => path)).toEqual(['query.limit', 'name', 'weights[1]']);
  });

  it('answers 404 for a parameter that cannot name anything', async () => {
    const answer = await server().client.post('/api/carts/12/loads', load);
    expect([answer.status, answer.body]).toMatchObject([404, { code: 'not-found' }]);
  });

  it.each([
    ['no body', {}, 400, 'invalid-request'],
    ['a body that is no JSON', { text: '{"name":' }, 400, 'malformed-json'],
    [
      'a body of another kind',
      { text: 'a=1', headers: { 'content-type': 'text/plain' } },
      415,
      'unsupported-media-type',
    ],
    ['a body over 1 MiB', { text: JSON.stringify('x'.repeat(1024 * 1024)) }, 413, 'body-too-large'],
  ])('answers %s with a problem', async (_what, options, status, code) => {
    const answer = await server().client.send('POST', loads, options);
    expect([answer.status, answer.body]).toMatchObject([status, { code, status }]);
  });

  it('takes a body of just under 1 MiB', async () => {
    const name = 'x'.repeat(1024 * 1024 - 40);
    expect((await server().client.post(loads, { name, weights: [] })).status).toBe(201);
  });

  it('sends a stored text as it is, with the headers of the reply', async () => {
    const answer = await server().client.get('/api/stored');
    expect(answer.text).toBe('{"value":1.50}');
    expect(answer.headers).toMatchObject({ 'x-stored': 'yes', 'content-type': /json/ });
  });

  it('answers 204 and its cookies where it states no response', async () => {
    const answer = await server().client.delete('/api/stored');
    expect([answer.status, answer.text]).toEqual([204, '']);
    expect(answer.headers['set-cookie']).toEqual(['a=1', 'b=2']);
  });
});

describe('a failure', () => {
  it('of a known kind is told with its code, detail and extensions', async () => {
    const problem = await server().client.get('/api/fails/problem');
    expect(problem.body).toEqual({
      type: '/problems/too-heavy',
      code: 'too-heavy',
      title: 'Too heavy',
      status: 422,
      detail: 'The cart carries 480 kg.',
      requestId: problem.headers['x-request-id'],
    });
    const changed = await server().client.get('/api/fails/conflict');
    expect([changed.status, changed.body]).toMatchObject([409, { mine: 3, theirs: 4 }]);
  });

  it('of an unknown kind is logged, and answered without its cause', async () => {
    const answer = await server().client.get('/api/fails/error', {
      headers: { 'x-request-id': 'unknown-kind' },
    });
    expect([answer.status, answer.body]).toMatchObject([500, { code: 'internal-error' }]);
    expect(answer.text).not.toContain('1234');
    expect(server().logLines.find((line) => line.includes('"requestId":"unknown-kind"'))).toContain('1234');
  });

  it('is also an answer that breaks its own schema', async () => {
    expect((await server().client.get('/api/fails/answer')).status).toBe(500);
  });
});

describe('the API', () => {
  it('answers unknown addresses and methods with problems, not with a page', async () => {
    const missing = await server().client.get('/api/nothing', { headers: { accept: 'text/html' } });
    expect([missing.status, missing.body]).toMatchObject([404, { code: 'not-found' }]);
    const refused = await server().client.patch('/api/stored', {});
    expect([refused.status, refused.headers.allow]).toEqual([405, 'GET, DELETE']);
  });

  it('answers an address that cannot be decoded', async () => {
    expect((await server().client.get('/api/fails/%E0%A4%A')).status).toBe(404);
  });

  it('gives every request an id and keeps one that fits', async () => {
    const given = await server().client.get('/api/stored');
    expect(given.headers['x-request-id']).toMatch(/^[\w-]{36}$/);
    const kept = await server().client.get('/api/stored', { headers: { 'x-request-id': 'from-proxy-1' } });
    expect(kept.headers['x-request-id']).toBe('from-proxy-1');
    const refused = await server().client.get('/api/stored', { headers: { 'x-request-id': '"}{"' } });
    expect(refused.headers['x-request-id']).toMatch(/^[\w-]{36}$/);
  });

  it('logs neither query nor headers nor bodies', async () => {
    await server().client.post(
      `${loads}?dry=sesame-1`,
      { ...load, name: 'sesame-2' },
      { headers: { cookie: 'sesame-3' } },
    );
    expect(server().logLines.join('')).not.toContain('sesame');
  });

  it('describes itself by OpenAPI 3.1', async () => {
    const { body } = await server().client.get('/api/openapi.json');
    expect(body).toMatchObject({
      openapi: '3.1.0',
      info: { version: '9.9.9' },
      paths: {
        '/api/carts/{cartId}/loads': {
          post: {
            parameters: [
              { name: 'cartId', in: 'path', required: true },
              { name: 'dry', in: 'query', required: false },
              { name: 'limit', in: 'query', required: false, schema: { maximum: 9 } },
            ],
            requestBody: {
              content: { 'application/json': { schema: { required: ['name', 'weights'] } } },
            },
            responses: {
              201: { content: { 'application/json': { schema: { required: ['cart', 'dry', 'total'] } } } },
              default: { $ref: '#/components/responses/problem' },
            },
          },
        },
        '/api/openapi.json': { get: {} },
      },
    });
  });
});
