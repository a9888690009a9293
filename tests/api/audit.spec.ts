import { beforeEach, describe, expect, it } from 'vitest';
import { recordInAudit } from '../../server/db';
import { type AuditEntry, type AuditPage, auditPageSchema, personSchema } from '../../shared/contracts/api';
import { browserWith, givePassword, PASSWORD } from './support/sign-in';
import { useApi } from './support/test-api';
import type { TestPerson } from './support/test-people';

const api = useApi();
let administrator: TestPerson;

beforeEach(async () => {
  administrator = await api().person({ name: 'Ines Haller', organisationRole: 'administrator' });
});

async function page(query = ''): Promise<AuditPage> {
  const answer = await administrator.get(`/api/audit${query}`);
  expect(answer.status).toBe(200);
  return answer.read(auditPageSchema);
}

/** The newest entries, the oldest of them first, without ids and moments. */
async function newest(count: number) {
  const { entries } = await page();
  return entries
    .slice(0, count)
    .toReversed()
    .map(({ who, action, subject, details }: AuditEntry) => ({ who, action, subject, details }));
}

describe('the audit log', () => {
  it('tells who signed in, who failed to, and who signed out', async () => {
    const person = await api().person({ name: 'Ada Brandt' });
    await givePassword(api().database.db, person);
    const signIn = (email: string, password: string) =>
      api().anybody.post('/api/session', { email, password });
    await signIn(person.email, 'a guess');
    await signIn('a secret typed into the wrong field', 'x');
    const browser = browserWith(await signIn(person.email, PASSWORD), api().address);
    await browser.post('/api/session/password', { current: 'a guess', next: 'a load of eight bricks' });
    const changed = await browser.post('/api/session/password', {
      current: PASSWORD,
      next: 'a load of eight bricks',
    });
    await browserWith(changed, api().address).delete('/api/session/all');
    const subject = 'person Ada Brandt';
    const who = 'Ada Brandt';
    const details = 'address: 127.0.0.1';
    expect(await newest(6)).toEqual([
      { who: null, action: 'session.refuse', subject, details },
      { who: null, action: 'session.refuse', subject: 'account unknown', details },
      { who, action: 'session.open', subject, details },
      { who, action: 'password.refuse', subject, details: '' },
      { who, action: 'password.change', subject, details: 'ended sessions: 1' },
      { who, action: 'session.end-all', subject, details: 'sessions: 1' },
    ]);
    const { text } = await administrator.get('/api/audit');
    for (const secret of [PASSWORD, 'a guess', 'eight bricks', 'wrong field', '$argon2']) {
      expect(text).not.toContain(secret);
    }
  });

  it('tells who invited, changed and removed whom', async () => {
    const who = 'Ines Haller';
    const invited = (
      await administrator.post('/api/people/invitations', {
        ...{ name: 'Noor Lindqvist', email: 'noor@example.com', role: 'member' },
        mayCreateProducts: false,
      })
    ).read(personSchema);
    const member = await api().person({ name: 'Ada Brandt' });
    await administrator.patch(`/api/people/${member.id}`, { role: 'administrator', mayCreateProducts: true });
    await administrator.patch(`/api/people/${member.id}`, { role: 'administrator' });
    await administrator.patch(`/api/people/${member.id}`, { disabled: true });
    await administrator.delete(`/api/people/${member.id}`);
    await administrator.delete(`/api/people/${invited.id}`);
    expect(await newest(5)).toEqual([
      {
        who,
        action: 'invitation.send',
        subject: 'invitation Noor Lindqvist',
        details: 'role: member, email: noor@example.com, may create products: no',
      },
      {
        who,
        action: 'person.change',
        subject: 'person Ada Brandt',
        details: 'role: member → administrator, may create products: no → yes',
      },
      { who, action: 'person.change', subject: 'person Ada Brandt', details: 'disabled: no → yes' },
      { who, action: 'person.remove', subject: 'person Ada Brandt', details: 'roles in products: 0' },
      { who, action: 'invitation.revoke', subject: 'invitation Noor Lindqvist', details: '' },
    ]);
  });

  it('calls things by their names, and by what was written down where that is gone', async () => {
    const { db } = api().database;
    const product = await api().product(administrator);
    const gone = '3f2a91bc-0000-4000-8000-000000000000';
    const entry = { personId: administrator.id, objectKind: 'productMember' };
    await recordInAudit(db, {
      ...entry,
      action: 'one',
      objectId: product,
      data: { name: 'Lift table', person: administrator.id, roles: ['viewer', gone], none: null },
    });
    await recordInAudit(db, {
      ...entry,
      action: 'two',
      objectId: gone,
      data: { deep: { from: 1, to: 2.5 } },
    });
    await recordInAudit(db, { action: 'three', objectKind: 'person', objectId: administrator.id });
    expect(await newest(3)).toEqual([
      {
        who: 'Ines Haller',
        action: 'one',
        subject: 'product member Lift table',
        details: 'none: nothing, roles: viewer, 3f2a91bc, person: Ines Haller',
      },
      { who: 'Ines Haller', action: 'two', subject: 'product member 3f2a91bc', details: 'deep: 1 → 2.5' },
      { who: null, action: 'three', subject: 'person Ines Haller', details: '' },
    ]);
  });

  it('is read page by page, the newest first, without a gap', async () => {
    const { db } = api().database;
    for (let i = 0; i < 230; i++) {
      await recordInAudit(db, { action: 'counted', objectKind: 'number', objectId: String(i) });
    }
    const seen: AuditEntry[] = [];
    let next: string | null = null;
    do {
      const { entries, next: older }: AuditPage = await page(next === null ? '' : `?before=${next}`);
      expect(entries.length).toBeLessThanOrEqual(100);
      seen.push(...entries);
      next = older;
    } while (next !== null);
    const ids = seen.map(({ id }) => Number(id));
    expect(ids).toEqual([...new Set(ids)].toSorted((a, b) => b - a));
    const counted = seen.filter(({ action }) => action === 'counted').map(({ subject }) => subject);
    expect(counted).toEqual(Array.from({ length: 230 }, (_, i) => `number ${229 - i}`));
  });

  it('is for administrators, and refuses a place that is none', async () => {
    const member = await api().person();
    expect((await member.get('/api/audit')).status).toBe(403);
    expect((await api().anybody.get('/api/audit')).status).toBe(401);
    expect((await administrator.get('/api/audit?before=last')).status).toBe(400);
  });
});
