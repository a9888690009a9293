import type { DirectoryEntry, Person, PersonChange } from '../../../shared/contracts/api';
import { type Db, inTransaction, recordInAudit, type Tx } from '../../db';
import { notFound } from '../../platform/problem';
import { endSessionsOf } from '../auth';
import { differences } from './differences';
import {
  type InvitationRow,
  lockOpenInvitation,
  selectOpenInvitations,
  updateInvitation,
} from './invitation.repository';
import { lastAdministrator, notYetJoined } from './people.errors';
import {
  deleteMembershipsOf,
  lockAdministrators,
  lockPerson,
  type PersonRow,
  selectDirectory,
  selectPeople,
  updatePerson,
} from './people.repository';
import { viewInvited, viewPerson } from './person-views';

export interface PeopleDependencies {
  readonly db: Db;
  readonly clock: () => Date;
}

/** Which administrator acts, in which request. */
export interface Act {
  readonly caller: { readonly personId: string; readonly name: string };
  readonly requestId: string;
}

const byName = (a: Person, b: Person) =>
  a.name.localeCompare(b.name, 'en') || a.email.localeCompare(b.email, 'en');

/** Everybody in the organisation, and who is invited to it. */
export async function listPeople({ db }: Pick<PeopleDependencies, 'db'>): Promise<Person[]> {
  const joined = await selectPeople(db);
  const invited = await selectOpenInvitations(db);
  return [...joined.map(viewPerson), ...invited.map(viewInvited)].sort(byName);
}

/** Whom one may give a role in a product. */
export function listDirectory({ db }: Pick<PeopleDependencies, 'db'>): Promise<DirectoryEntry[]> {
  return selectDirectory(db);
}

/** What of a person an administrator decides. */
interface Standing {
  readonly role: Person['role'];
  readonly mayCreateProducts: boolean;
  readonly disabled: boolean;
}

function standingOf({ organisationRole, mayCreateProducts, disabledAt }: PersonRow): Standing {
  return { role: organisationRole, mayCreateProducts, disabled: disabledAt !== null };
}

function applied(standing: Standing, change: PersonChange): Standing {
  return {
    role: change.role ?? standing.role,
    mayCreateProducts: change.mayCreateProducts ?? standing.mayCreateProducts,
    disabled: change.disabled ?? standing.disabled,
  };
}

/** @throws Problem last-administrator where nobody else would be left */
function requireAnotherAdministrator(administrators: readonly string[], personId: string): void {
  if (administrators.length === 1 && administrators[0] === personId) throw lastAdministrator();
}

async function changeInvited(
  tx: Tx,
  invitation: InvitationRow,
  change: PersonChange,
  { caller: { personId }, requestId }: Act,
): Promise<Person> {
  if (change.disabled === true) throw notYetJoined();
  const { organisationRole, mayCreateProducts } = invitation;
  const before = { role: organisationRole, mayCreateProducts };
  const { role, mayCreateProducts: mayCreate } = applied({ ...before, disabled: false }, change);
  const after = { role, mayCreateProducts: mayCreate };
  const changed = differences(before, after);
  if (Object.keys(changed).length === 0) return viewInvited(invitation);
  await recordInAudit(tx, {
    ...{ personId, requestId },
    action: 'invitation.change',
    objectKind: 'invitation',
    objectId: invitation.id,
    data: changed,
  });
  return viewInvited(
    await updateInvitation(tx, invitation.id, { organisationRole: role, mayCreateProducts: mayCreate }),
  );
}

/**
 * Sets role, right to create products, or access of somebody who has joined or is invited. Who is disabled is
 * signed out everywhere.
 *
 * @throws Problem not-found, last-administrator, invitation-open
 */
export function changePerson(
  { db, clock }: PeopleDependencies,
  personId: string,
  change: PersonChange,
  act: Act,
): Promise<Person> {
  return inTransaction(db, async (tx) => {
    const administrators = await lockAdministrators(tx);
    const person = await lockPerson(tx, personId);
    if (person === undefined) {
      const invitation = await lockOpenInvitation(tx, personId);
      if (invitation === undefined) throw notFound();
      return changeInvited(tx, invitation, change, act);
    }
    const before = standingOf(person);
    const after = applied(before, change);
    if (after.role !== 'administrator' || after.disabled)
      requireAnotherAdministrator(administrators, personId);
    const changed = differences(before, after);
    if (Object.keys(changed).length === 0) return viewPerson(person);
    if (after.disabled) await endSessionsOf(tx, personId);
    await recordInAudit(tx, {
      personId: act.caller.personId,
      action: 'person.change',
      objectKind: 'person',
      objectId: personId,
      data: changed,
      requestId: act.requestId,
    });
    const disabledAt = after.disabled ? (person.disabledAt ?? clock()) : null;
    const { role: organisationRole, mayCreateProducts } = after;
    return viewPerson(await updatePerson(tx, personId, { organisationRole, mayCreateProducts, disabledAt }));
  });
}

/**
 * Removes somebody: no access, no roles, in no list; what they did stays under their name. An invitation is
 * withdrawn.
 *
 * @throws Problem not-found, last-administrator
 */
export async function removePerson(
  { db, clock }: PeopleDependencies,
  personId: string,
  { caller, requestId }: Act,
): Promise<void> {
  const entry = { personId: caller.personId, requestId, objectId: personId };
  await inTransaction(db, async (tx) => {
    const now = clock();
    const administrators = await lockAdministrators(tx);
    const person = await lockPerson(tx, personId);
    if (person === undefined) {
      const invitation = await lockOpenInvitation(tx, personId);
      if (invitation === undefined) throw notFound();
      await updateInvitation(tx, personId, { revokedAt: now });
      await recordInAudit(tx, { ...entry, action: 'invitation.revoke', objectKind: 'invitation' });
      return;
    }
    requireAnotherAdministrator(administrators, personId);
    await endSessionsOf(tx, personId);
    const roles = await deleteMembershipsOf(tx, personId);
    await updatePerson(tx, personId, { disabledAt: person.disabledAt ?? now, removedAt: now });
    await recordInAudit(tx, {
      ...entry,
      action: 'person.remove',
      objectKind: 'person',
      data: { rolesInProducts: roles },
    });
  });
}
