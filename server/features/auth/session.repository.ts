import { and, desc, eq, gt, isNull, lt, lte, ne, or } from 'drizzle-orm';
import type { Executor } from '../../db';
import { people, sessions } from '../../db/schema';
import { later, LONGEST_IDLE_MS } from './session-lifetime';

function isLiving(now: Date) {
  return and(gt(sessions.expiresAt, now), gt(sessions.lastSeenAt, later(now, -LONGEST_IDLE_MS)));
}

function isOver(now: Date) {
  return or(lte(sessions.expiresAt, now), lte(sessions.lastSeenAt, later(now, -LONGEST_IDLE_MS)));
}

/** The person behind a living session, by the hash of its token. */
export async function findCaller(db: Executor, tokenHash: string, now: Date) {
  const [row] = await db
    .select({
      lastSeenAt: sessions.lastSeenAt,
      caller: {
        personId: people.id,
        sessionId: sessions.id,
        name: people.name,
        email: people.email,
        organisationRole: people.organisationRole,
        mayCreateProducts: people.mayCreateProducts,
      },
    })
    .from(sessions)
    .innerJoin(people, eq(people.id, sessions.personId))
    .where(and(eq(sessions.tokenHash, tokenHash), isLiving(now), isNull(people.disabledAt)));
  return row;
}

/** Writes down that somebody was here; a later moment that another request wrote stays. */
export async function markSeen(
  db: Executor,
  { sessionId, personId, now }: { sessionId: string; personId: string; now: Date },
): Promise<void> {
  await db
    .update(sessions)
    .set({ lastSeenAt: now })
    .where(and(eq(sessions.id, sessionId), lt(sessions.lastSeenAt, now)));
  await db
    .update(people)
    .set({ lastSeenAt: now })
    .where(and(eq(people.id, personId), or(isNull(people.lastSeenAt), lt(people.lastSeenAt, now))));
}

export async function insertSession(db: Executor, row: typeof sessions.$inferInsert): Promise<string> {
  const [{ id }] = await db.insert(sessions).values(row).returning({ id: sessions.id });
  return id;
}

/** The living sessions of a person, the one used last first. */
export function selectSessions(db: Executor, personId: string, now: Date) {
  return db
    .select()
    .from(sessions)
    .where(and(eq(sessions.personId, personId), isLiving(now)))
    .orderBy(desc(sessions.lastSeenAt), desc(sessions.createdAt));
}

/** @returns whether that person had such a session */
export async function deleteSession(db: Executor, personId: string, sessionId: string): Promise<boolean> {
  const { rowCount } = await db
    .delete(sessions)
    .where(and(eq(sessions.id, sessionId), eq(sessions.personId, personId)));
  return rowCount === 1;
}

/** @returns how many there were */
export async function deleteSessionsOf(db: Executor, personId: string): Promise<number> {
  const { rowCount } = await db.delete(sessions).where(eq(sessions.personId, personId));
  return rowCount ?? 0;
}

export async function deleteOtherSessions(
  db: Executor,
  personId: string,
  sessionId: string,
): Promise<number> {
  const { rowCount } = await db
    .delete(sessions)
    .where(and(eq(sessions.personId, personId), ne(sessions.id, sessionId)));
  return rowCount ?? 0;
}

/** Sessions that are over are of no use to anybody. */
export async function deleteEndedSessions(db: Executor, now: Date): Promise<void> {
  await db.delete(sessions).where(isOver(now));
}

export async function updateToken(db: Executor, sessionId: string, tokenHash: string): Promise<void> {
  await db.update(sessions).set({ tokenHash }).where(eq(sessions.id, sessionId));
}
