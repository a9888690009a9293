import { z } from 'zod';
import {
  idSchema,
  openSessionSchema,
  passwordChangeSchema,
  signedInSchema,
  signInSchema,
} from '../../../shared/contracts/api';
import type { SessionCookie } from '../../platform/http/session-cookie';
import { type RateLimit, Reply, route } from '../../platform/routing';
import { everybody, signedIn } from '../../policies';
import {
  type AuthDependencies,
  changePassword,
  endSession,
  listSessions,
  signIn,
  signOut,
  signOutEverywhere,
} from './auth.usecases';
import { LONGEST_SESSION_MS } from './session-lifetime';

const QUARTER_HOUR_MS = 15 * 60_000;

/** Of one account from wherever, known or not. */
const byAccount: RateLimit = {
  by: ({ body }) => signInSchema.parse(body).email,
  limit: 10,
  windowMs: QUARTER_HOUR_MS,
  failuresOnly: true,
};
/** Many people may share an address, so it gets more. */
const byAddress: RateLimit = { by: 'address', limit: 50, windowMs: QUARTER_HOUR_MS, failuresOnly: true };
const passwordByAddress: RateLimit = { ...byAddress, limit: 10 };

export interface AuthRoutesDependencies extends AuthDependencies {
  readonly cookie: SessionCookie;
}

export function authRoutes(dependencies: AuthRoutesDependencies) {
  const { cookie } = dependencies;
  const give = (token: string) => cookie.give(token, LONGEST_SESSION_MS / 1000);
  const signedOut = () => new Reply(undefined, { cookies: [cookie.clear()] });

  return [
    route({
      method: 'GET',
      path: '/session',
      summary: 'Who is signed in',
      policy: signedIn,
      response: signedInSchema,
      handler: ({ caller: { personId, name, email, organisationRole, mayCreateProducts } }) =>
        Promise.resolve({ id: personId, name, email, role: organisationRole, mayCreateProducts }),
    }),
    route({
      method: 'POST',
      path: '/session',
      summary: 'Sign in',
      policy: everybody,
      limits: [byAddress, byAccount],
      body: signInSchema,
      response: signedInSchema,
      handler: async ({ body, ...visitor }) => {
        const { person, token } = await signIn(dependencies, body, visitor);
        return new Reply(person, { cookies: [give(token)] });
      },
    }),
    route({
      method: 'DELETE',
      path: '/session',
      summary: 'Sign out',
      // Whose session has ended wants to be rid of the cookie all the same.
      policy: everybody,
      handler: async ({ caller, requestId }) => {
        if (caller !== undefined) await signOut(dependencies, { caller, requestId });
        return signedOut();
      },
    }),
    route({
      method: 'GET',
      path: '/session/all',
      summary: 'Where the caller is signed in',
      policy: signedIn,
      response: z.object({ items: z.array(openSessionSchema) }),
      handler: async ({ caller }) => ({ items: await listSessions(dependencies, caller) }),
    }),
    route({
      method: 'DELETE',
      path: '/session/all',
      summary: 'Sign out everywhere',
      policy: signedIn,
      handler: async (call) => {
        await signOutEverywhere(dependencies, call);
        return signedOut();
      },
    }),
    route({
      method: 'DELETE',
      path: '/session/all/:sessionId',
      summary: 'Sign out one browser',
      policy: signedIn,
      params: z.object({ sessionId: idSchema }),
      handler: async ({ params: { sessionId }, ...act }) => {
        await endSession(dependencies, act, sessionId);
        return sessionId === act.caller.sessionId ? signedOut() : undefined;
      },
    }),
    route({
      method: 'POST',
      path: '/session/password',
      summary: 'Change the password; all other sessions end',
      policy: signedIn,
      limits: [passwordByAddress],
      body: passwordChangeSchema,
      handler: async ({ body, ...act }) => {
        const token = await changePassword(dependencies, body, act);
        return new Reply(undefined, { cookies: [give(token)] });
      },
    }),
  ];
}
