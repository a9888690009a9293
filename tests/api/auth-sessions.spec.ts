import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { people, sessions } from '../../server/db/schema';
import { type OpenSession, openSessionSchema } from '../../shared/contracts/api';
import type { HttpClient } from './support/http-client';
import { browserWith, givePassword, PASSWORD, setCookieOf } from './support/sign-in';
import { useApi } from './support/test-api';
import type { TestPerson } from './support/test-people';

const HOUR = 3600_000;
const DAY = 24 * HOUR;
const START = new Date('2031-03-03T08:00:00.000Z');

let now = START;
const api = useApi({ clock: () => now });
const pass = (milliseconds: number) => {
  now = new Date(now.getTime() + milliseconds);
};
const after = (milliseconds: number) => new Date(START.getTime() + milliseconds).toISOString();

let person: TestPerson;

beforeEach(async () => {
  now = START;
  await becomeSomebodyElse();
  await api().database.db.delete(sessions);
});

/** Somebody new is whom the following sign-ins are about. */
async function becomeSomebodyElse(): Promise<void> {
  person = await api().person();
  await givePassword(api().database.db, person);
}

async function signIn(userAgent = 'Browser 1', password = PASSWORD): Promise<HttpClient> {
  const answer = await api().anybody.post(
    '/api/session',
    { email: person.email, password },
    { headers: { 'user-agent': userAgent } },
  );
  expect(answer.status).toBe(200);
  return browserWith(answer, api().address);
}

async function isSignedIn(browser: HttpClient): Promise<boolean> {
  const { status } = await browser.get('/api/session');
  expect([200, 401]).toContain(status);
  return status === 200;
}

async function sessionsOf(browser: HttpClient): Promise<OpenSession[]> {
  const answer = await browser.get('/api/session/all');
  expect(answer.status).toBe(200);
  return (answer.body as { items: unknown[] }).items.map((item) => openSessionSchema.parse(item));
}

describe('a session', () => {
  it('ends when nobody has used it for three days', async () => {
    const browser = await signIn();
    pass(3 * DAY - 1);
    expect(await isSignedIn(browser)).toBe(true);
    pass(3 * DAY);
    expect(await isSignedIn(browser)).toBe(false);
  });

  it('ends two weeks after the sign-in, however busy it is', async () => {
    const browser = await signIn();
    for (let day = 1; day < 14; day++) {
      pass(DAY);
      expect(await isSignedIn(browser)).toBe(true);
    }
    pass(DAY - 1);
    expect(await isSignedIn(browser)).toBe(true);
    pass(1);
    expect(await isSignedIn(browser)).toBe(false);
  });

  it('ends at once for who is disabled', async () => {
    const browser = await signIn();
    await api().database.db.update(people).set({ disabledAt: now }).where(eq(people.id, person.id));
    expect(await isSignedIn(browser)).toBe(false);
  });

  it('leaves no row behind once somebody else signs in', async () => {
    await signIn('Old');
    pass(20 * DAY);
    await signIn('New');
    const rows = await api().database.db.select().from(sessions);
    expect(rows.map(({ userAgent }) => userAgent)).toEqual(['New']);
  });
});

describe('the list of sessions', () => {
  it('tells where, since when, and until when somebody is signed in, the last used first', async () => {
    const first = await signIn('Browser 1');
    pass(HOUR);
    await signIn('Browser 2');
    pass(HOUR);
    expect(await sessionsOf(first)).toEqual([
      {
        id: expect.any(String) as string,
        userAgent: 'Browser 1',
        current: true,
        createdAt: after(0),
        lastSeenAt: after(2 * HOUR),
        expiresAt: after(2 * HOUR + 3 * DAY),
      },
      {
        id: expect.any(String) as string,
        userAgent: 'Browser 2',
        current: false,
        createdAt: after(HOUR),
        lastSeenAt: after(HOUR),
        expiresAt: after(HOUR + 3 * DAY),
      },
    ]);
  });

  it('names the absolute end where it comes first, and leaves out what is over', async () => {
    await signIn('Unused');
    const browser = await signIn('Busy');
    for (let day = 1; day <= 13; day++) {
      pass(DAY);
      expect(await isSignedIn(browser)).toBe(true);
    }
    expect(await sessionsOf(browser)).toEqual([
      expect.objectContaining({ userAgent: 'Busy', expiresAt: after(14 * DAY) }),
    ]);
  });

  it('holds the sessions of nobody else', async () => {
    const browser = await signIn();
    await becomeSomebodyElse();
    const stranger = await signIn('Stranger');
    expect((await sessionsOf(stranger)).map(({ userAgent }) => userAgent)).not.toContain('Browser 1');
    const [{ id }] = await sessionsOf(browser);
    const answer = await stranger.delete(`/api/session/all/${id}`);
    expect(answer.status).toBe(404);
    expect(await isSignedIn(browser)).toBe(true);
  });
});

