import * as z from '../zod';
import { idSchema, instantSchema, noteSchema, productRoleSchema, titleSchema } from './identity';
import { runSummarySchema } from './runs';

/** A product as its list shows it, with what the reader may do in it; null: an administrator without a role there. */
export const productSchema = z.object({
  id: idSchema,
  name: z.string(),
  description: z.string(),
  role: productRoleSchema.nullable(),
  variants: z.int(),
  changedAt: instantSchema,
});
export type Product = z.infer<typeof productSchema>;

export const productDraftSchema = z.object({ name: titleSchema, description: noteSchema });
export type ProductDraft = z.infer<typeof productDraftSchema>;
/** What of a product is to be different; what is left out stays. */
export const productChangeSchema = productDraftSchema.partial();
export type ProductChange = z.infer<typeof productChangeSchema>;

export const memberSchema = z.object({
  personId: idSchema,
  name: z.string(),
  email: z.string(),
  role: productRoleSchema,
});
export type Member = z.infer<typeof memberSchema>;
export const memberRoleSchema = z.object({ role: productRoleSchema });
export type MemberRole = z.infer<typeof memberRoleSchema>;

/** A variant with the newest answer of each of its scenarios: a rung of the variant ladder. */
export const variantSchema = z.object({
  id: idSchema,
  productId: idSchema,
  name: z.string(),
  revision: z.int(),
  scenarios: z.array(
    z.object({ id: idSchema, name: z.string(), revision: z.int(), run: runSummarySchema.nullable() }),
  ),
  changedAt: instantSchema,
});
export type Variant = z.infer<typeof variantSchema>;

export const variantDraftSchema = z.object({ name: titleSchema, study: z.unknown() });
export type VariantDraft = z.infer<typeof variantDraftSchema>;
export const renameSchema = z.object({ name: titleSchema });
export type Rename = z.infer<typeof renameSchema>;
