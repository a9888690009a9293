export { sessionExpiry } from './expiry';
export { administrator, anybody, ownPath, signedIn, signedOut } from './guards';
export { Session } from './session';
