import * as z from '../zod';
import {
  emailSchema,
  idSchema,
  instantSchema,
  organisationRoleSchema,
  passwordSchema,
  titleSchema,
} from './identity';

/** The person who is signed in. */
export const signedInSchema = z.object({
  id: idSchema,
  name: z.string(),
  email: z.string(),
  role: organisationRoleSchema,
  mayCreateProducts: z.boolean(),
});
export type SignedIn = z.infer<typeof signedInSchema>;

/** A wrong password must not fail by its length: only its presence is checked here. */
export const signInSchema = z.object({
  email: z
    .string({ error: 'must be an e-mail address' })
    .trim()
    .toLowerCase()
    .max(254)
    // No database holds a control character such as U+0000 in a text, nor does an address.
    .regex(/^\P{Cc}*$/u, { error: 'must be an e-mail address' }),
  password: z.string({ error: 'must be a password' }).min(1, { error: 'must be a password' }).max(256),
});
export type SignIn = z.infer<typeof signInSchema>;

export const openSessionSchema = z.object({
  id: idSchema,
  createdAt: instantSchema,
  lastSeenAt: instantSchema,
  expiresAt: instantSchema,
  userAgent: z.string(),
  current: z.boolean(),
});
export type OpenSession = z.infer<typeof openSessionSchema>;

export const passwordChangeSchema = z.object({ current: z.string().min(1).max(256), next: passwordSchema });
export type PasswordChange = z.infer<typeof passwordChangeSchema>;

/** What the holder of an invitation sees before accepting it. */
export const invitationSchema = z.object({ email: emailSchema, name: z.string(), organisation: z.string() });
export type Invitation = z.infer<typeof invitationSchema>;
export const acceptInvitationSchema = z.object({ name: titleSchema, password: passwordSchema });
export type AcceptInvitation = z.infer<typeof acceptInvitationSchema>;
