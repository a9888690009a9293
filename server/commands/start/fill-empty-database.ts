import { emailSchema } from '../../../shared/contracts/api';
import { type Db, type Seed, seedIfEmpty } from '../../db';
import type { SignIn } from '../../features/demo';
import { type FirstInvitation, inviteFirstAdministrator } from '../../features/people';
import { type Configuration, servesThisMachineOnly } from '../../platform/configuration';
import { keepSignIns, keptSignIns } from './sign-ins';

export interface FillOptions {
  readonly db: Db;
  readonly configuration: Pick<Configuration, 'http' | 'administratorEmail'>;
  readonly demo: Seed<readonly SignIn[]>;
  /** Where the demo's sign-ins are kept. */
  readonly signInFile: string;
  readonly now: Date;
}

/** How people get in, as far as whoever starts the server must be told. */
export interface WaysIn {
  /** Of the demo; none where it is not there. */
  readonly signIns: readonly SignIn[];
  readonly firstAdministrator: FirstInvitation | undefined;
}

/** An address of the server's own domain; of one that is reserved for no use where it has no such name. */
function administratorAt(origin: string | undefined): string {
  const hostname = origin === undefined ? 'localhost' : new URL(origin).hostname;
  const email = emailSchema.safeParse(`administrator@${hostname}`);
  return email.success ? email.data : 'administrator@tareline.invalid';
}

/**
 * Sees to it that somebody can sign in to a database without people: by an invitation of the first administrator
 * where one is named or the server can be reached from other machines, since the demo's passwords are printed;
 * elsewhere by the demo.
 */
export async function fillEmptyDatabase({
  db,
  configuration: { http, administratorEmail },
  demo,
  signInFile,
  now,
}: FillOptions): Promise<WaysIn> {
  if (administratorEmail !== undefined || !servesThisMachineOnly(http)) {
    const email = administratorEmail ?? administratorAt(http.origin);
    const firstAdministrator = await seedIfEmpty(db, (tx) => inviteFirstAdministrator(tx, { email, now }));
    return { signIns: [], firstAdministrator };
  }
  await seedIfEmpty(db, async (tx) => {
    // Before the transaction ends: else a start that is killed in between leaves people whose passwords nobody knows.
    keepSignIns(signInFile, await demo(tx));
  });
  return { signIns: keptSignIns(signInFile), firstAdministrator: undefined };
}

/** What is printed below the server's address. */
export function firstAdministratorLines(
  address: string,
  { email, token, expiresAt }: FirstInvitation,
): string[] {
  const until = `${expiresAt.toISOString().slice(0, 16).replace('T', ' ')} UTC`;
  return [
    `Nobody is in the organisation yet. The first administrator, ${email}, joins by this link, once, until ${until}:`,
    `${address}/invitation/${token}`,
  ];
}