describe('signing out', () => {
  it('ends the session and takes the cookie back', async () => {
    const browser = await signIn();
    const answer = await browser.delete('/api/session');
    expect(answer.status).toBe(204);
    expect(setCookieOf(answer)).toBe('tareline-session=; Path=/; HttpOnly; SameSite=Lax; Max-Age=0');
    expect(await isSignedIn(browser)).toBe(false);
  });

  it('takes the cookie back from who has no session any more', async () => {
    const browser = await signIn();
    pass(15 * DAY);
    const answer = await browser.delete('/api/session');
    expect(answer.status).toBe(204);
    expect(setCookieOf(answer)).toContain('Max-Age=0');
  });

  it('ends one other session by its id, once', async () => {
    const first = await signIn('Browser 1');
    const second = await signIn('Browser 2');
    const other = (await sessionsOf(first)).find(({ current }) => !current);
    const answer = await first.delete(`/api/session/all/${other?.id}`);
    expect(answer.status).toBe(204);
    expect(answer.headers['set-cookie']).toBeUndefined();
    expect(await isSignedIn(second)).toBe(false);
    expect(await isSignedIn(first)).toBe(true);
    expect((await first.delete(`/api/session/all/${other?.id}`)).status).toBe(404);
    expect((await first.delete('/api/session/all/not-an-id')).status).toBe(404);
  });

  it('ends all sessions of the person, and those of nobody else', async () => {
    const mine = [await signIn(), await signIn(), await signIn()];
    await becomeSomebodyElse();
    const stranger = await signIn();
    const answer = await mine[1].delete('/api/session/all');
    expect(answer.status).toBe(204);
    expect(setCookieOf(answer)).toContain('Max-Age=0');
    for (const browser of mine) expect(await isSignedIn(browser)).toBe(false);
    expect(await isSignedIn(stranger)).toBe(true);
  });
});

describe('changing the password', () => {
  const next = 'a load of eight bricks';

  it('ends the other sessions, gives this one a new token, and lets the old password in no more', async () => {
    const browser = await signIn('Browser 1');
    const other = await signIn('Browser 2');
    const answer = await browser.post('/api/session/password', { current: PASSWORD, next });
    expect(answer.status).toBe(204);
    expect(await isSignedIn(other)).toBe(false);
    // A copy of the cookie is of no use any more.
    expect(await isSignedIn(browser)).toBe(false);
    const renewed = browserWith(answer, api().address);
    expect(await sessionsOf(renewed)).toEqual([
      expect.objectContaining({ userAgent: 'Browser 1', current: true }),
    ]);
    const old = await api().anybody.post('/api/session', { email: person.email, password: PASSWORD });
    expect(old.status).toBe(401);
    expect(await isSignedIn(await signIn('Browser 3', next))).toBe(true);
  });

  it('needs the present password', async () => {
    const browser = await signIn();
    const other = await signIn();
    const answer = await browser.post('/api/session/password', { current: next, next: PASSWORD });
    expect(answer.status).toBe(401);
    expect(answer.body).toMatchObject({ code: 'wrong-password' });
    expect(await isSignedIn(browser)).toBe(true);
    expect(await isSignedIn(other)).toBe(true);
  });

  it('refuses a short one', async () => {
    const browser = await signIn();
    const answer = await browser.post('/api/session/password', { current: PASSWORD, next: 'elevenchars' });
    expect(answer.status).toBe(400);
    expect(await isSignedIn(browser)).toBe(true);
  });
});
