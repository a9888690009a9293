import { z } from 'zod';
import {
  idSchema,
  productChangeSchema,
  productDraftSchema,
  productSchema,
} from '../../../shared/contracts/api';
import { type Caller, route } from '../../platform/routing';
import { inOrganisation, inProduct } from '../../policies';
import { memberRoutes } from './members.routes';
import {
  changeProduct,
  createProduct,
  deleteProduct,
  type ProductDependencies,
  readProduct,
  readProducts,
} from './products.usecases';

const params = z.object({ productId: idSchema });
const path = '/products/:productId';

const readerOf = ({ personId, organisationRole }: Caller) => ({
  personId,
  seesAll: organisationRole === 'administrator',
});

/** Products and who has which role in them. */
export function productRoutes(dependencies: ProductDependencies) {
  return [
    route({
      method: 'GET',
      path: '/products',
      summary: "The products in which the caller has a role; an administrator's list holds all",
      policy: inOrganisation('product.list'),
      response: z.object({ items: z.array(productSchema) }),
      handler: async ({ caller }) => ({ items: await readProducts(dependencies, readerOf(caller)) }),
    }),
    route({
      method: 'POST',
      path: '/products',
      summary: 'Makes a product, of which the caller becomes a designer',
      policy: inOrganisation('product.create'),
      body: productDraftSchema,
      status: 201,
      response: productSchema,
      handler: async ({ body, caller, requestId }) => {
        const id = await createProduct(dependencies, { personId: caller.personId, requestId }, body);
        return readProduct(dependencies, readerOf(caller), id);
      },
    }),
    route({
      method: 'GET',
      path,
      summary: 'A product',
      policy: inProduct('product.view', 'productId'),
      params,
      response: productSchema,
      handler: ({ params: { productId }, caller }) => readProduct(dependencies, readerOf(caller), productId),
    }),
    route({
      method: 'PATCH',
      path,
      summary: 'Changes the name or the description of a product',
      policy: inProduct('product.edit', 'productId'),
      params,
      body: productChangeSchema,
      response: productSchema,
      handler: async ({ params: { productId }, body, caller }) => {
        await changeProduct(dependencies, productId, body);
        return readProduct(dependencies, readerOf(caller), productId);
      },
    }),
    route({
      method: 'DELETE',
      path,
      summary: 'Takes a product away, unless a scenario in it was run',
      policy: inProduct('product.archive', 'productId'),
      params,
      handler: async ({ params: { productId }, caller: { personId }, requestId }) => {
        await deleteProduct(dependencies, { personId, requestId }, productId);
        return undefined;
      },
    }),
    ...memberRoutes(dependencies),
  ];
}
