import type { Actor } from './roles';

/** In what quality somebody acts in the organisation. */
type Standing = 'administrator' | 'member' | 'productCreator';

/** Who may do what outside of any product. What does not stand here is allowed to nobody. */
const TABLE = {
  'organisation.view': ['administrator', 'member'],
  'organisation.edit': ['administrator'],
  'people.view': ['administrator'],
  'people.invite': ['administrator'],
  'people.edit': ['administrator'],
  'people.remove': ['administrator'],
  'audit.view': ['administrator'],
  'mail.view': ['administrator'],
  // The list holds the products in which the caller has a role; an administrator's holds all.
  'product.list': ['administrator', 'member'],
  'product.create': ['productCreator'],
} as const satisfies Record<string, readonly Standing[]>;

export type OrganisationAction = keyof typeof TABLE;
export const ORGANISATION_ACTIONS = Object.keys(TABLE) as OrganisationAction[];

function standings(actor: Actor): Standing[] {
  return [actor.organisationRole, ...(actor.mayCreateProducts ? (['productCreator'] as const) : [])];
}

/** Whether somebody may do something in the organisation. */
export function mayInOrganisation(actor: Actor, action: OrganisationAction): boolean {
  const allowed: readonly Standing[] = Object.hasOwn(TABLE, action) ? TABLE[action] : [];
  return standings(actor).some((standing) => allowed.includes(standing));
}
