import { z } from 'zod';
import { acceptInvitationSchema, invitationSchema, signedInSchema } from '../../../shared/contracts/api';
import type { SessionCookie } from '../../platform/http/session-cookie';
import { type RateLimit, Reply, route } from '../../platform/routing';
import { everybody } from '../../policies';
import { LONGEST_SESSION_MS } from '../auth';
import { acceptInvitation, type InvitationDependencies, viewInvitation } from './invitation.usecases';

const params = z.object({ token: z.string().min(1).max(200) });

/** Nobody guesses a token; this only keeps the attempts from costing anything. */
const failures: RateLimit = { by: 'address', limit: 30, windowMs: 15 * 60_000, failuresOnly: true };

export interface InvitationRoutesDependencies extends InvitationDependencies {
  readonly cookie: SessionCookie;
}

export function invitationRoutes(dependencies: InvitationRoutesDependencies) {
  const { cookie } = dependencies;
  return [
    route({
      method: 'GET',
      path: '/invitations/:token',
      summary: 'What the holder of an invitation sees before accepting it',
      policy: everybody,
      limits: [failures],
      params,
      response: invitationSchema,
      handler: ({ params: { token } }) => viewInvitation(dependencies, token),
    }),
    route({
      method: 'POST',
      path: '/invitations/:token/accept',
      summary: 'Join the organisation with a password of one’s own, and be signed in',
      policy: everybody,
      limits: [failures],
      params,
      body: acceptInvitationSchema,
      response: signedInSchema,
      handler: async ({ params: { token }, body, ...visitor }) => {
        const session = await acceptInvitation(dependencies, token, body, visitor);
        return new Reply(session.person, {
          cookies: [cookie.give(session.token, LONGEST_SESSION_MS / 1000)],
        });
      },
    }),
  ];
}
