import type { AcceptInvitation, Invitation, Invite, Person } from '../../../shared/contracts/api';
import { type Db, inTransaction, isUniqueViolation, recordInAudit, type Tx } from '../../db';
import { hashToken, newToken } from '../../platform/opaque-token';
import { type NewSession, openSession, type Passwords, type Visitor } from '../auth';
import { postLetter } from '../mail';
import { invitationLetter } from './invitation-letter';
import {
  findInvitation,
  findOrganisationName,
  insertInvitation,
  type InvitationRow,
  lockInvitation,
  revokeOpenInvitations,
  updateInvitation,
} from './invitation.repository';
import {
  beingInvited,
  invitationExpired,
  invitationRevoked,
  invitationUnknown,
  invitationUsed,
  personExists,
  personIsDisabled,
} from './people.errors';
import { findByEmail, insertPerson, type PersonRow, updatePerson } from './people.repository';
import type { Act } from './people.usecases';
import { viewInvited } from './person-views';

export const INVITATION_MS = 7 * 24 * 3600 * 1000;

export interface InvitationDependencies {
  readonly db: Db;
  readonly passwords: Passwords;
  readonly clock: () => Date;
}

/** @throws Problem person-exists for everybody but those who were removed */
async function requireAbsent(tx: Tx, email: string): Promise<void> {
  const person = await findByEmail(tx, email);
  if (person === undefined || person.removedAt !== null) return;
  throw person.disabledAt === null ? personExists(email) : personIsDisabled(email);
}

/**
 * Invites somebody by a letter with a link; an invitation that was open for the same address ends.
 *
 * @param origin the address of the server as people use it, for the link
 * @throws Problem person-exists
 */
export async function invite(
  { db, clock }: Pick<InvitationDependencies, 'db' | 'clock'>,
  { name, email, role, mayCreateProducts }: Invite,
  { caller, requestId, origin }: Act & { readonly origin: string },
): Promise<Person> {
  const token = newToken();
  const now = clock();
  const expiresAt = new Date(now.getTime() + INVITATION_MS);
  try {
    return await inTransaction(db, async (tx) => {
      await requireAbsent(tx, email);
      await revokeOpenInvitations(tx, email, now);
      const invitation = await insertInvitation(tx, {
        ...{ name, email, mayCreateProducts, expiresAt },
        organisationRole: role,
        tokenHash: hashToken(token),
        invitedBy: caller.personId,
        createdAt: now,
      });
      const organisation = await findOrganisationName(tx);
      const link = `${origin}/invitation/${token}`;
      const letter = { to: email, name, invitedBy: caller.name, organisation, link, expiresAt };
      await postLetter(tx, invitationLetter(letter));
      await recordInAudit(tx, {
        ...{ personId: caller.personId, requestId },
        action: 'invitation.send',
        objectKind: 'invitation',
        objectId: invitation.id,
        data: { email, role, mayCreateProducts },
      });
      return viewInvited(invitation);
    });
  } catch (error) {
    if (isUniqueViolation(error, 'invitations_one_open')) throw beingInvited(email);
    throw error;
  }
}

/** @throws Problem invitation-unknown, -used, -revoked, -expired */
function requireUsable(invitation: InvitationRow | undefined, now: Date): InvitationRow {
  if (invitation === undefined) throw invitationUnknown();
  if (invitation.acceptedAt !== null) throw invitationUsed();
  if (invitation.revokedAt !== null) throw invitationRevoked();
  if (invitation.expiresAt <= now) throw invitationExpired();
  return invitation;
}

/** What the holder of a link sees before accepting it. */
export async function viewInvitation(
  { db, clock }: Pick<InvitationDependencies, 'db' | 'clock'>,
  token: string,
): Promise<Invitation> {
  const { name, email } = requireUsable(await findInvitation(db, hashToken(token)), clock());
  return { name, email, organisation: await findOrganisationName(db) };
}

/** A new person, or one who was removed and comes back. */
async function admit(
  tx: Tx,
  { email, organisationRole, mayCreateProducts }: InvitationRow,
  { name, passwordHash, now }: { name: string; passwordHash: string; now: Date },
): Promise<PersonRow> {
  await requireAbsent(tx, email);
  const values = { name, email, passwordHash, organisationRole, mayCreateProducts };
  const before = await findByEmail(tx, email);
  return before === undefined
    ? insertPerson(tx, { ...values, createdAt: now })
    : updatePerson(tx, before.id, { ...values, disabledAt: null, removedAt: null });
}

/**
 * Makes the holder of a link a person of the organisation, and signs them in.
 *
 * @throws Problem as `viewInvitation`, person-exists
 */
export async function acceptInvitation(
  { db, passwords, clock }: InvitationDependencies,
  token: string,
  { name, password }: AcceptInvitation,
  visitor: Visitor,
): Promise<NewSession> {
  const tokenHash = hashToken(token);
  // Before the costly hash, so that nobody makes the server work with a link that is of no use.
  requireUsable(await findInvitation(db, tokenHash), clock());
  const passwordHash = await passwords.hash(password);
  return inTransaction(db, async (tx) => {
    const now = clock();
    const invitation = requireUsable(await lockInvitation(tx, tokenHash), now);
    const person = await admit(tx, invitation, { name, passwordHash, now });
    await updateInvitation(tx, invitation.id, { acceptedAt: now, acceptedBy: person.id });
    await recordInAudit(tx, {
      personId: person.id,
      action: 'invitation.accept',
      objectKind: 'invitation',
      objectId: invitation.id,
      requestId: visitor.requestId,
    });
    const sessionToken = await openSession(tx, { personId: person.id, visitor, now });
    const { id, email, organisationRole, mayCreateProducts } = person;
    return { token: sessionToken, person: { id, name, email, role: organisationRole, mayCreateProducts } };
  });
}
