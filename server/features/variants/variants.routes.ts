import { z } from 'zod';
import { idSchema, renameSchema, variantDraftSchema, variantSchema } from '../../../shared/contracts/api';
import { notFound } from '../../platform/problem';
import { type ProductAccess, route } from '../../platform/routing';
import { inProduct } from '../../policies';
import {
  changeVariantName,
  createVariant,
  deleteVariant,
  duplicateVariant,
  readVariant,
  readVariants,
  type VariantDependencies,
} from './variants.usecases';

const params = z.object({ variantId: idSchema });
const inProductParams = z.object({ productId: idSchema });

function idOf(product: ProductAccess | undefined): string {
  if (product === undefined) throw notFound();
  return product.id;
}

/** The variants of a product. */
export function variantRoutes(dependencies: VariantDependencies) {
  return [
    route({
      method: 'GET',
      path: '/products/:productId/variants',
      summary: 'The variants of a product with the newest answers of their scenarios',
      policy: inProduct('variant.view', 'productId'),
      params: inProductParams,
      response: z.object({ items: z.array(variantSchema) }),
      handler: async ({ params: { productId } }) => ({ items: await readVariants(dependencies, productId) }),
    }),
    route({
      method: 'POST',
      path: '/products/:productId/variants',
      summary: 'Adds a variant with a first scenario, both from one study',
      policy: inProduct('variant.edit', 'productId'),
      params: inProductParams,
      body: variantDraftSchema,
      status: 201,
      response: variantSchema,
      handler: async ({ params: { productId }, body, caller: { personId }, requestId }) => {
        const id = await createVariant(dependencies, { personId, requestId }, productId, body);
        return readVariant(dependencies, id);
      },
    }),
    route({
      method: 'GET',
      path: '/variants/:variantId',
      summary: 'A variant with the newest answers of its scenarios',
      policy: inProduct('variant.view', 'variantId'),
      params,
      response: variantSchema,
      handler: ({ params: { variantId } }) => readVariant(dependencies, variantId),
    }),
    route({
      method: 'PATCH',
      path: '/variants/:variantId',
      summary: 'Gives a variant another name',
      policy: inProduct('variant.edit', 'variantId'),
      params,
      body: renameSchema,
      response: variantSchema,
      handler: async ({ params: { variantId }, body }) => {
        await changeVariantName(dependencies, variantId, body);
        return readVariant(dependencies, variantId);
      },
    }),
    route({
      method: 'DELETE',
      path: '/variants/:variantId',
      summary: 'Takes a variant out of its product, unless one of its scenarios was run',
      policy: inProduct('variant.edit', 'variantId'),
      params,
      handler: async ({ params: { variantId }, caller: { personId }, requestId }) => {
        await deleteVariant(dependencies, { personId, requestId }, variantId);
        return undefined;
      },
    }),
    route({
      method: 'POST',
      path: '/variants/:variantId/duplicate',
      summary: 'Copies a variant with the newest revision of each of its scenarios',
      policy: inProduct('variant.edit', 'variantId'),
      params,
      body: renameSchema,
      status: 201,
      response: variantSchema,
      handler: async ({ params: { variantId }, body, caller: { personId }, requestId, product }) => {
        const original = { variantId, productId: idOf(product) };
        const id = await duplicateVariant(dependencies, { personId, requestId }, original, body);
        return readVariant(dependencies, id);
      },
    }),
  ];
}
