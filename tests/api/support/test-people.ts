import { randomUUID } from 'node:crypto';
import type { Db } from '../../../server/db';
import { memberships, people, products, sessions } from '../../../server/db/schema';
import { sessionCookie } from '../../../server/platform/http/session-cookie';
import { hashToken, newToken } from '../../../server/platform/opaque-token';
import type { OrganisationRole, ProductRole } from '../../../server/policies';
import { HttpClient } from './http-client';

export interface PersonOptions {
  readonly name?: string;
  readonly email?: string;
  readonly organisationRole?: OrganisationRole;
  readonly mayCreateProducts?: boolean;
}

const SESSION_MS = 3600_000;

/** A person who has signed in, and speaks to the server. */
export class TestPerson extends HttpClient {
  constructor(
    address: string,
    cookie: string,
    readonly id: string,
    readonly email: string,
  ) {
    super(address, cookie);
  }
}

/**
 * Makes a person with a living session; written to the database, without the routes that are under test.
 *
 * @param now when the session begins
 */
export async function makePerson(
  db: Db,
  address: string,
  { name = 'Test Person', email, organisationRole = 'member', mayCreateProducts = false }: PersonOptions = {},
  now = new Date(),
): Promise<TestPerson> {
  const [person] = await db
    .insert(people)
    .values({
      ...{ name, organisationRole, mayCreateProducts },
      email: email ?? `${randomUUID()}@example.com`,
      // No password fits it: whoever needs to sign in by one sets it.
      passwordHash: 'none',
    })
    .returning();
  const token = newToken();
  await db.insert(sessions).values({
    personId: person.id,
    tokenHash: hashToken(token),
    createdAt: now,
    lastSeenAt: now,
    expiresAt: new Date(now.getTime() + SESSION_MS),
  });
  const [cookie] = sessionCookie({ https: false }).give(token, SESSION_MS).split(';');
  return new TestPerson(address, cookie, person.id, person.email);
}

/** Makes a product in which the given people have roles. */
export async function makeProduct(
  db: Db,
  createdBy: TestPerson,
  roles: readonly (readonly [TestPerson, ProductRole])[] = [],
): Promise<string> {
  const [product] = await db
    .insert(products)
    .values({ name: `Product ${randomUUID()}`, createdBy: createdBy.id })
    .returning();
  if (roles.length > 0) {
    await db
      .insert(memberships)
      .values(roles.map(([person, role]) => ({ productId: product.id, personId: person.id, role })));
  }
  return product.id;
}
