import type { IncomingHttpHeaders } from 'node:http';
import { z } from 'zod';
import { type Db, findProduct } from './db';
import { forbidden, notFound, unauthenticated } from './platform/problem';
import type { AccessControl, Caller, ProductAccess } from './platform/routing';
import { type AccessRule, decideInProduct, mayInOrganisation } from './policies';

export interface AccessDependencies {
  readonly db: Db;
  readonly identify: (headers: IncomingHttpHeaders) => Promise<Caller | undefined>;
}

const idSchema = z.uuid();

/** Where the rules of the routes meet the policies: finds what a policy must know, and asks it. */
export function createAccess({ db, identify }: AccessDependencies): AccessControl<AccessRule> {
  const checkInProduct = async (
    caller: Caller,
    rule: Extract<AccessRule, { scope: 'product' }>,
    params: Readonly<Record<string, string>>,
  ): Promise<ProductAccess> => {
    const id = idSchema.safeParse(params[rule.by]);
    if (!id.success) throw notFound();
    const product = await findProduct(db, caller.personId, rule.by, id.data);
    if (product === undefined) throw notFound();
    const decision = decideInProduct(caller, product.role, rule.action);
    // Whoever has no part in a product does not learn that it exists.
    if (decision === 'hidden') throw notFound();
    if (decision === 'forbidden') throw forbidden();
    return product;
  };

  return {
    identify,
    check: async (rule, caller, params) => {
      if (rule.scope === 'public') return undefined;
      if (caller === undefined) throw unauthenticated();
      switch (rule.scope) {
        case 'signed-in':
          return undefined;
        case 'organisation':
          if (!mayInOrganisation(caller, rule.action)) throw forbidden();
          return undefined;
        case 'product':
          return checkInProduct(caller, rule, params);
      }
    },
  };
}

/**
 * A rule about a product names a parameter of the route's path; one that does not is a mistake that would
 * answer 404 for ever.
 *
 * @throws Error that names the route
 */
export function checkRules(routes: readonly { method: string; path: string; policy: AccessRule }[]): void {
  for (const { method, path, policy } of routes) {
    if (policy.scope !== 'product') continue;
    const parameters: string[] = path.match(/(?<=:)\w+/g) ?? [];
    if (!parameters.includes(policy.by)) {
      throw new Error(`${method} ${path} has no parameter ${policy.by} for its policy`);
    }
  }
}
