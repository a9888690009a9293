import { inject } from '@angular/core';
import { Router, type CanActivateFn, type CanMatchFn } from '@angular/router';
import { Session } from './session';

/** Pages for people who are signed in; others sign in first and come back. */
export const signedIn: CanActivateFn = async (_route, state) => {
  const router = inject(Router);
  const person = await inject(Session).restore();
  if (person !== null) return true;
  return router.createUrlTree(['/sign-in'], {
    queryParams: state.url === '/' ? {} : { then: state.url },
  });
};

/** The sign-in page has nothing to do for someone who is signed in. */
export const signedOut: CanActivateFn = async (route) => {
  const router = inject(Router);
  const person = await inject(Session).restore();
  return person === null || router.parseUrl(ownPath(route.queryParamMap.get('then')));
};

/** A page for everybody that still shows who is signed in, where that can be found out. */
export const anybody: CanActivateFn = async () => {
  try {
    await inject(Session).restore();
  } catch {
    // The page needs nothing from the server.
  }
  return true;
};

/** Only then the route matches; the next route with the same path shows that the page is forbidden. */
export const administrator: CanMatchFn = async () => {
  const session = inject(Session);
  await session.restore();
  return session.isAdministrator();
};

/** A path of this application, whatever was put into the address. */
export function ownPath(then: string | null): string {
  return then !== null && /^\/(?![/\\])/.test(then) ? then : '/';
}
