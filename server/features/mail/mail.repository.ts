import { and, asc, desc, eq, isNull, lte, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { mailOutbox } from '../../db/schema';
import type { Letter } from '../../platform/mail/mail-transport';

export async function insertLetter(db: Executor, { to, subject, text }: Letter): Promise<void> {
  await db.insert(mailOutbox).values({ recipient: to, subject, text });
}

/** The newest letters, sent or not. */
export function selectLetters(db: Executor, limit: number) {
  return db.select().from(mailOutbox).orderBy(desc(mailOutbox.createdAt)).limit(limit);
}

/** The oldest letter that is due and in nobody else's hands; held until the transaction ends. */
export async function takeDueLetter(tx: Tx) {
  const [letter] = await tx
    .select()
    .from(mailOutbox)
    .where(and(isNull(mailOutbox.sentAt), lte(mailOutbox.dueAt, sql`now()`)))
    .orderBy(asc(mailOutbox.dueAt))
    .limit(1)
    .for('update', { skipLocked: true });
  return letter;
}

export async function markSent(tx: Tx, id: string): Promise<void> {
  await tx
    .update(mailOutbox)
    .set({ sentAt: sql`now()`, attempts: sql`${mailOutbox.attempts} + 1`, lastError: null })
    .where(eq(mailOutbox.id, id));
}

/** @param pauseSeconds until the next attempt */
export async function markFailed(tx: Tx, id: string, error: string, pauseSeconds: number): Promise<void> {
  await tx
    .update(mailOutbox)
    .set({
      attempts: sql`${mailOutbox.attempts} + 1`,
      lastError: error,
      dueAt: sql`now() + make_interval(secs => ${pauseSeconds})`,
    })
    .where(eq(mailOutbox.id, id));
}
