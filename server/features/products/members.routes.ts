import { z } from 'zod';
import { idSchema, memberRoleSchema, memberSchema } from '../../../shared/contracts/api';
import { route } from '../../platform/routing';
import { inProduct } from '../../policies';
import { dropMember, readMembers, setMember } from './members.usecases';
import type { ProductDependencies } from './products.usecases';

const productParams = z.object({ productId: idSchema });
const memberParams = productParams.extend({ personId: idSchema });
const path = '/products/:productId/members/:personId';

export function memberRoutes(dependencies: ProductDependencies) {
  return [
    route({
      method: 'GET',
      path: '/products/:productId/members',
      summary: 'Who has which role in a product',
      policy: inProduct('members.view', 'productId'),
      params: productParams,
      response: z.object({ items: z.array(memberSchema) }),
      handler: async ({ params: { productId } }) => ({ items: await readMembers(dependencies, productId) }),
    }),
    route({
      method: 'PUT',
      path,
      summary: 'Gives somebody a role in a product',
      policy: inProduct('members.set', 'productId'),
      params: memberParams,
      body: memberRoleSchema,
      response: memberSchema,
      handler: ({ params: key, body: { role }, caller: { personId }, requestId }) =>
        setMember(dependencies, { personId, requestId }, key, role),
    }),
    route({
      method: 'DELETE',
      path,
      summary: 'Takes the role of somebody in a product; the last designer stays',
      policy: inProduct('members.set', 'productId'),
      params: memberParams,
      handler: async ({ params: key, caller: { personId }, requestId }) => {
        await dropMember(dependencies, { personId, requestId }, key);
        return undefined;
      },
    }),
  ];
}
