import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Executor } from '../../db';
import { people, sessions } from '../../db/schema';
import type { Caller } from '../../platform/routing';

/** The person behind a living session, by the hash of its token. */
export async function findCaller(db: Executor, tokenHash: string): Promise<Caller | undefined> {
  const [row] = await db
    .select({
      personId: people.id,
      sessionId: sessions.id,
      name: people.name,
      email: people.email,
      organisationRole: people.organisationRole,
      mayCreateProducts: people.mayCreateProducts,
    })
    .from(sessions)
    .innerJoin(people, eq(people.id, sessions.personId))
    .where(
      and(eq(sessions.tokenHash, tokenHash), gt(sessions.expiresAt, sql`now()`), isNull(people.disabledAt)),
    );
  return row;
}
