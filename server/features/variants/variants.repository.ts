import { and, asc, desc, eq, inArray, isNull, max, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { products, scenarioRevisions, scenarios, variantRevisions, variants } from '../../db/schema';

const columns = {
  id: variants.id,
  productId: variants.productId,
  name: variants.name,
  createdAt: variants.createdAt,
};

/** The living variants of a living product, in their order on the ladder. */
export function listVariants(db: Executor, productId: string) {
  return db
    .select(columns)
    .from(variants)
    .innerJoin(products, eq(products.id, variants.productId))
    .where(and(eq(products.id, productId), isNull(variants.archivedAt), isNull(products.archivedAt)))
    .orderBy(asc(variants.position), asc(variants.createdAt), asc(variants.id));
}

export type VariantRow = Awaited<ReturnType<typeof listVariants>>[number];

export async function findVariant(db: Executor, variantId: string): Promise<VariantRow | undefined> {
  const [row] = await db
    .select(columns)
    .from(variants)
    .innerJoin(products, eq(products.id, variants.productId))
    .where(and(eq(variants.id, variantId), isNull(variants.archivedAt), isNull(products.archivedAt)));
  return row;
}

/** The number of the newest revision of each variant. */
export async function newestRevisions(
  db: Executor,
  variantIds: readonly string[],
): Promise<ReadonlyMap<string, number>> {
  const rows = await db
    .select({ variantId: variantRevisions.variantId, number: max(variantRevisions.number) })
    .from(variantRevisions)
    .where(inArray(variantRevisions.variantId, [...variantIds]))
    .groupBy(variantRevisions.variantId);
  return new Map(rows.map(({ variantId, number }) => [variantId, number ?? 0]));
}

/** The living scenarios of variants, each with its newest revision, in the order in which they were made. */
export async function listHeads(db: Executor, variantIds: readonly string[]) {
  const rows = await db
    .selectDistinctOn([scenarios.id], {
      variantId: scenarios.variantId,
      scenarioId: scenarios.id,
      name: scenarios.name,
      createdAt: scenarios.createdAt,
      revisionId: scenarioRevisions.id,
      revision: scenarioRevisions.number,
      savedAt: scenarioRevisions.createdAt,
    })
    .from(scenarios)
    .innerJoin(scenarioRevisions, eq(scenarioRevisions.scenarioId, scenarios.id))
    .where(and(inArray(scenarios.variantId, [...variantIds]), isNull(scenarios.archivedAt)))
    .orderBy(scenarios.id, desc(scenarioRevisions.number));
  return rows.sort((a, b) => a.createdAt.getTime() - b.createdAt.getTime() || (a.name < b.name ? -1 : 1));
}

export type HeadRow = Awaited<ReturnType<typeof listHeads>>[number];

/** Locks a living product until the transaction ends: whoever adds variants to it, or deletes it, holds this lock. */
export async function lockProduct(tx: Tx, productId: string) {
  const [row] = await tx
    .select({ id: products.id })
    .from(products)
    .where(and(eq(products.id, productId), isNull(products.archivedAt)))
    .for('no key update');
  return row;
}

/** Adds a variant at the end of the ladder; under the lock of the product. */
export async function insertVariant(
  tx: Tx,
  { productId, name }: { productId: string; name: string },
): Promise<string> {
  const [last] = await tx
    .select({ position: max(variants.position) })
    .from(variants)
    .where(eq(variants.productId, productId));
  const [row] = await tx
    .insert(variants)
    .values({ productId, name, position: (last?.position ?? 0) + 1 })
    .returning({ id: variants.id });
  return row.id;
}

export async function renameVariant(db: Executor, variantId: string, name: string): Promise<boolean> {
  const { rowCount } = await db
    .update(variants)
    .set({ name })
    .where(and(eq(variants.id, variantId), isNull(variants.archivedAt)));
  return rowCount === 1;
}

/** Locks the living variants of a product, always in the same order; under the lock of the product. */
export function lockVariants(tx: Tx, productId: string) {
  return tx
    .select({ id: variants.id, name: variants.name })
    .from(variants)
    .where(and(eq(variants.productId, productId), isNull(variants.archivedAt)))
    .orderBy(asc(variants.id))
    .for('no key update');
}

export async function archiveVariants(tx: Tx, ids: readonly string[]): Promise<void> {
  await tx
    .update(variants)
    .set({ archivedAt: sql`now()` })
    .where(inArray(variants.id, [...ids]));
}
