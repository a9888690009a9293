import * as z from '../zod';

export const idSchema = z.uuid({ error: 'must be an id' });
/** An instant as ISO 8601 text in UTC. */
export const instantSchema = z.iso.datetime();

const trimmed = (what: string, most: number) =>
  z
    .string({ error: `must be ${what}` })
    .trim()
    .min(1, { error: `must be ${what}` })
    .max(most, { error: `must have at most ${most} characters` })
    .regex(/^\P{Cc}*$/u, { error: 'must be one line of text' });

/** A name that people gave to a thing of theirs. */
export const titleSchema = trimmed('a name', 120);
export const emailSchema = z
  .email({ error: 'must be an e-mail address' })
  .max(254, { error: 'must have at most 254 characters' })
  .toLowerCase();
export const passwordSchema = z
  .string({ error: 'must be a password' })
  .min(12, { error: 'must have at least 12 characters' })
  .max(256, { error: 'must have at most 256 characters' });
/** Free text such as a comment or a note. */
export const noteSchema = z
  .string({ error: 'must be a text' })
  .trim()
  .max(4000, { error: 'must have at most 4000 characters' })
  // No database holds it in a text.
  .refine((text) => !text.includes('\0'), { error: 'must not hold the character U+0000' });

/** Roles in the organisation: administrators invite, set roles and read the audit log. */
export const ORGANISATION_ROLES = ['administrator', 'member'] as const;
export const organisationRoleSchema = z.enum(ORGANISATION_ROLES);
export type OrganisationRole = z.infer<typeof organisationRoleSchema>;

/** Roles in one product, strongest first. */
export const PRODUCT_ROLES = ['designer', 'reviewer', 'viewer'] as const;
export const productRoleSchema = z.enum(PRODUCT_ROLES);
export type ProductRole = z.infer<typeof productRoleSchema>;
