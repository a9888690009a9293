import type { Product, ProductChange, ProductDraft } from '../../../shared/contracts/api';
import { type Db, inTransaction, isUniqueViolation, recordInAudit } from '../../db';
import { type Actor, archiveScenariosOf, listUsedScenarios } from '../scenarios';
import { archiveVariants, lockProduct, lockVariants } from '../variants';
import { putMember } from './members.repository';
import { recordMember } from './members.usecases';
import { noProduct, productInUse, productNameTaken } from './products.errors';
import {
  archiveProduct,
  type Contents,
  countContents,
  findProductRow,
  insertProduct,
  listProducts,
  type ProductRow,
  type Reader,
  updateProduct,
} from './products.repository';

export interface ProductDependencies {
  readonly db: Db;
}

/** @throws Problem product-name-taken in place of the database's refusal */
async function namingProduct<T>(name: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (isUniqueViolation(error, 'products_name_unique')) throw productNameTaken(name);
    throw error;
  }
}

function view({ createdAt, ...row }: ProductRow, contents: Contents | undefined): Product {
  const changed = contents?.lastSaved ?? createdAt;
  return { ...row, variants: contents?.variants ?? 0, changedAt: changed.toISOString() };
}

/** The products that the reader may see. */
export async function readProducts({ db }: ProductDependencies, reader: Reader): Promise<Product[]> {
  const rows = await listProducts(db, reader);
  const contents = await countContents(
    db,
    rows.map(({ id }) => id),
  );
  return rows.map((row) => view(row, contents.get(row.id)));
}

export async function readProduct(
  { db }: ProductDependencies,
  reader: Reader,
  productId: string,
): Promise<Product> {
  const row = await findProductRow(db, reader, productId);
  if (row === undefined) throw noProduct();
  const contents = await countContents(db, [productId]);
  return view(row, contents.get(productId));
}

/**
 * Makes a product; whoever does becomes its designer.
 *
 * @returns the key of the product
 */
export function createProduct(
  { db }: ProductDependencies,
  actor: Actor,
  { name, description }: ProductDraft,
): Promise<string> {
  const { personId } = actor;
  return namingProduct(name, () =>
    inTransaction(db, async (tx) => {
      const productId = await insertProduct(tx, { name, description, createdBy: personId });
      const key = { productId, personId };
      await putMember(tx, key, 'designer');
      await recordMember(tx, actor, key, 'membership.set', {
        role: { from: null, to: 'designer' },
      });
      return productId;
    }),
  );
}

export async function changeProduct(
  { db }: ProductDependencies,
  productId: string,
  change: ProductChange,
): Promise<void> {
  if (change.name === undefined && change.description === undefined) return;
  const changed = await namingProduct(change.name ?? '', () => updateProduct(db, productId, change));
  if (!changed) throw noProduct();
}

/**
 * Takes a product away, and with it its variants and scenarios, provided that none of these was ever run.
 *
 * @throws Problem product-in-use with the names of those that were
 */
export async function deleteProduct(
  { db }: ProductDependencies,
  actor: Actor,
  productId: string,
): Promise<void> {
  await inTransaction(db, async (tx) => {
    if ((await lockProduct(tx, productId)) === undefined) throw noProduct();
    const variants = await lockVariants(tx, productId);
    const ids = variants.map(({ id }) => id);
    const used = await listUsedScenarios(tx, ids);
    const { name } = await archiveProduct(tx, productId);
    if (used.length > 0) {
      const names = new Map(variants.map((variant) => [variant.id, variant.name]));
      throw productInUse(
        name,
        used.map((scenario) => `"${scenario.name}" of "${names.get(scenario.variantId) ?? ''}"`),
      );
    }
    const scenarios = await archiveScenariosOf(tx, ids);
    await archiveVariants(tx, ids);
    await recordInAudit(tx, {
      ...actor,
      action: 'product.deleted',
      objectKind: 'product',
      objectId: productId,
      data: { name, variants: variants.map((variant) => variant.name), scenarios },
    });
  });
}
