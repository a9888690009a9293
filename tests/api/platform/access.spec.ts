import { sql } from 'drizzle-orm';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { checkRules, createAccess } from '../../../server/access';
import { people, sessions } from '../../../server/db/schema';
import { createIdentify } from '../../../server/features/auth';
import { assembleApp } from '../../../server/platform/http/assemble';
import { sessionCookie } from '../../../server/platform/http/session-cookie';
import { route } from '../../../server/platform/routing';
import { everybody, inOrganisation, inProduct, signedIn } from '../../../server/policies';
import { type Listening, listenLocally } from '../support/listening';
import { memoryLog } from '../support/memory-log';
import { useApi } from '../support/test-api';
import { makePerson, makeProduct, type TestPerson } from '../support/test-people';

const params = z.object({ productId: z.string() });
const seen = z.object({ person: z.string().nullable(), role: z.string().nullable() });
const routes = [
  route({
    method: 'GET',
    path: '/open',
    summary: 'For everybody',
    policy: everybody,
    response: seen,
    handler: ({ caller }) => Promise.resolve({ person: caller?.personId ?? null, role: null }),
  }),
  route({
    method: 'GET',
    path: '/own',
    summary: 'For whoever has signed in',
    policy: signedIn,
    response: seen,
    handler: ({ caller }) => Promise.resolve({ person: caller.personId, role: null }),
  }),
  route({
    method: 'GET',
    path: '/audit',
    summary: 'For administrators',
    policy: inOrganisation('audit.view'),
    response: seen,
    handler: ({ caller }) => Promise.resolve({ person: caller.personId, role: null }),
  }),
  route({
    method: 'GET',
    path: '/products/:productId',
    summary: 'For readers of the product',
    policy: inProduct('product.view', 'productId'),
    params,
    response: seen,
    handler: ({ caller, product }) =>
      Promise.resolve({ person: caller.personId, role: product?.role ?? null }),
  }),
  route({
    method: 'PUT',
    path: '/products/:productId',
    summary: 'For its designers',
    policy: inProduct('product.edit', 'productId'),
    params,
    body: z.object({ name: z.string() }),
    handler: () => Promise.resolve(undefined),
  }),
];

const api = useApi();
let listening: Listening;
beforeAll(async () => {
  const { db } = api().database;
  const cookie = sessionCookie({ https: false });
  const identify = createIdentify({ db, cookie, clock: () => new Date() });
  const app = assembleApp({
    http: { origin: undefined, trustedProxies: [] },
    log: memoryLog().log,
    routes,
    access: createAccess({ db, identify }),
    pages: join(import.meta.dirname, 'no-pages'),
    stopping: new AbortController().signal,
  });
  listening = await listenLocally(app);
});
afterAll(() => listening.close());

const person = (options?: Parameters<typeof makePerson>[2]) =>
  makePerson(api().database.db, listening.address, options);
const product = (createdBy: TestPerson, ...roles: NonNullable<Parameters<typeof makeProduct>[2]>) =>
  makeProduct(api().database.db, createdBy, roles);

describe('a session', () => {
  it('tells who calls', async () => {
    const ada = await person();
    expect((await ada.get('/api/own')).body).toEqual({ person: ada.id, role: null });
    expect((await ada.get('/api/open')).body).toEqual({ person: ada.id, role: null });
  });

  it('no longer does when it has expired', async () => {
    const ada = await person();
    await api()
      .database.db.update(sessions)
      .set({ expiresAt: sql`now()` });
    expect((await ada.get('/api/own')).body).toMatchObject({ status: 401, code: 'unauthenticated' });
    expect((await ada.get('/api/open')).body).toEqual({ person: null, role: null });
  });

  it('no longer does when its person is disabled', async () => {
    const ada = await person();
    await api()
      .database.db.update(people)
      .set({ disabledAt: sql`now()` });
    expect((await ada.get('/api/own')).status).toBe(401);
  });
});

describe('a rule about the organisation', () => {
  it('lets through who may, and nobody else', async () => {
    const administrator = await person({ organisationRole: 'administrator' });
    const member = await person();
    expect((await administrator.get('/api/audit')).status).toBe(200);
    expect((await member.get('/api/audit')).body).toMatchObject({ status: 403, code: 'forbidden' });
  });
});

describe('a rule about a product', () => {
  it('tells the handler the role in that product', async () => {
    const ada = await person();
    const own = await product(ada, [ada, 'reviewer']);
    expect((await ada.get(`/api/products/${own}`)).body).toEqual({ person: ada.id, role: 'reviewer' });
  });

  it('distinguishes roles, and products', async () => {
    const ada = await person();
    const ben = await person();
    const hers = await product(ada, [ada, 'designer'], [ben, 'viewer']);
    const his = await product(ben, [ben, 'designer']);
    expect((await ada.put(`/api/products/${hers}`, { name: 'x' })).status).toBe(204);
    expect((await ben.put(`/api/products/${hers}`, { name: 'x' })).status).toBe(403);
    expect((await ada.put(`/api/products/${his}`, { name: 'x' })).status).toBe(404);
    expect((await ada.get(`/api/products/${his}`)).status).toBe(404);
  });

  it('lets an administrator read every product and write to none without a role', async () => {
    const administrator = await person({ organisationRole: 'administrator' });
    const ada = await person();
    const hers = await product(ada, [ada, 'designer']);
    expect((await administrator.get(`/api/products/${hers}`)).body).toMatchObject({ role: null });
    expect((await administrator.put(`/api/products/${hers}`, { name: 'x' })).status).toBe(403);
  });

  it('is asked before the body is read', async () => {
    const ben = await person();
    const ada = await person();
    const hers = await product(ada, [ben, 'viewer']);
    expect((await ben.put(`/api/products/${hers}`, { wrong: true })).status).toBe(403);
  });

  it.each(['nothing', '00000000-0000-4000-8000-000000000000'])('answers 404 for %s', async (id) => {
    const administrator = await person({ organisationRole: 'administrator' });
    expect((await administrator.get(`/api/products/${id}`)).status).toBe(404);
  });

  it('must name a parameter of its path', () => {
    const [wrong] = [{ method: 'GET', path: '/runs/:id', policy: inProduct('run.view', 'runId') }];
    expect(() => checkRules([wrong])).toThrow('GET /runs/:id has no parameter runId');
  });
});
