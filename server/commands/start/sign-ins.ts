import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import type { SignIn } from '../../features/demo';

/** Keeps the demo's sign-ins, for the present user's eyes only. */
export function keepSignIns(file: string, signIns: readonly SignIn[]): void {
  // A file that is there keeps its mode when it is written anew.
  rmSync(file, { force: true });
  writeFileSync(file, `${JSON.stringify(signIns, null, 2)}\n`, { mode: 0o600 });
}

/** The sign-ins of a demo; none where the database was filled without one, or from another checkout. */
export function keptSignIns(file: string): readonly SignIn[] {
  return existsSync(file) ? (JSON.parse(readFileSync(file, 'utf8')) as SignIn[]) : [];
}

/** One line for each, in columns. */
export function signInLines(signIns: readonly SignIn[]): string[] {
  const width = (pick: (signIn: SignIn) => string) =>
    Math.max(...signIns.map((signIn) => pick(signIn).length));
  const emailWidth = width(({ email }) => email);
  const passwordWidth = width(({ password }) => password);
  return signIns.map(
    ({ email, password, role }) => `${email.padEnd(emailWidth)}  ${password.padEnd(passwordWidth)}  ${role}`,
  );
}
