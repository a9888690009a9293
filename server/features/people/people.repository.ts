import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { memberships, people } from '../../db/schema';

export type PersonRow = typeof people.$inferSelect;
export type PersonValues = Partial<typeof people.$inferInsert>;

const present = isNull(people.removedAt);

/** Everybody who was not removed, by name. */
export function selectPeople(db: Executor): Promise<PersonRow[]> {
  return db.select().from(people).where(present).orderBy(asc(people.name), asc(people.email));
}

/** Everybody who may sign in, by name. */
export function selectDirectory(db: Executor) {
  return db
    .select({ id: people.id, name: people.name, email: people.email })
    .from(people)
    .where(isNull(people.disabledAt))
    .orderBy(asc(people.name), asc(people.email));
}

/** Somebody who was not removed, held until the transaction ends. */
export async function lockPerson(tx: Tx, id: string): Promise<PersonRow | undefined> {
  const [person] = await tx
    .select()
    .from(people)
    .where(and(eq(people.id, id), present))
    .for('update');
  return person;
}

/** Also somebody who was removed: an e-mail address belongs to one person for ever. */
export async function findByEmail(db: Executor, email: string): Promise<PersonRow | undefined> {
  const [person] = await db
    .select()
    .from(people)
    .where(eq(sql`lower(${people.email})`, email.toLowerCase()));
  return person;
}

/**
 * The ids of all administrators who may sign in, held until the transaction ends: of two that take away
 * administrators at once, the second sees what the first has left.
 */
export async function lockAdministrators(tx: Tx): Promise<string[]> {
  const rows = await tx
    .select({ id: people.id })
    .from(people)
    .where(and(eq(people.organisationRole, 'administrator'), isNull(people.disabledAt)))
    .orderBy(asc(people.id))
    .for('update');
  return rows.map(({ id }) => id);
}

export async function insertPerson(tx: Tx, values: typeof people.$inferInsert): Promise<PersonRow> {
  const [person] = await tx.insert(people).values(values).returning();
  return person;
}

export async function updatePerson(tx: Tx, id: string, values: PersonValues): Promise<PersonRow> {
  const [person] = await tx.update(people).set(values).where(eq(people.id, id)).returning();
  return person;
}

/** @returns how many roles there were */
export async function deleteMembershipsOf(tx: Tx, personId: string): Promise<number> {
  const { rowCount } = await tx.delete(memberships).where(eq(memberships.personId, personId));
  return rowCount ?? 0;
}
