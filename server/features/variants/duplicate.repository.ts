import { and, asc, desc, eq, isNull } from 'drizzle-orm';
import type { Tx } from '../../db';
import { scenarioRevisions, scenarios, variantRevisionParts, variantRevisions } from '../../db/schema';

/** The newest revision of a variant; every variant has one. */
export async function findNewestRevisionId(tx: Tx, variantId: string): Promise<string> {
  const [row] = await tx
    .select({ id: variantRevisions.id })
    .from(variantRevisions)
    .where(eq(variantRevisions.variantId, variantId))
    .orderBy(desc(variantRevisions.number))
    .limit(1);
  return row.id;
}

/** The newest revisions of a variant's living scenarios, whole. */
export function listWholeHeads(tx: Tx, variantId: string) {
  return tx
    .selectDistinctOn([scenarios.id], {
      name: scenarios.name,
      createdAt: scenarios.createdAt,
      revision: scenarioRevisions,
    })
    .from(scenarios)
    .innerJoin(scenarioRevisions, eq(scenarioRevisions.scenarioId, scenarios.id))
    .where(and(eq(scenarios.variantId, variantId), isNull(scenarios.archivedAt)))
    .orderBy(scenarios.id, desc(scenarioRevisions.number));
}

/** All revisions of a variant, oldest first. */
export function listVariantRevisions(tx: Tx, variantId: string) {
  return tx
    .select()
    .from(variantRevisions)
    .where(eq(variantRevisions.variantId, variantId))
    .orderBy(asc(variantRevisions.number));
}

/** A copy of a variant's revision under another variant and number, with the parts it carries. */
export async function copyVariantRevision(
  tx: Tx,
  { id, description }: { id: string; description: string },
  copy: { variantId: string; number: number; note: string; authorId: string },
): Promise<string> {
  const [row] = await tx
    .insert(variantRevisions)
    .values({ ...copy, description })
    .returning({ id: variantRevisions.id });
  const carried = await tx
    .select({ partRevisionId: variantRevisionParts.partRevisionId })
    .from(variantRevisionParts)
    .where(eq(variantRevisionParts.variantRevisionId, id));
  if (carried.length > 0) {
    await tx
      .insert(variantRevisionParts)
      .values(carried.map(({ partRevisionId }) => ({ variantRevisionId: row.id, partRevisionId })));
  }
  return row.id;
}

/** A copy of a scenario with one revision, the first. */
export async function copyScenario(
  tx: Tx,
  { name, revision }: { name: string; revision: typeof scenarioRevisions.$inferSelect },
  copy: { variantId: string; variantRevisionId: string; note: string; authorId: string },
): Promise<void> {
  const { variantId, variantRevisionId, note, authorId } = copy;
  const [scenario] = await tx.insert(scenarios).values({ variantId, name }).returning({ id: scenarios.id });
  const { toleranceSet, study, studyHash, answerHash } = revision;
  await tx.insert(scenarioRevisions).values({
    ...{ toleranceSet, study, studyHash, answerHash, variantRevisionId, note, authorId },
    scenarioId: scenario.id,
    number: 1,
  });
}
