import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { Executor, Tx } from '../../db';
import { invitations, organisationSettings } from '../../db/schema';

export type InvitationRow = typeof invitations.$inferSelect;

const isOpen = and(isNull(invitations.acceptedAt), isNull(invitations.revokedAt));

/** Invitations that nobody has accepted or withdrawn, by name; expired ones too, so that they can be renewed. */
export function selectOpenInvitations(db: Executor): Promise<InvitationRow[]> {
  return db.select().from(invitations).where(isOpen).orderBy(asc(invitations.name), asc(invitations.email));
}

export async function lockOpenInvitation(tx: Tx, id: string): Promise<InvitationRow | undefined> {
  const [invitation] = await tx
    .select()
    .from(invitations)
    .where(and(eq(invitations.id, id), isOpen))
    .for('update');
  return invitation;
}

export async function findInvitation(db: Executor, tokenHash: string): Promise<InvitationRow | undefined> {
  const [invitation] = await db.select().from(invitations).where(eq(invitations.tokenHash, tokenHash));
  return invitation;
}

/** The same, held until the transaction ends: of two that accept it at once, the second finds it used. */
export async function lockInvitation(tx: Tx, tokenHash: string): Promise<InvitationRow | undefined> {
  const [invitation] = await tx
    .select()
    .from(invitations)
    .where(eq(invitations.tokenHash, tokenHash))
    .for('update');
  return invitation;
}

export async function insertInvitation(
  tx: Tx,
  values: typeof invitations.$inferInsert,
): Promise<InvitationRow> {
  const [invitation] = await tx.insert(invitations).values(values).returning();
  return invitation;
}

export async function updateInvitation(
  tx: Tx,
  id: string,
  values: Partial<typeof invitations.$inferInsert>,
): Promise<InvitationRow> {
  const [invitation] = await tx.update(invitations).set(values).where(eq(invitations.id, id)).returning();
  return invitation;
}

/** Withdraws what is open for an e-mail address. */
export async function revokeOpenInvitations(tx: Tx, email: string, now: Date): Promise<void> {
  await tx
    .update(invitations)
    .set({ revokedAt: now })
    .where(and(eq(sql`lower(${invitations.email})`, email.toLowerCase()), isOpen));
}

/** Withdraws what is open and was sent by nobody: the invitation of a first administrator. */
export async function revokeFirstInvitations(tx: Tx, now: Date): Promise<void> {
  await tx
    .update(invitations)
    .set({ revokedAt: now })
    .where(and(isNull(invitations.invitedBy), isOpen));
}

/** The organisation's name; the product's own until somebody has set one. */
export async function findOrganisationName(db: Executor): Promise<string> {
  const [settings] = await db.select({ name: organisationSettings.name }).from(organisationSettings);
  return settings?.name ?? 'Tareline';
}
