import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { fillEmptyDatabase, firstAdministratorLines } from '../../server/commands/start/fill-empty-database';
import { audit, invitations, mailOutbox, people, sessions } from '../../server/db/schema';
import { readConfiguration } from '../../server/platform/configuration';
import { hashToken } from '../../server/platform/opaque-token';
import { invitationSchema, signedInSchema } from '../../shared/contracts/api';
import { browserWith, PASSWORD } from './support/sign-in';
import { useApi } from './support/test-api';

const HOUR = 3600_000;
const START = new Date('2031-03-03T08:00:00.000Z');
const ELSEWHERE = { HOST: '0.0.0.0', PUBLIC_ORIGIN: 'https://tareline.example' };

let now = START;
const api = useApi({ clock: () => now });

beforeEach(() => {
  now = START;
});
afterEach(async () => {
  const { db } = api().database;
  await db.delete(invitations);
  await db.delete(sessions);
  await db.delete(people);
});

/** The start of a server, up to where it would listen. */
async function start(environment: Record<string, string> = ELSEWHERE) {
  const { firstAdministrator, signIns } = await fillEmptyDatabase({
    db: api().database.db,
    configuration: readConfiguration(environment),
    demo: () => Promise.reject(new Error('no demo may be seeded here')),
    signInFile: join(tmpdir(), 'no-such-folder', 'demo-sign-ins.json'),
    now,
  });
  expect(signIns).toEqual([]);
  return firstAdministrator;
}

async function link(environment?: Record<string, string>) {
  const invitation = await start(environment);
  if (invitation === undefined) throw new Error('nobody is invited');
  return invitation;
}

const accept = (token: string) =>
  api().anybody.post(`/api/invitations/${token}/accept`, { name: 'Ines Haller', password: PASSWORD });

describe('the first start where other machines reach the server', () => {
  it.each([
    [ELSEWHERE, 'administrator@tareline.example'],
    [{ PUBLIC_ORIGIN: 'https://tareline.example' }, 'administrator@tareline.example'],
    [{ ...ELSEWHERE, PUBLIC_ORIGIN: 'https://192.0.2.7' }, 'administrator@tareline.invalid'],
    [{ ...ELSEWHERE, ADMINISTRATOR_EMAIL: 'Ines@Example.com' }, 'ines@example.com'],
    [{ ADMINISTRATOR_EMAIL: 'ines@example.com' }, 'ines@example.com'],
  ])('%j: invites %s and seeds no demo', async (environment, email) => {
    const { token, ...invited } = await link(environment);
    expect(invited).toEqual({ email, expiresAt: new Date(START.getTime() + 24 * HOUR) });
    const answer = await api().anybody.get(`/api/invitations/${token}`);
    expect(answer.read(invitationSchema).email).toBe(email);
    expect(await api().database.db.select().from(people)).toEqual([]);
  });

  it('lets whoever holds the link join once, as an administrator who may create products', async () => {
    const { token } = await link();
    const answer = await accept(token);
    expect(answer.status).toBe(200);
    expect(answer.read(signedInSchema)).toMatchObject({
      name: 'Ines Haller',
      role: 'administrator',
      mayCreateProducts: true,
    });
    const administrator = browserWith(answer, api().address);
    expect((await administrator.get('/api/people')).status).toBe(200);
    expect((await administrator.get('/api/audit')).text).toContain('invitation.first');
    expect(await accept(token)).toMatchObject({ status: 410, body: { code: 'invitation-used' } });
  });

  it('writes the link down nowhere', async () => {
    const { token } = await link();
    const { db } = api().database;
    const stored = await db.select().from(invitations);
    expect(stored.map(({ tokenHash }) => tokenHash)).toEqual([hashToken(token)]);
    const everything = [stored, await db.select().from(mailOutbox), await db.select().from(audit)];
    expect(JSON.stringify(everything)).not.toContain(token);
    expect(api().logLines.join('\n')).not.toContain(token);
  });

  it('says in two lines how to join', async () => {
    const invitation = await link();
    expect(firstAdministratorLines('https://tareline.example', invitation)).toEqual([
      expect.stringContaining(
        'administrator@tareline.example, joins by this link, once, until 2031-03-04 08:00 UTC',
      ),
      `https://tareline.example/invitation/${invitation.token}`,
    ]);
  });
});

describe('the link of the first administrator', () => {
  it('works for a day', async () => {
    const { token } = await link();
    now = new Date(START.getTime() + 24 * HOUR);
    expect(await accept(token)).toMatchObject({ status: 410, body: { code: 'invitation-expired' } });
    now = new Date(now.getTime() - 1);
    expect((await accept(token)).status).toBe(200);
  });

  it('is renewed by a later start, also for another address, and the earlier one ends', async () => {
    const first = await link();
    now = new Date(START.getTime() + 30 * HOUR);
    const second = await link({ ...ELSEWHERE, ADMINISTRATOR_EMAIL: 'ines@example.com' });
    expect(await accept(first.token)).toMatchObject({ status: 410, body: { code: 'invitation-revoked' } });
    expect((await accept(second.token)).read(signedInSchema).email).toBe('ines@example.com');
  });

  it('is one link where two servers start at once', async () => {
    const links = await Promise.all([link(), link()]);
    const answers = await Promise.all(links.map(({ token }) => accept(token)));
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 410]);
  });

  it('is not given any more once somebody has joined', async () => {
    await accept((await link()).token);
    expect(await start()).toBeUndefined();
    expect(await api().database.db.select().from(invitations)).toHaveLength(1);
  });

  it('never makes a second administrator where a start and the joining of the first meet', async () => {
    const { token } = await link();
    const [renewed, joined] = await Promise.all([start(), accept(token)]);
    expect([renewed === undefined, joined.status]).toEqual(
      joined.status === 200 ? [true, 200] : [false, 410],
    );
  });
});
