import { eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { invitations, mailOutbox, organisationSettings, people } from '../../server/db/schema';
import { hashToken } from '../../server/platform/opaque-token';
import { type Invite, invitationSchema, outgoingMailSchema, personSchema } from '../../shared/contracts/api';
import type { Answer } from './support/http-client';
import { browserWith, PASSWORD, setCookieOf } from './support/sign-in';
import { useApi } from './support/test-api';
import type { TestPerson } from './support/test-people';

const DAY = 24 * 3600_000;
const START = new Date('2031-03-03T08:00:00.000Z');

let now = START;
const api = useApi({ clock: () => now });

let administrator: TestPerson;
let number = 0;

beforeEach(async () => {
  now = START;
  number += 1;
  await newAdministrator();
});

/** Later on the first one's session has ended. */
async function newAdministrator(): Promise<void> {
  administrator = await api().person({ name: 'Ines Haller', organisationRole: 'administrator' });
}

const invitee = (change: Partial<Invite> = {}): Invite => ({
  name: 'Noor Lindqvist',
  email: `noor-${number}@example.com`,
  role: 'member',
  mayCreateProducts: true,
  ...change,
});

const invite = (change?: Partial<Invite>) => administrator.post('/api/people/invitations', invitee(change));

async function letterTo(email: string) {
  const answer = await administrator.get('/api/mail');
  expect(answer.status).toBe(200);
  const mails = (answer.body as { items: unknown[] }).items.map((item) => outgoingMailSchema.parse(item));
  return mails.find(({ to }) => to === email);
}

/** The token of the newest link that was sent to somebody. */
async function linkTo(email: string): Promise<string> {
  const text = (await letterTo(email))?.text ?? '';
  const [, token] = /\/invitation\/([\w-]+)\n/.exec(text) ?? [];
  return token;
}

async function inviteAndOpen(change?: Partial<Invite>): Promise<string> {
  expect((await invite(change)).status).toBe(201);
  return linkTo(invitee(change).email);
}

const view = (token: string) => api().anybody.get(`/api/invitations/${token}`);
const accept = (token: string, name = 'Noor L.') =>
  api().anybody.post(`/api/invitations/${token}/accept`, { name, password: PASSWORD });

function expectRefusal(answer: Answer, status: number, code: string): void {
  expect(answer.status).toBe(status);
  expect(answer.headers['set-cookie']).toBeUndefined();
  expect(answer.body).toMatchObject({ code, detail: expect.any(String) as string });
}

describe('an invitation', () => {
  it('is sent as a letter with a link to this server', async () => {
    const answer = await invite();
    expect(answer.status).toBe(201);
    expect(answer.read(personSchema)).toMatchObject({
      ...invitee(),
      invited: true,
      disabled: false,
      lastSeenAt: null,
    });
    const letter = await letterTo(invitee().email);
    expect(letter).toMatchObject({ state: 'waiting', subject: 'Invitation to Tareline' });
    expect(letter?.text).toContain(`\n${api().address}/invitation/`);
    expect(letter?.text).toContain('Ines Haller invites you');
    expect(letter?.text).toContain('until 2031-03-10 08:00 UTC');
  });

  it('tells its holder who invites whom', async () => {
    const token = await inviteAndOpen();
    const { db } = api().database;
    await db.insert(organisationSettings).values({ name: 'Example Lifts' }).onConflictDoNothing();
    expect((await view(token)).read(invitationSchema)).toEqual({
      name: 'Noor Lindqvist',
      email: invitee().email,
      organisation: 'Example Lifts',
    });
    await db.delete(organisationSettings);
  });

  it('lets its holder in with a password of their own, signed in', async () => {
    const token = await inviteAndOpen();
    const answer = await accept(token);
    expect(answer.status).toBe(200);
    expect(answer.body).toMatchObject({
      name: 'Noor L.',
      email: invitee().email,
      role: 'member',
      mayCreateProducts: true,
    });
    expect(setCookieOf(answer)).toMatch(/^tareline-session=[\w-]{43}; Path=\/; HttpOnly; SameSite=Lax;/);
    expect((await browserWith(answer, api().address).get('/api/session')).body).toEqual(answer.body);
    const signIn = await api().anybody.post('/api/session', { email: invitee().email, password: PASSWORD });
    expect(signIn.status).toBe(200);
    const list = (await administrator.get('/api/people')).body as { items: { email: string }[] };
    expect(list.items.filter(({ email }) => email === invitee().email)).toEqual([
      expect.objectContaining({ invited: false, lastSeenAt: START.toISOString() }),
    ]);
  });

  it('gives the role that it has when it is accepted', async () => {
    const { id } = (await invite()).read(personSchema);
    await administrator.patch(`/api/people/${id}`, { role: 'administrator', mayCreateProducts: false });
    const answer = await accept(await linkTo(invitee().email));
    expect(answer.body).toMatchObject({ role: 'administrator', mayCreateProducts: false });
  });

  it('is stored as a hash: only the letter holds the link', async () => {
    const token = await inviteAndOpen();
    await accept(token);
    const { db } = api().database;
    const rows = await db.select().from(invitations);
    expect(rows.map(({ tokenHash }) => tokenHash)).toContain(hashToken(token));
    expect(JSON.stringify(rows)).not.toContain(token);
    expect((await administrator.get('/api/audit')).text).not.toContain(token);
    expect((await administrator.get('/api/people')).text).not.toContain(token);
    expect(api().logLines.join('')).toContain('/api/invitations/[secret]/accept');
    expect(api().logLines.join('')).not.toContain(token);
  });
});

describe('an invitation that is of no use any more', () => {
  it('was accepted', async () => {
    const token = await inviteAndOpen();
    expect((await accept(token)).status).toBe(200);
    expectRefusal(await view(token), 410, 'invitation-used');
    expectRefusal(await accept(token, 'Somebody Else'), 410, 'invitation-used');
  });

  it('was accepted at the same moment', async () => {
    const token = await inviteAndOpen();
    const answers = await Promise.all([accept(token), accept(token), accept(token)]);
    expect(answers.map(({ status }) => status).toSorted()).toEqual([200, 410, 410]);
    const rows = await api().database.db.select().from(people).where(eq(people.email, invitee().email));
    expect(rows).toHaveLength(1);
  });

  it('is older than a week', async () => {
    const token = await inviteAndOpen();
    now = new Date(START.getTime() + 7 * DAY - 1);
    expect((await view(token)).status).toBe(200);
    now = new Date(START.getTime() + 7 * DAY);
    expectRefusal(await view(token), 410, 'invitation-expired');
    expectRefusal(await accept(token), 410, 'invitation-expired');
  });

  it('was withdrawn', async () => {
    const { id } = (await invite()).read(personSchema);
    const token = await linkTo(invitee().email);
    await administrator.delete(`/api/people/${id}`);
    expectRefusal(await view(token), 410, 'invitation-revoked');
    expectRefusal(await accept(token), 410, 'invitation-revoked');
  });

  it('was followed by a newer one for the same address', async () => {
    const old = await inviteAndOpen();
    now = new Date(START.getTime() + 8 * DAY);
    await newAdministrator();
    expect((await invite({ email: invitee().email.toUpperCase() })).status).toBe(201);
    // The outbox is in the order of the database's clock, so the new link is the other one.
    const letters = await api()
      .database.db.select({ text: mailOutbox.text })
      .from(mailOutbox)
      .where(eq(mailOutbox.recipient, invitee().email));
    const tokens = letters.map(({ text }) => /\/invitation\/([\w-]+)\n/.exec(text)?.[1] ?? '');
    expect(tokens).toHaveLength(2);
    const renewed = tokens.find((token) => token !== old) ?? '';
    expectRefusal(await accept(old), 410, 'invitation-revoked');
    expect((await accept(renewed)).status).toBe(200);
  });

  it('never was one', async () => {
    expectRefusal(await view('x'.repeat(43)), 404, 'invitation-unknown');
    expectRefusal(await accept('x'.repeat(43)), 404, 'invitation-unknown');
  });
});

describe('an invitation that cannot be sent', () => {
  it('is for somebody who is here, in whatever case the address is written', async () => {
    const member = await api().person({ email: `Here-${number}@Example.com` });
    const answer = await invite({ email: member.email });
    expectRefusal(answer, 409, 'person-exists');
    await administrator.patch(`/api/people/${member.id}`, { disabled: true });
    expectRefusal(await invite({ email: member.email }), 409, 'person-exists');
    expect(await letterTo(member.email.toLowerCase())).toBeUndefined();
  });

  it('has faults', async () => {
    for (const fault of [
      { email: 'nobody' },
      { name: ' ' },
      { role: 'owner' },
      { mayCreateProducts: undefined },
    ]) {
      const answer = await administrator.post('/api/people/invitations', { ...invitee(), ...fault });
      expect(answer.status).toBe(400);
    }
    expect(await letterTo(invitee().email)).toBeUndefined();
  });
});

describe('a person who was removed', () => {
  it('comes back by a new invitation as the same person', async () => {
    const first = (await accept(await inviteAndOpen())).body as { id: string };
    await administrator.delete(`/api/people/${first.id}`);
    expect((await invite({ role: 'administrator' })).status).toBe(201);
    const { db } = api().database;
    const open = await db.select().from(mailOutbox).where(eq(mailOutbox.recipient, invitee().email));
    const tokens = open.map(({ text }) => /\/invitation\/([\w-]+)\n/.exec(text)?.[1] ?? '');
    const answers = await Promise.all(tokens.map((token) => accept(token, 'Noor Again')));
    const accepted = answers.filter(({ status }) => status === 200);
    expect(accepted).toHaveLength(1);
    expect(accepted[0].body).toMatchObject({ id: first.id, name: 'Noor Again', role: 'administrator' });
  });
});

describe('accepting', () => {
  it('needs a name and a password of some length', async () => {
    const token = await inviteAndOpen();
    for (const body of [
      { name: '', password: PASSWORD },
      { name: 'Noor', password: 'short' },
    ]) {
      expect((await api().anybody.post(`/api/invitations/${token}/accept`, body)).status).toBe(400);
    }
    expect((await view(token)).status).toBe(200);
  });

  it('is refused where another site makes a browser do it', async () => {
    const token = await inviteAndOpen();
    const body = { name: 'Noor', password: PASSWORD };
    const headers = { origin: 'https://elsewhere.example' };
    const answer = await api().anybody.post(`/api/invitations/${token}/accept`, body, { headers });
    expect(answer.status).toBe(403);
    expect(answer.headers['set-cookie']).toBeUndefined();
    expect((await view(token)).status).toBe(200);
  });
});

describe('the outgoing mail', () => {
  it('tells what was sent, what waits and what failed, the newest first, to administrators', async () => {
    const { db } = api().database;
    const letter = (subject: string, minutes: number) => ({
      ...{ subject, recipient: 'somebody@example.com', text: 'A letter.' },
      createdAt: new Date(Date.UTC(2040, 0, 1, 0, minutes)),
    });
    await db
      .insert(mailOutbox)
      .values([
        letter('waits', 1),
        { ...letter('failed', 2), attempts: 3, lastError: 'mailbox full' },
        { ...letter('sent', 3), attempts: 2, sentAt: START },
      ]);
    const answer = await administrator.get('/api/mail');
    const { items } = answer.body as { items: unknown[] };
    expect(items.slice(0, 3).map((item) => outgoingMailSchema.parse(item))).toEqual([
      expect.objectContaining({ subject: 'sent', state: 'sent', at: '2040-01-01T00:03:00.000Z' }),
      expect.objectContaining({ subject: 'failed', state: 'failed', to: 'somebody@example.com' }),
      expect.objectContaining({ subject: 'waits', state: 'waiting', text: 'A letter.' }),
    ]);
    const member = await api().person();
    expect((await member.get('/api/mail')).status).toBe(403);
  });
});
