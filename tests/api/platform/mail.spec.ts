import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { z } from 'zod';
import { inTransaction } from '../../../server/db';
import { mailOutbox } from '../../../server/db/schema';
import { deliverDueLetters, postLetter } from '../../../server/features/mail';
import type { MailTransport } from '../../../server/platform/mail/mail-transport';
import { smtpTransport } from '../../../server/platform/mail/smtp-transport';
import { memoryLog } from '../support/memory-log';
import { type SmtpFake, startSmtpFake } from '../support/smtp-fake';
import { useApi } from '../support/test-api';

const api = useApi();
const letter = { to: 'ada@example.com', subject: 'Welcome – at last', text: 'Here is your link.' };
const { log } = memoryLog();

let smtp: SmtpFake;
let transport: MailTransport;
beforeAll(async () => {
  smtp = await startSmtpFake();
  transport = smtpTransport({ smtpUrl: smtp.url, from: 'tareline@example.com' });
});
afterAll(async () => {
  transport.close();
  await smtp.close();
});
beforeEach(async () => {
  await api().database.db.delete(mailOutbox);
});

const deliver = () => deliverDueLetters({ db: api().database.db, transport, log });

describe('the outbox', () => {
  it('sends a letter once, also where two servers look at the same time', async () => {
    await postLetter(api().database.db, letter);
    const before = smtp.letters.length;
    const sent = await Promise.all([deliver(), deliver()]);
    expect(sent.reduce((sum, count) => sum + count)).toBe(1);
    expect(await deliver()).toBe(0);
    expect(smtp.letters.slice(before)).toEqual([expect.stringContaining('Here is your link.')]);
    expect(smtp.letters[before]).toMatch(/^To: ada@example\.com\r$/m);
  });

  it('keeps a letter that is not taken, and tries it again later', async () => {
    const { db } = api().database;
    await postLetter(db, letter);
    smtp.refuseNext('mailbox full');
    expect(await deliver()).toBe(0);
    const [kept] = await db.select().from(mailOutbox);
    expect(kept).toMatchObject({ attempts: 1, sentAt: null });
    expect(kept.lastError).toContain('mailbox full');
    expect(await deliver()).toBe(0);
    await db.update(mailOutbox).set({ dueAt: sql`now()` });
    expect(await deliver()).toBe(1);
  });

  it('holds no letter of a transaction that was given up', async () => {
    const { db } = api().database;
    const failing = inTransaction(db, async (tx) => {
      await postLetter(tx, letter);
      throw new Error('given up');
    });
    await expect(failing).rejects.toThrow('given up');
    expect(await db.select().from(mailOutbox)).toEqual([]);
  });
});

describe('GET /api/mail', () => {
  const shape = z.object({ items: z.array(z.object({ to: z.string(), state: z.string() })) });

  it('shows administrators what went out and what waits', async () => {
    await postLetter(api().database.db, letter);
    await deliver();
    await postLetter(api().database.db, { ...letter, to: 'ben@example.com' });
    const administrator = await api().person({ organisationRole: 'administrator' });
    const { items } = (await administrator.get('/api/mail')).read(shape);
    expect(items.map(({ to, state }) => [to, state])).toEqual([
      ['ben@example.com', 'waiting'],
      ['ada@example.com', 'sent'],
    ]);
  });

  it('is for nobody else', async () => {
    const member = await api().person();
    expect((await member.get('/api/mail')).status).toBe(403);
    expect((await api().anybody.get('/api/mail')).status).toBe(401);
  });
});
