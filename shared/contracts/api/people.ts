import * as z from '../zod';
import { emailSchema, idSchema, instantSchema, organisationRoleSchema, titleSchema } from './identity';

export const personSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  role: organisationRoleSchema,
  mayCreateProducts: z.boolean(),
  disabled: z.boolean(),
  /** An invitation is open: the person has not signed in yet. */
  invited: z.boolean(),
  lastSeenAt: instantSchema.nullable(),
});
export type Person = z.infer<typeof personSchema>;

/** Somebody who may be given a role. */
export const directoryEntrySchema = z.object({ id: idSchema, name: z.string(), email: z.string() });
export type DirectoryEntry = z.infer<typeof directoryEntrySchema>;

export const inviteSchema = z.object({
  email: emailSchema,
  name: titleSchema,
  role: organisationRoleSchema,
  mayCreateProducts: z.boolean(),
});
export type Invite = z.infer<typeof inviteSchema>;

export const personChangeSchema = z.object({
  role: organisationRoleSchema.optional(),
  mayCreateProducts: z.boolean().optional(),
  disabled: z.boolean().optional(),
});
export type PersonChange = z.infer<typeof personChangeSchema>;

export const auditEntrySchema = z.object({
  id: z.string(),
  at: instantSchema,
  who: z.string().nullable(),
  action: z.string(),
  subject: z.string(),
  details: z.string(),
});
export type AuditEntry = z.infer<typeof auditEntrySchema>;
/** Newest first; `before` continues with the entries older than an id. */
export const auditPageSchema = z.object({ entries: z.array(auditEntrySchema), next: z.string().nullable() });
export type AuditPage = z.infer<typeof auditPageSchema>;

export const outgoingMailSchema = z.object({
  id: idSchema,
  at: instantSchema,
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  state: z.enum(['waiting', 'sent', 'failed']),
});
export type OutgoingMail = z.infer<typeof outgoingMailSchema>;
