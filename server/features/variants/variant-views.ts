import type { Variant } from '../../../shared/contracts/api';
import type { Executor } from '../../db';
import type { SummariesOf } from '../scenarios';
import { type HeadRow, listHeads, newestRevisions, type VariantRow } from './variants.repository';

export interface VariantReading {
  readonly db: Executor;
  readonly summariesOf: SummariesOf;
}

function lastChange({ createdAt }: VariantRow, heads: readonly HeadRow[]): Date {
  return new Date(Math.max(createdAt.getTime(), ...heads.map(({ savedAt }) => savedAt.getTime())));
}

/** Variants with the newest answer of each of their scenarios. */
export async function viewVariants(
  { db, summariesOf }: VariantReading,
  rows: readonly VariantRow[],
): Promise<Variant[]> {
  const ids = rows.map(({ id }) => id);
  const [revisions, heads] = await Promise.all([newestRevisions(db, ids), listHeads(db, ids)]);
  const summaries = await summariesOf(heads.map(({ revisionId }) => revisionId));
  return rows.map((row) => {
    const own = heads.filter(({ variantId }) => variantId === row.id);
    return {
      id: row.id,
      productId: row.productId,
      name: row.name,
      revision: revisions.get(row.id) ?? 0,
      scenarios: own.map(({ scenarioId, name, revision, revisionId }) => ({
        ...{ id: scenarioId, name, revision },
        run: summaries.get(revisionId) ?? null,
      })),
      changedAt: lastChange(row, own).toISOString(),
    };
  });
}
