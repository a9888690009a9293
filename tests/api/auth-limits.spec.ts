import { describe, expect, it } from 'vitest';
import type { Answer } from './support/http-client';
import { browserWith, givePassword, PASSWORD } from './support/sign-in';
import { useApi } from './support/test-api';

const api = useApi();

/** Every attempt from the address that the test names, as a proxy would state it. */
const attempt = (email: string, password: string, from: string) =>
  api().anybody.post('/api/session', { email, password }, { headers: { 'x-forwarded-for': from } });

function expectLimited(answer: Answer): void {
  expect(answer.status).toBe(429);
  expect(answer.body).toMatchObject({ code: 'too-many-requests' });
  const seconds = Number(answer.headers['retry-after']);
  expect(seconds).toBeGreaterThan(0);
  expect(seconds).toBeLessThanOrEqual(900);
}

async function personWithPassword() {
  const person = await api().person();
  await givePassword(api().database.db, person);
  return person;
}

describe('failed sign-ins', () => {
  it('are limited for each account, from however many addresses they come', async () => {
    const person = await personWithPassword();
    for (let i = 1; i <= 10; i++) {
      expect((await attempt(person.email, 'a guess', `192.0.2.${i}`)).status).toBe(401);
    }
    expectLimited(await attempt(person.email, 'a guess', '192.0.2.11'));
    // The right password, and the address in capitals, are held up as well.
    expectLimited(await attempt(person.email, PASSWORD, '192.0.2.12'));
    expectLimited(await attempt(person.email.toUpperCase(), PASSWORD, '192.0.2.13'));
    const other = await personWithPassword();
    expect((await attempt(other.email, PASSWORD, '192.0.2.11')).status).toBe(200);
  });

  it('are limited for an account that does not exist just the same', async () => {
    for (let i = 1; i <= 10; i++) {
      expect((await attempt('nobody@example.com', 'a guess', `192.0.2.${i + 20}`)).status).toBe(401);
    }
    expectLimited(await attempt('nobody@example.com', 'a guess', '192.0.2.31'));
  });

  it('are limited for each address, however many accounts they try', async () => {
    const person = await personWithPassword();
    const answers = await Promise.all(
      Array.from({ length: 50 }, (_, i) => attempt(`person-${i}@example.com`, 'a guess', '198.51.100.7')),
    );
    expect(new Set(answers.map(({ status }) => status))).toEqual(new Set([401]));
    expectLimited(await attempt(person.email, PASSWORD, '198.51.100.7'));
    expect((await attempt(person.email, PASSWORD, '198.51.100.8')).status).toBe(200);
  });
});

describe('sign-ins that succeed', () => {
  it('count for nothing', async () => {
    const person = await personWithPassword();
    for (let i = 0; i < 12; i++) {
      expect((await attempt(person.email, PASSWORD, '203.0.113.5')).status).toBe(200);
    }
  });
});

describe('wrong passwords at a change', () => {
  it('are limited, so that a session left open is no way to guess', async () => {
    const person = await personWithPassword();
    const browser = browserWith(await attempt(person.email, PASSWORD, '203.0.113.9'), api().address);
    const change = (current: string) =>
      browser.post(
        '/api/session/password',
        { current, next: 'a load of eight bricks' },
        { headers: { 'x-forwarded-for': '203.0.113.9' } },
      );
    for (let i = 0; i < 10; i++) expect((await change('a guess')).status).toBe(401);
    expectLimited(await change(PASSWORD));
  });
});
