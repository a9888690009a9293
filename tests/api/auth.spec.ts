import * as argon2 from 'argon2';
import { eq } from 'drizzle-orm';
import { describe, expect, it, vi } from 'vitest';
import { people, sessions } from '../../server/db/schema';
import { hashToken } from '../../server/platform/opaque-token';
import { signedInSchema } from '../../shared/contracts/api';
import { browserWith, givePassword, PASSWORD, setCookieOf } from './support/sign-in';
import { useApi } from './support/test-api';

// The real functions, with their calls counted.
vi.mock('argon2', { spy: true });

const api = useApi();

async function personWithPassword() {
  const person = await api().person({ name: 'Ada Brandt', mayCreateProducts: true });
  await givePassword(api().database.db, person);
  return person;
}

const signIn = (email: string, password: string, headers: Record<string, string> = {}) =>
  api().anybody.post('/api/session', { email, password }, { headers });

describe('signing in', () => {
  it('answers who it is, and gives a cookie that no script reads and no other site sends along', async () => {
    const person = await personWithPassword();
    const answer = await signIn(person.email, PASSWORD);
    expect(answer.status).toBe(200);
    const signedIn = {
      id: person.id,
      name: 'Ada Brandt',
      email: person.email,
      role: 'member',
      mayCreateProducts: true,
    };
    expect(answer.body).toEqual(signedIn);
    expect(setCookieOf(answer)).toMatch(
      /^tareline-session=[\w-]{43}; Path=\/; HttpOnly; SameSite=Lax; Max-Age=1209600$/,
    );
    const me = await browserWith(answer, api().address).get('/api/session');
    expect(me.status).toBe(200);
    expect(me.read(signedInSchema)).toEqual(signedIn);
  });

  it('takes the e-mail address in any case', async () => {
    const person = await personWithPassword();
    expect((await signIn(` ${person.email.toUpperCase()} `, PASSWORD)).status).toBe(200);
  });

  it('stores the hash of the token, never the token', async () => {
    const person = await personWithPassword();
    const token = /=([\w-]+);/.exec(setCookieOf(await signIn(person.email, PASSWORD)))?.[1] ?? '';
    const stored = await api().database.db.select().from(sessions).where(eq(sessions.personId, person.id));
    expect(stored.map(({ tokenHash }) => tokenHash)).toContain(hashToken(token));
    expect(JSON.stringify(stored)).not.toContain(token);
  });

  it('ends the session that the browser held before', async () => {
    const person = await personWithPassword();
    const browser = browserWith(await signIn(person.email, PASSWORD), api().address);
    const again = await browser.post('/api/session', { email: person.email, password: PASSWORD });
    expect(again.status).toBe(200);
    expect((await browser.get('/api/session')).status).toBe(401);
    expect((await browserWith(again, api().address).get('/api/session')).status).toBe(200);
  });

  it('renews a hash that was made with other parameters', async () => {
    const { db } = api().database;
    const person = await personWithPassword();
    const dated = await argon2.hash(PASSWORD, { memoryCost: 8192, timeCost: 2, parallelism: 1 });
    await db.update(people).set({ passwordHash: dated }).where(eq(people.id, person.id));
    expect((await signIn(person.email, PASSWORD)).status).toBe(200);
    const [{ passwordHash }] = await db.select().from(people).where(eq(people.id, person.id));
    expect(passwordHash).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
    expect((await signIn(person.email, PASSWORD)).status).toBe(200);
  });

  it.each([
    { body: { email: 'a@example.com' }, what: 'no password' },
    { body: { email: 'a@example.com', password: '' }, what: 'an empty password' },
    { body: { password: PASSWORD }, what: 'no address' },
    { body: { email: 'a\u0000@example.com', password: PASSWORD }, what: 'an address that no database holds' },
  ])('refuses $what as a fault of the request', async ({ body }) => {
    const answer = await api().anybody.post('/api/session', body);
    expect(answer.status).toBe(400);
    expect(answer.body).toMatchObject({ code: 'invalid-request' });
  });
});

