export { sessionExpiry } from './expiry';
export { administrator, ownPath, signedIn, signedOut } from './guards';
export { Session } from './session';
