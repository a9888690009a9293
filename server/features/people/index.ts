import { invitationRoutes, type InvitationRoutesDependencies } from './invitation.routes';
import { administrationRoutes } from './people.routes';

export { type FirstInvitation, inviteFirstAdministrator } from './first-administrator';
export { insertPerson } from './people.repository';

/** Who belongs to the organisation, and how they get in. */
export function peopleRoutes(dependencies: InvitationRoutesDependencies) {
  return [...administrationRoutes(dependencies), ...invitationRoutes(dependencies)];
}
