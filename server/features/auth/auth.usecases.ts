import type { OpenSession, PasswordChange, SignedIn, SignIn } from '../../../shared/contracts/api';
import { type Db, inTransaction, recordInAudit } from '../../db';
import { hashToken, newToken } from '../../platform/opaque-token';
import { notFound } from '../../platform/problem';
import type { Caller } from '../../platform/routing';
import { signInRefused, wrongPassword } from './auth.errors';
import {
  findCredentials,
  findPasswordHash,
  replacePasswordHash,
  updatePasswordHash,
} from './credentials.repository';
import { openSession, type Visitor } from './open-session';
import type { Passwords } from './passwords';
import { endOf } from './session-lifetime';
import {
  deleteOtherSessions,
  deleteSession,
  deleteSessionsOf,
  selectSessions,
  updateToken,
} from './session.repository';

export interface AuthDependencies {
  readonly db: Db;
  readonly passwords: Passwords;
  readonly clock: () => Date;
}

/** Who acts, in which request. */
export interface Act {
  readonly caller: Caller;
  readonly requestId: string;
}

export interface NewSession {
  readonly person: SignedIn;
  readonly token: string;
}

/** @throws Problem sign-in-refused, the same and after the same work whatever the reason is */
export async function signIn(
  { db, passwords, clock }: AuthDependencies,
  { email, password }: SignIn,
  visitor: Visitor,
): Promise<NewSession> {
  const person = await findCredentials(db, email);
  const fits = await passwords.verify(person?.passwordHash, password);
  if (person === undefined || !fits || person.disabledAt !== null) {
    // Not what was typed as a name: it may have been a password.
    await recordInAudit(db, {
      action: 'session.refuse',
      objectKind: person === undefined ? 'account' : 'person',
      objectId: person?.id ?? 'unknown',
      data: { address: visitor.address },
      requestId: visitor.requestId,
    });
    throw signInRefused();
  }
  const { id, name, passwordHash, organisationRole, mayCreateProducts } = person;
  const renewed = passwords.isDated(passwordHash) ? await passwords.hash(password) : undefined;
  const token = await inTransaction(db, async (tx) => {
    if (renewed !== undefined) await replacePasswordHash(tx, id, { from: passwordHash, to: renewed });
    return openSession(tx, { personId: id, visitor, now: clock() });
  });
  return { token, person: { id, name, email: person.email, role: organisationRole, mayCreateProducts } };
}

/** @returns false where the caller has no such session */
function end({ db }: Pick<AuthDependencies, 'db'>, { caller, requestId }: Act, sessionId: string) {
  const { personId } = caller;
  return inTransaction(db, async (tx) => {
    if (!(await deleteSession(tx, personId, sessionId))) return false;
    await recordInAudit(tx, {
      ...{ personId, requestId },
      action: 'session.end',
      objectKind: 'person',
      objectId: personId,
    });
    return true;
  });
}

/** Ends the session of the caller; one that another request has just ended is as good. */
export async function signOut(dependencies: Pick<AuthDependencies, 'db'>, act: Act): Promise<void> {
  await end(dependencies, act, act.caller.sessionId);
}

/** @throws Problem not-found unless it is a session of the caller */
export async function endSession(
  dependencies: Pick<AuthDependencies, 'db'>,
  act: Act,
  sessionId: string,
): Promise<void> {
  if (!(await end(dependencies, act, sessionId))) throw notFound('The session has ended already.');
}

export async function signOutEverywhere(
  { db }: Pick<AuthDependencies, 'db'>,
  { caller, requestId }: Act,
): Promise<void> {
  const { personId } = caller;
  await inTransaction(db, async (tx) => {
    const sessions = await deleteSessionsOf(tx, personId);
    await recordInAudit(tx, {
      ...{ personId, requestId },
      action: 'session.end-all',
      objectKind: 'person',
      objectId: personId,
      data: { sessions },
    });
  });
}

export async function listSessions(
  { db, clock }: Pick<AuthDependencies, 'db' | 'clock'>,
  { personId, sessionId }: Caller,
): Promise<OpenSession[]> {
  const sessions = await selectSessions(db, personId, clock());
  return sessions.map(({ id, createdAt, lastSeenAt, expiresAt, userAgent }) => ({
    id,
    createdAt: createdAt.toISOString(),
    lastSeenAt: lastSeenAt.toISOString(),
    expiresAt: endOf({ expiresAt, lastSeenAt }).toISOString(),
    userAgent,
    current: id === sessionId,
  }));
}

/**
 * Changes the caller's password and ends all their sessions but this one, which gets a new token: whoever
 * copied the cookie is out as well.
 *
 * @returns the new token
 * @throws Problem wrong-password
 */
export async function changePassword(
  { db, passwords }: Pick<AuthDependencies, 'db' | 'passwords'>,
  { current, next }: PasswordChange,
  { caller, requestId }: Act,
): Promise<string> {
  const { personId, sessionId } = caller;
  const entry = { personId, requestId, objectKind: 'person', objectId: personId };
  const fits = await passwords.verify(await findPasswordHash(db, personId), current);
  if (!fits) {
    await recordInAudit(db, { ...entry, action: 'password.refuse' });
    throw wrongPassword();
  }
  const passwordHash = await passwords.hash(next);
  const token = newToken();
  await inTransaction(db, async (tx) => {
    await updatePasswordHash(tx, personId, passwordHash);
    await updateToken(tx, sessionId, hashToken(token));
    const ended = await deleteOtherSessions(tx, personId, sessionId);
    await recordInAudit(tx, { ...entry, action: 'password.change', data: { endedSessions: ended } });
  });
  return token;
}
