import type { Person } from '../../../shared/contracts/api';
import type { InvitationRow } from './invitation.repository';
import type { PersonRow } from './people.repository';

export function viewPerson(row: PersonRow): Person {
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    role: row.organisationRole,
    mayCreateProducts: row.mayCreateProducts,
    disabled: row.disabledAt !== null,
    invited: false,
    lastSeenAt: row.lastSeenAt?.toISOString() ?? null,
  };
}

/** Somebody who has not joined yet stands in the list under the id of the invitation. */
export function viewInvited(row: InvitationRow): Person {
  return {
    id: row.id,
    name: row.name,
    email: row.email,
    role: row.organisationRole,
    mayCreateProducts: row.mayCreateProducts,
    disabled: false,
    invited: true,
    lastSeenAt: null,
  };
}
