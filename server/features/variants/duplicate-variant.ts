import type { Tx } from '../../db';
import {
  copyScenario,
  copyVariantRevision,
  findNewestRevisionId,
  listVariantRevisions,
  listWholeHeads,
} from './duplicate.repository';
import { insertVariant, type VariantRow } from './variants.repository';

/**
 * Copies a variant: its newest revision and those that its scenarios stand on, numbered anew in their order, and the
 * newest revision of every living scenario. Under the locks of the product and of the variant.
 *
 * @returns the key of the copy
 */
export async function duplicate(
  tx: Tx,
  original: Pick<VariantRow, 'id' | 'name' | 'productId'>,
  { name, authorId }: { name: string; authorId: string },
): Promise<string> {
  const variantId = await insertVariant(tx, { productId: original.productId, name });
  const note = `Copied from ${original.name}`;
  const heads = await listWholeHeads(tx, original.id);
  const needed = new Set([
    await findNewestRevisionId(tx, original.id),
    ...heads.map(({ revision }) => revision.variantRevisionId),
  ]);

  const copies = new Map<string, string>();
  for (const revision of await listVariantRevisions(tx, original.id)) {
    if (!needed.has(revision.id)) continue;
    const copy = { variantId, number: copies.size + 1, note, authorId };
    copies.set(revision.id, await copyVariantRevision(tx, revision, copy));
  }
  const oldestFirst = [...heads].sort((a, b) => a.createdAt.getTime() - b.createdAt.getTime());
  for (const head of oldestFirst) {
    const variantRevisionId = copies.get(head.revision.variantRevisionId);
    if (variantRevisionId === undefined)
      throw new Error('a scenario stands on a revision of another variant');
    await copyScenario(tx, head, { variantId, variantRevisionId, note, authorId });
  }
  return variantId;
}
