export const ORGANISATION_ROLES = ['administrator', 'member'] as const;
export type OrganisationRole = (typeof ORGANISATION_ROLES)[number];

export const PRODUCT_ROLES = ['designer', 'reviewer', 'viewer'] as const;
export type ProductRole = (typeof PRODUCT_ROLES)[number];

/** What the policies need to know of a person. */
export interface Actor {
  readonly organisationRole: OrganisationRole;
  readonly mayCreateProducts: boolean;
}
