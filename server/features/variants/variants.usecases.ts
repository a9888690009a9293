import type { Rename, Variant, VariantDraft } from '../../../shared/contracts/api';
import { type Db, inTransaction, isUniqueViolation, recordInAudit } from '../../db';
import {
  type Actor,
  addScenario,
  archiveScenariosOf,
  listUsedScenarios,
  lockVariant,
  type SummariesOf,
} from '../scenarios';
import { readArrivingStudy } from '../../platform/arriving-study';
import { duplicate } from './duplicate-variant';
import { viewVariants } from './variant-views';
import { noProduct, noVariant, variantInUse, variantNameTaken } from './variants.errors';
import {
  archiveVariants,
  findVariant,
  insertVariant,
  listVariants,
  lockProduct,
  renameVariant,
} from './variants.repository';

/** The scenario that every variant begins with. */
export const FIRST_SCENARIO = 'Rated';

export interface VariantDependencies {
  readonly db: Db;
  readonly summariesOf: SummariesOf;
}

/** @throws Problem variant-name-taken in place of the database's refusal */
async function namingVariant<T>(name: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (isUniqueViolation(error, 'variants_name_unique')) throw variantNameTaken(name);
    throw error;
  }
}

/** The variants of a product in their order on the ladder. */
export async function readVariants(dependencies: VariantDependencies, productId: string): Promise<Variant[]> {
  return viewVariants(dependencies, await listVariants(dependencies.db, productId));
}

export async function readVariant(dependencies: VariantDependencies, variantId: string): Promise<Variant> {
  const row = await findVariant(dependencies.db, variantId);
  if (row === undefined) throw noVariant();
  const [variant] = await viewVariants(dependencies, [row]);
  return variant;
}

/**
 * Adds a variant, whose first revision and first scenario come from one study.
 *
 * @returns the key of the variant
 */
export function createVariant(
  { db }: Pick<VariantDependencies, 'db'>,
  actor: Actor,
  productId: string,
  { name, study }: VariantDraft,
): Promise<string> {
  const stored = readArrivingStudy(study);
  return namingVariant(name, () =>
    inTransaction(db, async (tx) => {
      if ((await lockProduct(tx, productId)) === undefined) throw noProduct();
      const variantId = await insertVariant(tx, { productId, name });
      await addScenario(tx, { variantId, name: FIRST_SCENARIO, stored, authorId: actor.personId });
      return variantId;
    }),
  );
}

/** @returns the key of the copy */
export async function duplicateVariant(
  { db }: VariantDependencies,
  actor: Actor,
  { productId, variantId }: { productId: string; variantId: string },
  { name }: Rename,
): Promise<string> {
  return namingVariant(name, () =>
    inTransaction(db, async (tx) => {
      if ((await lockProduct(tx, productId)) === undefined) throw noProduct();
      const original = await lockVariant(tx, variantId);
      if (original === undefined) throw noVariant();
      return duplicate(tx, original, { name, authorId: actor.personId });
    }),
  );
}

export async function changeVariantName(
  { db }: VariantDependencies,
  variantId: string,
  { name }: Rename,
): Promise<void> {
  const renamed = await namingVariant(name, () => renameVariant(db, variantId, name));
  if (!renamed) throw noVariant();
}

/**
 * Takes a variant out of its product, and with it its scenarios, provided that none of them was ever run.
 *
 * @throws Problem variant-in-use with the names of those that were
 */
export async function deleteVariant(
  { db }: VariantDependencies,
  actor: Actor,
  variantId: string,
): Promise<void> {
  await inTransaction(db, async (tx) => {
    const variant = await lockVariant(tx, variantId);
    if (variant === undefined) throw noVariant();
    const used = await listUsedScenarios(tx, [variantId]);
    if (used.length > 0) {
      throw variantInUse(
        variant.name,
        used.map(({ name }) => name),
      );
    }
    const scenarios = await archiveScenariosOf(tx, [variantId]);
    await archiveVariants(tx, [variantId]);
    const { name, productId } = variant;
    await recordInAudit(tx, {
      ...actor,
      action: 'variant.deleted',
      objectKind: 'variant',
      objectId: variantId,
      data: { name, productId, scenarios },
    });
  });
}
