import { sql, type SQL } from 'drizzle-orm';
import type { Executor } from './client';

/** How to find the product of each kind of thing, by the parameter that names one in a path. */
const PRODUCT_QUERIES = {
  productId: (id) => sql`select id as product_id from products where id = ${id}`,
  variantId: (id) => sql`select product_id from variants where id = ${id}`,
  variantRevisionId: (id) => sql`
    select product_id from variant_revisions r join variants v on v.id = r.variant_id where r.id = ${id}`,
  partId: (id) => sql`select product_id from parts where id = ${id}`,
  partRevisionId: (id) => sql`
    select product_id from part_revisions r join parts p on p.id = r.part_id where r.id = ${id}`,
  scenarioId: (id) => sql`
    select product_id from scenarios s join variants v on v.id = s.variant_id where s.id = ${id}`,
  scenarioRevisionId: (id) => sql`
    select product_id from scenario_revisions r
      join scenarios s on s.id = r.scenario_id join variants v on v.id = s.variant_id where r.id = ${id}`,
  runId: (id) => sql`
    select product_id from runs
      join scenario_revisions r on r.id = runs.scenario_revision_id
      join scenarios s on s.id = r.scenario_id join variants v on v.id = s.variant_id where runs.id = ${id}`,
  reviewId: (id) => sql`
    select product_id from reviews
      join scenario_revisions r on r.id = reviews.scenario_revision_id
      join scenarios s on s.id = r.scenario_id join variants v on v.id = s.variant_id where reviews.id = ${id}`,
} as const satisfies Record<string, (id: string) => SQL>;

export type ProductKey = keyof typeof PRODUCT_QUERIES;

export interface FoundProduct {
  readonly id: string;
  /** Of the person in it, undefined without a membership. */
  readonly role: 'designer' | 'reviewer' | 'viewer' | undefined;
}

/**
 * The product that a thing belongs to, and a person's role in it.
 *
 * @param id a uuid
 * @returns undefined where there is no such thing
 */
export async function findProduct(
  db: Executor,
  personId: string,
  key: ProductKey,
  id: string,
): Promise<FoundProduct | undefined> {
  const { rows } = await db.execute<{
    product_id: string;
    role: NonNullable<FoundProduct['role']> | null;
  }>(sql`
    select found.product_id, memberships.role
    from (${PRODUCT_QUERIES[key](id)}) as found
    left join memberships on memberships.product_id = found.product_id and memberships.person_id = ${personId}`);
  const [row] = rows;
  return row === undefined ? undefined : { id: row.product_id, role: row.role ?? undefined };
}
