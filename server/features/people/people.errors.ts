import { defineProblem, Problem } from '../../platform/problem';

const LAST_ADMINISTRATOR = defineProblem({
  code: 'last-administrator',
  status: 409,
  title: 'This is the last administrator',
});

export const lastAdministrator = () =>
  LAST_ADMINISTRATOR('Make somebody else an administrator first; without one nobody could invite people.');

const PERSON_EXISTS = defineProblem({
  code: 'person-exists',
  status: 409,
  title: 'This person is here already',
});

export const personExists = (email: string) => PERSON_EXISTS(`${email} has an account.`);
export const personIsDisabled = (email: string) =>
  PERSON_EXISTS(`${email} has an account that is disabled; enable it instead.`);
export const beingInvited = (email: string) =>
  PERSON_EXISTS(`Somebody else is inviting ${email} at this moment.`);

const INVITATION_OPEN = defineProblem({
  code: 'invitation-open',
  status: 409,
  title: 'This person has not joined yet',
});

export const notYetJoined = () => INVITATION_OPEN('An invitation cannot be disabled; remove it instead.');

const INVITATION_UNKNOWN = defineProblem({
  code: 'invitation-unknown',
  status: 404,
  title: 'There is no such invitation',
});

export const invitationUnknown = () => INVITATION_UNKNOWN('Check that the link is complete.');

function gone(code: string, title: string, detail: string): Problem {
  return new Problem(code, 410, title, detail);
}

export const invitationUsed = () =>
  gone('invitation-used', 'The invitation was used already', 'Sign in with the password you chose.');
export const invitationExpired = () =>
  gone('invitation-expired', 'The invitation has expired', 'Ask an administrator for a new one.');
export const invitationRevoked = () =>
  gone('invitation-revoked', 'The invitation was withdrawn', 'Ask an administrator for a new one.');
