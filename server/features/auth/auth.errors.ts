import { defineProblem } from '../../platform/problem';

const SIGN_IN_REFUSED = defineProblem({
  code: 'sign-in-refused',
  status: 401,
  title: 'E-mail address or password is wrong',
});

/** One answer to everything that keeps somebody from signing in: it tells nobody who has an account. */
export const signInRefused = () => SIGN_IN_REFUSED('Check both, and try again.');

const WRONG_PASSWORD = defineProblem({
  code: 'wrong-password',
  status: 401,
  title: 'The password is not right',
});

export const wrongPassword = () => WRONG_PASSWORD('The present password is needed to choose a new one.');
