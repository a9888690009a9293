import { and, eq } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { invitations, memberships, people, products } from '../../server/db/schema';
import { type Person, personSchema } from '../../shared/contracts/api';
import type { Answer } from './support/http-client';
import { browserWith, givePassword, PASSWORD } from './support/sign-in';
import { useApi } from './support/test-api';
import type { TestPerson } from './support/test-people';

const now = new Date('2031-03-03T08:00:00.000Z');
const api = useApi({ clock: () => now });

let administrator: TestPerson;

beforeEach(async () => {
  const { db } = api().database;
  // Each test has one administrator, and nobody who was invited before.
  await db.update(people).set({ organisationRole: 'member' });
  await db.update(invitations).set({ revokedAt: now }).where(eq(invitations.name, 'Invited'));
  administrator = await api().person({ name: 'Only Administrator', organisationRole: 'administrator' });
});

async function peopleNow(): Promise<Person[]> {
  const answer = await administrator.get('/api/people');
  expect(answer.status).toBe(200);
  return (answer.body as { items: unknown[] }).items.map((item) => personSchema.parse(item));
}

async function personNow(id: string): Promise<Person | undefined> {
  return (await peopleNow()).find((person) => person.id === id);
}

async function invited(): Promise<Person> {
  const answer = await administrator.post('/api/people/invitations', {
    name: 'Invited',
    email: `invited-${administrator.id}@example.com`,
    role: 'member',
    mayCreateProducts: false,
  });
  return answer.read(personSchema);
}

function expectRefusal(answer: Answer, status: number, code: string): void {
  expect(answer.status).toBe(status);
  expect(answer.body).toMatchObject({ code, detail: expect.any(String) as string });
}

describe('the list of people', () => {
  it('holds who has joined and who is invited, by name', async () => {
    const member = await api().person({ name: 'Zita Member', mayCreateProducts: true });
    const { id } = await invited();
    const list = await peopleNow();
    expect(list.map(({ name }) => name)).toEqual(
      list.map(({ name }) => name).toSorted((a, b) => a.localeCompare(b, 'en')),
    );
    expect(list).toContainEqual({
      id: member.id,
      name: 'Zita Member',
      email: member.email,
      role: 'member',
      mayCreateProducts: true,
      disabled: false,
      invited: false,
      lastSeenAt: null,
    });
    expect(list).toContainEqual(expect.objectContaining({ id, name: 'Invited', invited: true }));
  });

  it('tells when somebody was last seen', async () => {
    const member = await api().person();
    await givePassword(api().database.db, member);
    await api().anybody.post('/api/session', { email: member.email, password: PASSWORD });
    expect((await personNow(member.id))?.lastSeenAt).toBe(now.toISOString());
  });

  it('is for administrators', async () => {
    const member = await api().person();
    for (const answer of [
      await member.get('/api/people'),
      await member.post('/api/people/invitations', {}),
      await member.patch(`/api/people/${member.id}`, { role: 'administrator' }),
      await member.delete(`/api/people/${administrator.id}`),
    ]) {
      expect(answer.status).toBe(403);
      expect(answer.body).toMatchObject({ code: 'forbidden' });
    }
    expect((await api().anybody.get('/api/people')).status).toBe(401);
    expect((await personNow(member.id))?.role).toBe('member');
  });
});

describe('the directory', () => {
  it('names to everybody who has signed in whom a role can be given', async () => {
    const member = await api().person({ name: 'Directory Reader' });
    const disabled = await api().person();
    const removed = await api().person();
    await administrator.patch(`/api/people/${disabled.id}`, { disabled: true });
    await administrator.delete(`/api/people/${removed.id}`);
    const invitation = await invited();
    const answer = await member.get('/api/people/directory');
    expect(answer.status).toBe(200);
    const { items } = answer.body as { items: { id: string }[] };
    expect(items).toContainEqual({ id: member.id, name: 'Directory Reader', email: member.email });
    const ids = items.map(({ id }) => id);
    for (const { id } of [disabled, removed, invitation]) expect(ids).not.toContain(id);
    expect((await api().anybody.get('/api/people/directory')).status).toBe(401);
  });
});

