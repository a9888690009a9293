import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { defineProblem } from '../../../server/platform/problem';
import { route } from '../../../server/platform/routing';
import { useRoutes } from '../support/test-routes';

const refused = defineProblem({ code: 'refused', status: 401, title: 'Refused' });
const hour = 3600_000;
const bodySchema = z.object({ account: z.string(), right: z.boolean() });

const signIn = route({
  method: 'POST',
  path: '/sign-in',
  summary: 'Succeeds where it is told to',
  policy: { scope: 'public' },
  limits: [
    { by: 'address', limit: 6, windowMs: hour, failuresOnly: true },
    { by: ({ body }) => bodySchema.parse(body).account, limit: 2, windowMs: hour, failuresOnly: true },
  ],
  body: bodySchema,
  handler: ({ body }) => {
    if (!body.right) throw refused();
    return Promise.resolve(undefined);
  },
});

describe('limits', () => {
  const server = useRoutes([signIn], { trustedProxies: ['loopback'] });
  const attempt = async (account: string, right: boolean, address: string) => {
    const headers = { 'x-forwarded-for': address };
    return server().client.post('/api/sign-in', { account, right }, { headers });
  };
  const statuses = async (attempts: Parameters<typeof attempt>[]) => {
    const seen: number[] = [];
    for (const parameters of attempts) seen.push((await attempt(...parameters)).status);
    return seen;
  };

  it('of an account hold wherever the attempts come from, and for that account alone', async () => {
    expect(
      await statuses([
        ['ada', false, '198.51.100.1'],
        ['ada', false, '198.51.100.2'],
        ['ada', true, '198.51.100.3'],
        ['ben', true, '198.51.100.3'],
      ]),
    ).toEqual([401, 401, 429, 204]);
  });

  it('of an address hold whatever account is tried, and for that address alone', async () => {
    const accounts = ['c', 'd', 'e', 'f', 'g', 'h'];
    expect(
      await statuses([
        ...accounts.map((account) => [account, false, '203.0.113.9'] as [string, boolean, string]),
        ['i', true, '203.0.113.9'],
        ['i', true, '203.0.113.10'],
      ]),
    ).toEqual([401, 401, 401, 401, 401, 401, 429, 204]);
  });

  it('do not count what succeeds, where they say so', async () => {
    const attempts = Array.from(
      { length: 9 },
      () => ['joy', true, '203.0.113.77'] as [string, boolean, string],
    );
    expect(new Set(await statuses(attempts))).toEqual(new Set([204]));
  });

  it('tell when to try again', async () => {
    await statuses([
      ['kim', false, '192.0.2.1'],
      ['kim', false, '192.0.2.1'],
    ]);
    const answer = await attempt('kim', false, '192.0.2.1');
    expect([answer.status, answer.body]).toMatchObject([429, { code: 'too-many-requests' }]);
    expect(answer.headers['retry-after']).toBe('3600');
  });
});

describe('an address', () => {
  const server = useRoutes([signIn]);

  it('is not believed where no proxy is trusted', async () => {
    const seen: number[] = [];
    for (let i = 0; i < 7; i++) {
      const headers = { 'x-forwarded-for': `203.0.113.${i}` };
      const body = { account: `person ${i}`, right: false };
      seen.push((await server().client.post('/api/sign-in', body, { headers })).status);
    }
    expect(seen).toEqual([401, 401, 401, 401, 401, 401, 429]);
  });
});
