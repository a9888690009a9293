import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { products, reviews, runs, scenarioRevisions, scenarios, variants } from '../../db/schema';

/** A living scenario with the names around it. */
export async function findScenario(db: Executor, scenarioId: string) {
  const [row] = await db
    .select({
      id: scenarios.id,
      name: scenarios.name,
      variantId: variants.id,
      variantName: variants.name,
      productId: products.id,
      productName: products.name,
    })
    .from(scenarios)
    .innerJoin(variants, eq(variants.id, scenarios.variantId))
    .innerJoin(products, eq(products.id, variants.productId))
    .where(
      and(
        eq(scenarios.id, scenarioId),
        isNull(scenarios.archivedAt),
        isNull(variants.archivedAt),
        isNull(products.archivedAt),
      ),
    );
  return row;
}

/**
 * Locks a living variant until the transaction ends. Whoever adds to a variant, or deletes of it, holds this lock,
 * so the numbers of its revisions and of its scenarios' have no gaps and no one overtakes another unseen.
 */
export async function lockVariant(tx: Tx, variantId: string) {
  const [row] = await tx
    .select({ id: variants.id, name: variants.name, productId: variants.productId })
    .from(variants)
    .where(and(eq(variants.id, variantId), isNull(variants.archivedAt)))
    .for('no key update');
  return row;
}

/** The same by one of its scenarios. */
export async function lockVariantOf(tx: Tx, scenarioId: string) {
  const [scenario] = await tx
    .select({ variantId: scenarios.variantId })
    .from(scenarios)
    .where(eq(scenarios.id, scenarioId));
  return scenario && lockVariant(tx, scenario.variantId);
}

export async function insertScenario(
  tx: Tx,
  scenario: { variantId: string; name: string },
): Promise<{ id: string }> {
  const [row] = await tx.insert(scenarios).values(scenario).returning({ id: scenarios.id });
  return row;
}

export async function renameScenario(db: Executor, scenarioId: string, name: string): Promise<void> {
  await db.update(scenarios).set({ name }).where(eq(scenarios.id, scenarioId));
}

export async function archiveScenario(tx: Tx, scenarioId: string): Promise<void> {
  await tx
    .update(scenarios)
    .set({ archivedAt: sql`now()` })
    .where(eq(scenarios.id, scenarioId));
}

/** @returns the names of those that were living until now */
export async function archiveScenariosOf(tx: Tx, variantIds: readonly string[]): Promise<string[]> {
  const rows = await tx
    .update(scenarios)
    .set({ archivedAt: sql`now()` })
    .where(and(inArray(scenarios.variantId, [...variantIds]), isNull(scenarios.archivedAt)))
    .returning({ name: scenarios.name });
  return rows.map(({ name }) => name);
}

/** The living scenarios of variants that were run, and so perhaps reviewed: they go only when they are named. */
export function listUsedScenarios(db: Executor, variantIds: readonly string[]) {
  return db
    .selectDistinct({ variantId: scenarios.variantId, name: scenarios.name })
    .from(scenarios)
    .innerJoin(scenarioRevisions, eq(scenarioRevisions.scenarioId, scenarios.id))
    .innerJoin(runs, eq(runs.scenarioRevisionId, scenarioRevisions.id))
    .where(and(inArray(scenarios.variantId, [...variantIds]), isNull(scenarios.archivedAt)))
    .orderBy(scenarios.name);
}

/** Whether a scenario waits for a reviewer, or holds an approval that stands. */
export async function hasStandingReview(db: Executor, scenarioId: string): Promise<boolean> {
  const found = await db
    .select({ id: reviews.id })
    .from(reviews)
    .innerJoin(scenarioRevisions, eq(scenarioRevisions.id, reviews.scenarioRevisionId))
    .where(and(eq(scenarioRevisions.scenarioId, scenarioId), inArray(reviews.state, ['asked', 'approved'])))
    .limit(1);
  return found.length > 0;
}
