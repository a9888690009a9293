import { desc, eq, inArray, lt } from 'drizzle-orm';
import { unionAll } from 'drizzle-orm/pg-core';
import type { Executor } from '../../db';
import { audit, invitations, parts, people, products, scenarios, variants } from '../../db/schema';

/** Entries with the present name of who acted, the newest first. */
export function selectEntries(
  db: Executor,
  { before, limit }: { before: number | undefined; limit: number },
) {
  return db
    .select({
      id: audit.id,
      at: audit.at,
      who: people.name,
      action: audit.action,
      objectKind: audit.objectKind,
      objectId: audit.objectId,
      data: audit.data,
    })
    .from(audit)
    .leftJoin(people, eq(people.id, audit.personId))
    .where(before === undefined ? undefined : lt(audit.id, before))
    .orderBy(desc(audit.id))
    .limit(limit);
}

export type EntryRow = Awaited<ReturnType<typeof selectEntries>>[number];

/** The present names of things, by their ids; what has no name, or is gone, is left out. */
export async function selectNames(
  db: Executor,
  ids: readonly string[],
): Promise<ReadonlyMap<string, string>> {
  if (ids.length === 0) return new Map();
  const namesIn = (
    table:
      | typeof people
      | typeof invitations
      | typeof products
      | typeof variants
      | typeof scenarios
      | typeof parts,
  ) =>
    db
      .select({ id: table.id, name: table.name })
      .from(table)
      .where(inArray(table.id, [...ids]));
  const rows = await unionAll(
    namesIn(people),
    namesIn(invitations),
    namesIn(products),
    namesIn(variants),
    namesIn(scenarios),
    namesIn(parts),
  );
  return new Map(rows.map(({ id, name }) => [id, name]));
}
