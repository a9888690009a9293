import { and, desc, eq } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { variantRevisions } from '../../db/schema';

/** The newest revision of a variant that reads exactly so. */
export async function findRevisionLike(db: Executor, variantId: string, description: string) {
  const [row] = await db
    .select({ id: variantRevisions.id, number: variantRevisions.number })
    .from(variantRevisions)
    .where(and(eq(variantRevisions.variantId, variantId), eq(variantRevisions.description, description)))
    .orderBy(desc(variantRevisions.number))
    .limit(1);
  return row;
}

async function newestNumber(tx: Tx, variantId: string): Promise<number> {
  const [row] = await tx
    .select({ number: variantRevisions.number })
    .from(variantRevisions)
    .where(eq(variantRevisions.variantId, variantId))
    .orderBy(desc(variantRevisions.number))
    .limit(1);
  return row?.number ?? 0;
}

export interface NewVariantRevision {
  readonly variantId: string;
  readonly description: string;
  readonly note: string;
  readonly authorId: string;
}

/** Under the lock of the variant. */
export async function appendVariantRevision(tx: Tx, revision: NewVariantRevision) {
  const number = (await newestNumber(tx, revision.variantId)) + 1;
  const [row] = await tx
    .insert(variantRevisions)
    .values({ ...revision, number })
    .returning({ id: variantRevisions.id, number: variantRevisions.number });
  return row;
}
