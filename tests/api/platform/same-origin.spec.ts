import { describe, expect, it } from 'vitest';
import { route } from '../../../server/platform/routing';
import { useRoutes } from '../support/test-routes';

const routes = [
  route({
    method: 'POST',
    path: '/changes',
    summary: 'Changes something',
    policy: { scope: 'public' },
    handler: () => Promise.resolve(undefined),
  }),
];

describe('on loopback', () => {
  const server = useRoutes(routes);
  const post = (headers: Record<string, string | undefined>) =>
    server().client.send('POST', '/api/changes', { headers });

  it('takes changes from its own pages', async () => {
    expect((await post({})).status).toBe(204);
    expect((await post({ origin: undefined, 'sec-fetch-site': 'same-origin' })).status).toBe(204);
  });

  it.each([
    ['a foreign page', { origin: 'http://foreign.example' }],
    ['a page of another port', { origin: 'http://127.0.0.1:1' }],
    ['a foreign page that hides its origin', { origin: 'null' }],
    ['a page of another site, as the browser says', { 'sec-fetch-site': 'cross-site' }],
    ['a page of another origin of the same site', { 'sec-fetch-site': 'same-site' }],
    ['a program that says nothing', { origin: undefined }],
  ])('refuses changes from %s', async (_what, headers) => {
    const answer = await post(headers);
    expect([answer.status, answer.body]).toMatchObject([403, { code: 'origin-refused' }]);
  });

  it('refuses a foreign name that points here', async () => {
    const answer = await server().client.get('/api/changes', { headers: { host: 'rebound.example' } });
    expect([answer.status, answer.body]).toMatchObject([421, { code: 'host-unknown' }]);
  });
});

describe('behind a proxy', () => {
  const server = useRoutes(routes, { origin: 'https://tareline.example' });
  const post = (origin: string) =>
    server().client.send('POST', '/api/changes', { headers: { origin, host: 'tareline.example' } });

  it('takes changes from the stated origin alone', async () => {
    expect((await post('https://tareline.example')).status).toBe(204);
    expect((await post('http://tareline.example')).status).toBe(403);
  });

  it('asks browsers to stay with https', async () => {
    const { headers } = await post('https://tareline.example');
    expect(headers['strict-transport-security']).toContain('max-age=31536000');
  });
});