describe('a sign-in that is refused', () => {
  /** Everything that keeps somebody out, as attempts. */
  async function refusals(): Promise<Record<string, readonly [string, string]>> {
    const known = await personWithPassword();
    const disabled = await personWithPassword();
    const without = await api().person();
    const { db } = api().database;
    await db.update(people).set({ disabledAt: new Date() }).where(eq(people.id, disabled.id));
    return {
      'an unknown name': ['nobody@example.com', PASSWORD],
      'a text that is no address': ["' or 1=1 --", PASSWORD],
      'a wrong password': [known.email, `${PASSWORD}!`],
      'a disabled person': [disabled.email, PASSWORD],
      'a person without a password': [without.email, 'none'],
    };
  }

  it('answers the same whatever the reason, to the last byte', async () => {
    const bodies = new Set<string>();
    for (const [email, password] of Object.values(await refusals())) {
      // The id of the request is all that may differ, and here it does not.
      const answer = await signIn(email, password, { 'x-request-id': 'the-same-request' });
      expect(answer.status).toBe(401);
      expect(answer.headers['set-cookie']).toBeUndefined();
      bodies.add(answer.text);
    }
    expect([...bodies].map((body) => JSON.parse(body) as unknown)).toEqual([
      expect.objectContaining({ code: 'sign-in-refused', status: 401 }),
    ]);
  });

  it('does the same work whatever the reason', async () => {
    const verify = vi.mocked(argon2.verify);
    const hash = vi.mocked(argon2.hash);
    for (const [reason, [email, password]] of Object.entries(await refusals())) {
      verify.mockClear();
      hash.mockClear();
      expect((await signIn(email, password)).status).toBe(401);
      expect(verify.mock.calls.length, reason).toBe(1);
      expect(verify.mock.calls[0][0], reason).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/);
      expect(verify.mock.calls[0][1], reason).toBe(password);
      expect(hash.mock.calls.length, reason).toBe(0);
    }
  });
});

describe('a request without a session', () => {
  it('is answered 401, whatever it holds as a cookie', async () => {
    for (const cookie of [
      undefined,
      'tareline-session=',
      'tareline-session=none',
      `other=${'x'.repeat(43)}`,
    ]) {
      const answer = await api().anybody.get('/api/session', { headers: { cookie } });
      expect(answer.status).toBe(401);
      expect(answer.headers['content-type']).toContain('application/problem+json');
      expect(answer.body).toMatchObject({ code: 'unauthenticated' });
    }
  });
});

describe('requests that another site makes a browser send', () => {
  it('are refused, and leave the session alone', async () => {
    const person = await personWithPassword();
    const browser = browserWith(await signIn(person.email, PASSWORD), api().address);
    const foreign = [
      { origin: 'https://elsewhere.example' },
      { origin: 'null' },
      { origin: undefined },
      { 'sec-fetch-site': 'cross-site' },
      { origin: undefined, 'sec-fetch-site': 'same-site' },
    ];
    for (const headers of foreign) {
      for (const answer of [
        await browser.delete('/api/session', { headers }),
        await browser.delete('/api/session/all', { headers }),
        await browser.post(
          '/api/session/password',
          { current: PASSWORD, next: 'foreign password' },
          { headers },
        ),
        await browser.post('/api/session', { email: person.email, password: PASSWORD }, { headers }),
      ]) {
        expect(answer.status).toBe(403);
        expect(answer.body).toMatchObject({ code: 'origin-refused' });
        expect(answer.headers['set-cookie']).toBeUndefined();
      }
    }
    expect((await browser.get('/api/session')).status).toBe(200);
  });
});

describe('the log', () => {
  it('holds neither passwords nor tokens nor hashes', async () => {
    const person = await personWithPassword();
    const answer = await signIn(person.email, PASSWORD);
    await signIn(person.email, 'a wrong password');
    const browser = browserWith(answer, api().address);
    const next = 'a load of eight bricks';
    expect((await browser.post('/api/session/password', { current: PASSWORD, next })).status).toBe(204);
    const log = api().logLines.join('');
    expect(log).toContain('/api/session/password');
    const token = /=([\w-]+);/.exec(setCookieOf(answer))?.[1] ?? '';
    for (const secret of [PASSWORD, next, 'a wrong password', token, hashToken(token), '$argon2']) {
      expect(log).not.toContain(secret);
    }
  });
});
