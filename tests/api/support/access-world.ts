import { randomUUID } from 'node:crypto';
import type { ProductRole } from '../../../server/policies';
import { makeRun, disable, makeVariant } from './team';
import { HttpClient } from './http-client';
import type { TestApi } from './test-api';
import type { TestPerson } from './test-people';

/** In what quality somebody comes to the server. */
export const STANDINGS = [
  'signedOut',
  'disabled',
  'member',
  'viewer',
  'reviewer',
  'designer',
  'administrator',
] as const;
export type Standing = (typeof STANDINGS)[number];

export const PRODUCT_ROLES: readonly Standing[] = ['viewer', 'reviewer', 'designer'];

/** Values for the parameters of a path, by their names. */
export type PathValues = Readonly<Record<string, string>>;

/** Somebody of every standing, a product in which the roles hold, and another in which nobody of them has one. */
export interface AccessWorld {
  readonly clients: Readonly<Record<Standing, HttpClient>>;
  readonly own: PathValues;
  readonly other: PathValues;
}

async function makeContent(api: TestApi, productId: string, designer: TestPerson): Promise<PathValues> {
  const variant = await makeVariant({ designer, productId }, 'Standard');
  const [{ id: scenarioId }] = variant.scenarios;
  const runId = await makeRun(api, { id: scenarioId }, designer);
  return { productId, variantId: variant.id, scenarioId, runId, number: '1' };
}

/** Everything anew, so that a call which is allowed finds it untouched. */
export async function makeAccessWorld(api: TestApi): Promise<AccessWorld> {
  const [designer, reviewer, viewer, administrator, member, disabled, owner, bystander] = await Promise.all([
    api.person({ mayCreateProducts: true }),
    api.person(),
    api.person(),
    api.person({ organisationRole: 'administrator' }),
    api.person(),
    api.person(),
    api.person(),
    api.person(),
  ]);
  const roles: [TestPerson, ProductRole][] = [
    [designer, 'designer'],
    [reviewer, 'reviewer'],
    [viewer, 'viewer'],
    [disabled, 'designer'],
    [bystander, 'viewer'],
  ];
  const own = await api.product(owner, roles);
  const other = await api.product(owner, [
    [owner, 'designer'],
    [bystander, 'viewer'],
  ]);
  const common = { personId: bystander.id, sessionId: randomUUID(), token: 'unknown' };
  const world = {
    clients: {
      ...{ designer, reviewer, viewer, administrator, member, disabled },
      signedOut: new HttpClient(api.address),
    },
    own: { ...common, ...(await makeContent(api, own, designer)) },
    other: { ...common, ...(await makeContent(api, other, owner)) },
  };
  await disable(api, disabled);
  return world;
}
