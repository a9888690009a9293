import { and, asc, count, eq, isNull, ne, sql } from 'drizzle-orm';
import type { ProductRole } from '../../../shared/contracts/api';
import type { Executor, Tx } from '../../db';
import { memberships, people } from '../../db/schema';

/** Who in which product. */
export interface MemberKey {
  readonly productId: string;
  readonly personId: string;
}

function isMember({ productId, personId }: MemberKey) {
  return and(eq(memberships.productId, productId), eq(memberships.personId, personId));
}

const columns = {
  personId: people.id,
  name: people.name,
  email: people.email,
  role: memberships.role,
};

export function listMembers(db: Executor, productId: string) {
  return db
    .select(columns)
    .from(memberships)
    .innerJoin(people, eq(people.id, memberships.personId))
    .where(eq(memberships.productId, productId))
    .orderBy(asc(sql`lower(${people.name})`), asc(people.email));
}

export async function findMember(db: Executor, key: MemberKey) {
  const [row] = await db
    .select(columns)
    .from(memberships)
    .innerJoin(people, eq(people.id, memberships.personId))
    .where(isMember(key));
  return row;
}

export async function findPerson(db: Executor, personId: string) {
  const [row] = await db
    .select({ name: people.name, disabledAt: people.disabledAt })
    .from(people)
    .where(eq(people.id, personId));
  return row;
}

/** How many designers beside one person can sign in. */
export async function countOtherDesigners(tx: Tx, { productId, personId }: MemberKey): Promise<number> {
  const [row] = await tx
    .select({ others: count() })
    .from(memberships)
    .innerJoin(people, eq(people.id, memberships.personId))
    .where(
      and(
        eq(memberships.productId, productId),
        ne(memberships.personId, personId),
        eq(memberships.role, 'designer'),
        isNull(people.disabledAt),
      ),
    );
  return row.others;
}

export async function putMember(tx: Executor, key: MemberKey, role: ProductRole): Promise<void> {
  await tx
    .insert(memberships)
    .values({ ...key, role })
    .onConflictDoUpdate({
      target: [memberships.productId, memberships.personId],
      set: { role, changedAt: sql`now()` },
    });
}

export async function removeMember(tx: Tx, key: MemberKey): Promise<void> {
  await tx.delete(memberships).where(isMember(key));
}