describe('changing a person', () => {
  it('sets role and the right to create products, at once', async () => {
    const member = await api().person();
    const answer = await administrator.patch(`/api/people/${member.id}`, {
      role: 'administrator',
      mayCreateProducts: true,
    });
    expect(answer.status).toBe(200);
    expect(answer.read(personSchema)).toMatchObject({ role: 'administrator', mayCreateProducts: true });
    expect((await member.get('/api/people')).status).toBe(200);
    await administrator.patch(`/api/people/${member.id}`, { role: 'member' });
    expect((await member.get('/api/people')).status).toBe(403);
    expect(await personNow(member.id)).toMatchObject({ role: 'member', mayCreateProducts: true });
  });

  it('disables somebody, which ends their sessions for good', async () => {
    const member = await api().person();
    await givePassword(api().database.db, member);
    const signIn = () => api().anybody.post('/api/session', { email: member.email, password: PASSWORD });
    const browser = browserWith(await signIn(), api().address);
    const off = await administrator.patch(`/api/people/${member.id}`, { disabled: true });
    expect(off.read(personSchema).disabled).toBe(true);
    expect((await browser.get('/api/session')).status).toBe(401);
    expect((await signIn()).status).toBe(401);
    const on = await administrator.patch(`/api/people/${member.id}`, { disabled: false });
    expect(on.read(personSchema).disabled).toBe(false);
    expect((await browser.get('/api/session')).status).toBe(401);
    expect((await signIn()).status).toBe(200);
  });

  it('answers 404 where there is no such person', async () => {
    const nobody = '00000000-0000-4000-8000-000000000000';
    expect((await administrator.patch(`/api/people/${nobody}`, { role: 'member' })).status).toBe(404);
    expect((await administrator.patch('/api/people/nobody', { role: 'member' })).status).toBe(404);
    expect((await administrator.delete(`/api/people/${nobody}`)).status).toBe(404);
  });

  it('refuses a role that does not exist', async () => {
    const member = await api().person();
    const answer = await administrator.patch(`/api/people/${member.id}`, { role: 'owner' });
    expect(answer.status).toBe(400);
  });

  it('sets what somebody who is invited will be, but cannot disable them', async () => {
    const { id } = await invited();
    const answer = await administrator.patch(`/api/people/${id}`, { role: 'administrator' });
    expect(answer.read(personSchema)).toMatchObject({ id, invited: true, role: 'administrator' });
    expectRefusal(await administrator.patch(`/api/people/${id}`, { disabled: true }), 409, 'invitation-open');
  });
});

describe('removing a person', () => {
  it('takes access and roles away, and leaves their name on what they did', async () => {
    const { db } = api().database;
    const member = await api().person({ name: 'Author Of Things' });
    const product = await api().product(member, [[member, 'designer']]);
    expect((await administrator.delete(`/api/people/${member.id}`)).status).toBe(204);
    expect(await personNow(member.id)).toBeUndefined();
    expect((await member.get('/api/session')).status).toBe(401);
    expect(await db.select().from(memberships).where(eq(memberships.personId, member.id))).toEqual([]);
    const [row] = await db
      .select({ author: people.name })
      .from(products)
      .innerJoin(people, eq(people.id, products.createdBy))
      .where(eq(products.id, product));
    expect(row.author).toBe('Author Of Things');
    expect((await administrator.delete(`/api/people/${member.id}`)).status).toBe(404);
    expect((await administrator.patch(`/api/people/${member.id}`, { disabled: false })).status).toBe(404);
  });

  it('withdraws an invitation', async () => {
    const { id } = await invited();
    expect((await administrator.delete(`/api/people/${id}`)).status).toBe(204);
    expect(await personNow(id)).toBeUndefined();
  });
});

describe('the last administrator', () => {
  it('cannot be demoted, disabled or removed', async () => {
    const self = `/api/people/${administrator.id}`;
    expectRefusal(await administrator.patch(self, { role: 'member' }), 409, 'last-administrator');
    expectRefusal(await administrator.patch(self, { disabled: true }), 409, 'last-administrator');
    expectRefusal(await administrator.delete(self), 409, 'last-administrator');
    expect((await administrator.patch(self, { mayCreateProducts: true })).status).toBe(200);
    expect(await personNow(administrator.id)).toMatchObject({ role: 'administrator', disabled: false });
  });

  it('is the last one beside others who are disabled or only invited', async () => {
    const other = await api().person({ organisationRole: 'administrator' });
    const { id } = await invited();
    await administrator.patch(`/api/people/${id}`, { role: 'administrator' });
    await administrator.patch(`/api/people/${other.id}`, { disabled: true });
    const answer = await administrator.delete(`/api/people/${administrator.id}`);
    expectRefusal(answer, 409, 'last-administrator');
  });

  it('may go once there is another one', async () => {
    const other = await api().person({ organisationRole: 'administrator' });
    expect((await administrator.delete(`/api/people/${administrator.id}`)).status).toBe(204);
    const answer = await other.patch(`/api/people/${other.id}`, { disabled: true });
    expectRefusal(answer, 409, 'last-administrator');
  });

  it('remains when two administrators take the role from each other at once', async () => {
    const { db } = api().database;
    for (let round = 0; round < 20; round++) {
      await db.update(people).set({ organisationRole: 'member' });
      const one = await api().person({ organisationRole: 'administrator' });
      const two = await api().person({ organisationRole: 'administrator' });
      const answers = await Promise.all([
        one.patch(`/api/people/${two.id}`, { role: 'member' }),
        two.patch(`/api/people/${one.id}`, { role: 'member' }),
      ]);
      const statuses = answers.map(({ status }) => status);
      expect(statuses.filter((status) => status === 200)).toHaveLength(1);
      // Who came second is the last one, or is none any more when it is asked.
      expect([403, 409]).toContain(statuses.find((status) => status !== 200));
      const left = await db
        .select()
        .from(people)
        .where(and(eq(people.organisationRole, 'administrator')));
      expect(left).toHaveLength(1);
    }
  });
});
