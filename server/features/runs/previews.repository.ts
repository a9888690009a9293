import { and, eq, lt, sql } from 'drizzle-orm';
import type { Executor } from '../../db';
import { previewCache } from '../../db/schema';

/** What an answer depends on. */
export interface AnswerKey {
  readonly answerHash: string;
  readonly engineVersion: string;
  /** Empty for answers without a map. */
  readonly mapHash: string;
}

/** The text of an answer that was computed before. */
export async function findKept(db: Executor, key: AnswerKey): Promise<string | undefined> {
  const { answerHash, engineVersion, mapHash, result } = previewCache;
  const [row] = await db
    .update(previewCache)
    .set({ lastUsedAt: sql`now()` })
    .where(
      and(eq(answerHash, key.answerHash), eq(engineVersion, key.engineVersion), eq(mapHash, key.mapHash)),
    )
    .returning({ result });
  return row?.result;
}

export async function keepAnswer(db: Executor, key: AnswerKey, result: string): Promise<void> {
  await db
    .insert(previewCache)
    .values({ ...key, result })
    .onConflictDoNothing();
}

/** @returns how many are gone */
export async function forgetUnused(db: Executor, days: number): Promise<number> {
  const { rowCount } = await db
    .delete(previewCache)
    .where(lt(previewCache.lastUsedAt, sql`now() - make_interval(days => ${days})`));
  return rowCount ?? 0;
}
