import { and, eq, sql } from 'drizzle-orm';
import type { Executor } from '../../db';
import { people } from '../../db/schema';

/** What a sign-in needs to know of the person with an e-mail address, in whatever case it is written. */
export async function findCredentials(db: Executor, email: string) {
  const [person] = await db
    .select()
    .from(people)
    .where(eq(sql`lower(${people.email})`, email.toLowerCase()));
  return person;
}

export async function findPasswordHash(db: Executor, personId: string): Promise<string | undefined> {
  const [person] = await db
    .select({ passwordHash: people.passwordHash })
    .from(people)
    .where(eq(people.id, personId));
  return person?.passwordHash;
}

export async function updatePasswordHash(
  db: Executor,
  personId: string,
  passwordHash: string,
): Promise<void> {
  await db.update(people).set({ passwordHash }).where(eq(people.id, personId));
}

/** The same password under a new hash; nothing where the password was changed in the meantime. */
export async function replacePasswordHash(
  db: Executor,
  personId: string,
  { from, to }: { from: string; to: string },
): Promise<void> {
  await db
    .update(people)
    .set({ passwordHash: to })
    .where(and(eq(people.id, personId), eq(people.passwordHash, from)));
}
