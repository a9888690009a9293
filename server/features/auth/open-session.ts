import { recordInAudit, type Tx } from '../../db';
import { hashToken, newToken } from '../../platform/opaque-token';
import { later, LONGEST_SESSION_MS } from './session-lifetime';
import { deleteEndedSessions, deleteSession, insertSession, markSeen } from './session.repository';

/** What is kept of a browser, so that people recognise it in the list of their sessions. */
const LONGEST_USER_AGENT = 300;

/** Where a sign-in comes from. */
export interface Visitor {
  readonly address: string;
  readonly userAgent: string;
  readonly requestId: string;
  /** The session that the browser holds so far. */
  readonly caller: { readonly personId: string; readonly sessionId: string } | undefined;
}

/**
 * Opens a session; the one that the same browser held before ends.
 *
 * @returns the token for the cookie, which is nowhere kept
 */
export async function openSession(
  tx: Tx,
  { personId, visitor, now }: { personId: string; visitor: Visitor; now: Date },
): Promise<string> {
  const { address, userAgent, requestId, caller } = visitor;
  const token = newToken();
  await deleteEndedSessions(tx, now);
  if (caller !== undefined) await deleteSession(tx, caller.personId, caller.sessionId);
  const sessionId = await insertSession(tx, {
    personId,
    tokenHash: hashToken(token),
    createdAt: now,
    lastSeenAt: now,
    expiresAt: later(now, LONGEST_SESSION_MS),
    userAgent: userAgent.slice(0, LONGEST_USER_AGENT),
    address,
  });
  await markSeen(tx, { sessionId, personId, now });
  await recordInAudit(tx, {
    ...{ personId, requestId },
    action: 'session.open',
    objectKind: 'person',
    objectId: personId,
    data: { address },
  });
  return token;
}
