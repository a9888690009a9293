import { randomInt } from 'node:crypto';
import { and, eq, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { scenarioDrafts, scenarioRevisions } from '../../db/schema';

/** Whose draft of which scenario. */
export interface DraftKey {
  readonly scenarioId: string;
  readonly personId: string;
}

function isDraft({ scenarioId, personId }: DraftKey) {
  return and(eq(scenarioDrafts.scenarioId, scenarioId), eq(scenarioDrafts.personId, personId));
}

export async function findDraft(db: Executor, key: DraftKey) {
  const [row] = await db
    .select({
      baseRevision: scenarioRevisions.number,
      version: scenarioDrafts.version,
      content: scenarioDrafts.content,
      at: scenarioDrafts.savedAt,
    })
    .from(scenarioDrafts)
    .innerJoin(scenarioRevisions, eq(scenarioRevisions.id, scenarioDrafts.baseRevisionId))
    .where(isDraft(key));
  return row;
}

export type DraftRow = NonNullable<Awaited<ReturnType<typeof findDraft>>>;

export interface DraftContent {
  readonly baseRevisionId: string;
  readonly content: string;
}

const kept = { version: scenarioDrafts.version, at: scenarioDrafts.savedAt };
/** Undefined where the draft did not have the version it was to have. */
type Kept = { version: number; at: Date } | undefined;

const FIRST_VERSIONS = 2 ** 30;

/**
 * A new draft, unless there is one. It begins with a version that no earlier draft is likely to have had: a window
 * that still knows a discarded draft must not take this one for it.
 */
export async function insertDraft(db: Executor, key: DraftKey, draft: DraftContent): Promise<Kept> {
  const [row] = await db
    .insert(scenarioDrafts)
    .values({ ...key, ...draft, version: randomInt(1, FIRST_VERSIONS) })
    .onConflictDoNothing()
    .returning(kept);
  return row;
}

/** Sets the draft where it still has that version. */
export async function updateDraft(
  db: Executor,
  key: DraftKey,
  version: number,
  draft: DraftContent,
): Promise<Kept> {
  const [row] = await db
    .update(scenarioDrafts)
    .set({ ...draft, version: sql`${scenarioDrafts.version} + 1`, savedAt: sql`now()` })
    .where(and(isDraft(key), eq(scenarioDrafts.version, version)))
    .returning(kept);
  return row;
}

/** @param version undefined: whatever it is */
export async function deleteDraft(
  db: Executor,
  key: DraftKey,
  version: number | undefined,
): Promise<boolean> {
  const { rowCount } = await db
    .delete(scenarioDrafts)
    .where(and(isDraft(key), version === undefined ? undefined : eq(scenarioDrafts.version, version)));
  return rowCount === 1;
}

/** Removes a draft that says no more than what was just saved; a newer one of another window stays. */
export async function deleteDraftEqualTo(tx: Tx, key: DraftKey, content: string): Promise<void> {
  await tx.delete(scenarioDrafts).where(and(isDraft(key), eq(scenarioDrafts.content, content)));
}

export async function findRevisionId(
  db: Executor,
  scenarioId: string,
  number: number,
): Promise<string | undefined> {
  const [row] = await db
    .select({ id: scenarioRevisions.id })
    .from(scenarioRevisions)
    .where(and(eq(scenarioRevisions.scenarioId, scenarioId), eq(scenarioRevisions.number, number)));
  return row?.id;
}
