import type { OrganisationAction } from './organisation-policy';
import type { ProductAction } from './product-policy';

/**
 * The things that belong to a product, by the parameter that names one in a path. A rule about a product finds
 * the product through it: `/scenarios/:scenarioId` needs no product in its path.
 */
export const PRODUCT_OBJECTS = [
  'productId',
  'variantId',
  'variantRevisionId',
  'partId',
  'partRevisionId',
  'scenarioId',
  'scenarioRevisionId',
  'runId',
  'reviewId',
] as const;
export type ProductObject = (typeof PRODUCT_OBJECTS)[number];

/** What a route states as its policy. */
export type AccessRule =
  | { readonly scope: 'public' }
  | { readonly scope: 'signed-in' }
  | { readonly scope: 'organisation'; readonly action: OrganisationAction }
  | { readonly scope: 'product'; readonly action: ProductAction; readonly by: ProductObject };

/** Everybody, without signing in. */
export const everybody = { scope: 'public' } as const;

/** Whoever has signed in: things that concern the caller alone. */
export const signedIn = { scope: 'signed-in' } as const;

/** Whoever may do this in the organisation. */
export function inOrganisation(action: OrganisationAction) {
  return { scope: 'organisation', action } as const;
}

/**
 * Whoever may do this in the product that a parameter of the path leads to.
 *
 * @param by the parameter, such as `scenarioId` of `/scenarios/:scenarioId`
 */
export function inProduct(action: ProductAction, by: ProductObject) {
  return { scope: 'product', action, by } as const;
}
