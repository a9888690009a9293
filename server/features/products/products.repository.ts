import { and, asc, eq, inArray, isNull, max, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { memberships, products, scenarioRevisions, scenarios, variants } from '../../db/schema';

export interface Reader {
  readonly personId: string;
  /** Sees products without a role in them. */
  readonly seesAll: boolean;
}

function selectProducts(db: Executor, { personId }: Reader) {
  return db
    .select({
      id: products.id,
      name: products.name,
      description: products.description,
      createdAt: products.createdAt,
      role: memberships.role,
    })
    .from(products)
    .leftJoin(memberships, and(eq(memberships.productId, products.id), eq(memberships.personId, personId)))
    .$dynamic();
}

export type ProductRow = Awaited<ReturnType<typeof selectProducts>>[number];

/** The living products in which the reader has a role, or all of them, by name. */
export function listProducts(db: Executor, reader: Reader): Promise<ProductRow[]> {
  const visible = reader.seesAll ? undefined : sql`${memberships.role} is not null`;
  return selectProducts(db, reader)
    .where(and(isNull(products.archivedAt), visible))
    .orderBy(asc(sql`lower(${products.name})`));
}

export async function findProductRow(
  db: Executor,
  reader: Reader,
  productId: string,
): Promise<ProductRow | undefined> {
  const [row] = await selectProducts(db, reader).where(
    and(eq(products.id, productId), isNull(products.archivedAt)),
  );
  return row;
}

/** Whether there is such a product, and it was not deleted. */
export async function isLiving(db: Executor, productId: string): Promise<boolean> {
  const found = await db
    .select({ id: products.id })
    .from(products)
    .where(and(eq(products.id, productId), isNull(products.archivedAt)));
  return found.length > 0;
}

export interface Contents {
  readonly variants: number;
  readonly lastSaved: Date | null;
}

/** How many living variants products hold, and when something was last saved in one of them. */
export async function countContents(
  db: Executor,
  productIds: readonly string[],
): Promise<ReadonlyMap<string, Contents>> {
  const rows = await db
    .select({
      productId: variants.productId,
      variants: sql<number>`count(distinct ${variants.id})`.mapWith(Number),
      lastSaved: max(scenarioRevisions.createdAt),
    })
    .from(variants)
    .leftJoin(scenarios, eq(scenarios.variantId, variants.id))
    .leftJoin(scenarioRevisions, eq(scenarioRevisions.scenarioId, scenarios.id))
    .where(and(inArray(variants.productId, [...productIds]), isNull(variants.archivedAt)))
    .groupBy(variants.productId);
  return new Map(rows.map(({ productId, ...contents }) => [productId, contents]));
}

export async function insertProduct(
  tx: Tx,
  product: { name: string; description: string; createdBy: string },
): Promise<string> {
  const [row] = await tx.insert(products).values(product).returning({ id: products.id });
  return row.id;
}

export async function updateProduct(
  db: Executor,
  productId: string,
  change: { name?: string; description?: string },
): Promise<boolean> {
  const { rowCount } = await db
    .update(products)
    .set(change)
    .where(and(eq(products.id, productId), isNull(products.archivedAt)));
  return rowCount === 1;
}

export async function archiveProduct(tx: Tx, productId: string): Promise<{ name: string }> {
  const [row] = await tx
    .update(products)
    .set({ archivedAt: sql`now()` })
    .where(eq(products.id, productId))
    .returning({ name: products.name });
  return row;
}
