import { recordInAudit, type Tx } from '../../db';
import { hashToken, newToken } from '../../platform/opaque-token';
import { insertInvitation, revokeFirstInvitations } from './invitation.repository';
import { lockAdministrators } from './people.repository';

/** Shorter than other invitations: whoever starts the server is there, and a later start makes a new one. */
const FIRST_INVITATION_MS = 24 * 3600 * 1000;

/** How the first person joins an organisation; the token is written down nowhere. */
export interface FirstInvitation {
  readonly email: string;
  /** The last part of the link. */
  readonly token: string;
  readonly expiresAt: Date;
}

/**
 * Invites an administrator into an organisation that has none, in place of one who was invited so before and has
 * not joined. No letter goes out, in which the link would be written down; whoever starts the server is shown it.
 *
 * @param tx in which nobody else does the same
 * @returns undefined where somebody has accepted in the meantime
 */
export async function inviteFirstAdministrator(
  tx: Tx,
  { email, now }: { email: string; now: Date },
): Promise<FirstInvitation | undefined> {
  // Waits for whoever is accepting it at this moment.
  await revokeFirstInvitations(tx, now);
  if ((await lockAdministrators(tx)).length > 0) return undefined;
  const token = newToken();
  const expiresAt = new Date(now.getTime() + FIRST_INVITATION_MS);
  const { id } = await insertInvitation(tx, {
    ...{ email, expiresAt },
    name: 'Administrator',
    organisationRole: 'administrator',
    mayCreateProducts: true,
    tokenHash: hashToken(token),
    createdAt: now,
  });
  await recordInAudit(tx, {
    action: 'invitation.first',
    objectKind: 'invitation',
    objectId: id,
    data: { email, role: 'administrator' },
  });
  return { email, token, expiresAt };
}
