export { authRoutes, type AuthRoutesDependencies } from './auth.routes';
export type { NewSession } from './auth.usecases';
export { createIdentify, type IdentifyDependencies } from './identify';
export { openSession, type Visitor } from './open-session';
export { createPasswords, type Passwords } from './passwords';
export { LONGEST_SESSION_MS } from './session-lifetime';
export { deleteSessionsOf as endSessionsOf } from './session.repository';
