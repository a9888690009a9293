import type { Actor, ProductRole } from './roles';

/** An administrator sees every product and sets its roles, but writes to none without a role in it. */
type Standing = ProductRole | 'administrator';

const readers = ['designer', 'reviewer', 'viewer', 'administrator'] as const;
const participants = ['designer', 'reviewer', 'viewer'] as const;

/** Who may do what in a product. What does not stand here is allowed to nobody. */
const TABLE = {
  'product.view': readers,
  'product.edit': ['designer'],
  'product.archive': ['designer'],
  'members.view': readers,
  'members.set': ['administrator'],
  'variant.view': readers,
  'variant.edit': ['designer'],
  'part.view': readers,
  'part.edit': ['designer'],
  'scenario.view': readers,
  'scenario.edit': ['designer'],
  'draft.edit': ['designer'],
  // Exploring stores nothing, so whoever reads may move a band and see the answer follow.
  'preview.compute': readers,
  'run.view': readers,
  'run.start': ['designer'],
  'run.cancel': ['designer'],
  'export.read': readers,
  'record.view': readers,
  'record.upload': ['designer'],
  'review.view': readers,
  'review.ask': ['designer'],
  'review.decide': ['reviewer'],
  'comment.write': participants,
} as const satisfies Record<string, readonly Standing[]>;

export type ProductAction = keyof typeof TABLE;
export const PRODUCT_ACTIONS = Object.keys(TABLE) as ProductAction[];

/** `hidden`: the person may not even know that the product exists. */
export type ProductDecision = 'allowed' | 'forbidden' | 'hidden';

/**
 * Whether somebody may do something in a product.
 *
 * @param role of that person in that product, undefined where there is none
 */
export function decideInProduct(
  actor: Actor,
  role: ProductRole | undefined,
  action: ProductAction,
): ProductDecision {
  const standings: Standing[] = role === undefined ? [] : [role];
  if (actor.organisationRole === 'administrator') standings.push('administrator');
  if (standings.length === 0) return 'hidden';
  const allowed: readonly Standing[] = Object.hasOwn(TABLE, action) ? TABLE[action] : [];
  return standings.some((standing) => allowed.includes(standing)) ? 'allowed' : 'forbidden';
}
