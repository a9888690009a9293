import { eq } from 'drizzle-orm';
import type { Db } from '../../../server/db';
import { people } from '../../../server/db/schema';
import { createPasswords } from '../../../server/features/auth';
import { type Answer, HttpClient } from './http-client';
import type { TestPerson } from './test-people';

export const PASSWORD = 'a load of seven bricks';

/** Made once for a test file: the hash is costly, which is its purpose. */
let hashed: Promise<string> | undefined;

/** Gives somebody PASSWORD to sign in with. */
export async function givePassword(db: Db, { id }: TestPerson): Promise<void> {
  hashed ??= createPasswords().hash(PASSWORD);
  const passwordHash = await hashed;
  await db.update(people).set({ passwordHash }).where(eq(people.id, id));
}

/** What an answer sets as the session's cookie, its attributes included. */
export function setCookieOf({ headers }: Answer): string {
  const cookies = headers['set-cookie'] ?? [];
  if (cookies.length !== 1) throw new Error(`the answer sets ${cookies.length} cookies`);
  return cookies[0];
}

/** A browser that has taken the cookie of an answer. */
export function browserWith(answer: Answer, address: string): HttpClient {
  return new HttpClient(address, setCookieOf(answer).split(';')[0]);
}
