import { asc, eq } from 'drizzle-orm';
import type { Tx } from '../../db';
import { organisationSettings, scenarioRevisions, scenarios, variants } from '../../db/schema';

export async function nameOrganisation(tx: Tx, name: string, changedBy: string): Promise<void> {
  await tx.insert(organisationSettings).values({ name, changedBy });
}

/** Every saved revision with its author, in the order of the ladders: in a database that holds the demo alone. */
export function selectRevisions(tx: Tx) {
  return tx
    .select({
      scenarioId: scenarioRevisions.scenarioId,
      revision: scenarioRevisions.number,
      personId: scenarioRevisions.authorId,
    })
    .from(scenarioRevisions)
    .innerJoin(scenarios, eq(scenarios.id, scenarioRevisions.scenarioId))
    .innerJoin(variants, eq(variants.id, scenarios.variantId))
    .orderBy(asc(variants.productId), asc(variants.position), asc(scenarios.name));
}
