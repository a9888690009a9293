import type { Member, ProductRole } from '../../../shared/contracts/api';
import { type Db, inTransaction, recordInAudit, type Tx } from '../../db';
import type { Actor } from '../scenarios';
import { lockProduct } from '../variants';
import {
  countOtherDesigners,
  findMember,
  findPerson,
  listMembers,
  type MemberKey,
  putMember,
  removeMember,
} from './members.repository';
import { lastDesigner, noMember, noPerson, noProduct, personDisabled } from './products.errors';
import { isLiving } from './products.repository';

export async function readMembers({ db }: { db: Db }, productId: string): Promise<Member[]> {
  if (!(await isLiving(db, productId))) throw noProduct();
  return listMembers(db, productId);
}

/** @throws Problem last-designer where nobody else could design any more */
async function keepDesigner(tx: Tx, key: MemberKey, member: Member): Promise<void> {
  if (member.role === 'designer' && (await countOtherDesigners(tx, key)) === 0) {
    throw lastDesigner(member.name);
  }
}

/** Gives somebody a role in a product, in place of the one they may have. */
export async function setMember(
  { db }: { db: Db },
  actor: Actor,
  key: MemberKey,
  role: ProductRole,
): Promise<Member> {
  return inTransaction(db, async (tx) => {
    if ((await lockProduct(tx, key.productId)) === undefined) throw noProduct();
    const person = await findPerson(tx, key.personId);
    if (person === undefined) throw noPerson();
    const before = await findMember(tx, key);
    if (before === undefined && person.disabledAt !== null) throw personDisabled(person.name);
    if (before !== undefined && role !== 'designer') await keepDesigner(tx, key, before);
    await putMember(tx, key, role);
    await recordMember(tx, actor, key, 'membership.set', {
      role: { from: before?.role ?? null, to: role },
    });
    const member = await findMember(tx, key);
    if (member === undefined) throw noMember();
    return member;
  });
}

export async function dropMember({ db }: { db: Db }, actor: Actor, key: MemberKey): Promise<void> {
  await inTransaction(db, async (tx) => {
    if ((await lockProduct(tx, key.productId)) === undefined) throw noProduct();
    const member = await findMember(tx, key);
    if (member === undefined) throw noMember();
    await keepDesigner(tx, key, member);
    await removeMember(tx, key);
    await recordMember(tx, actor, key, 'membership.removed', {
      role: { from: member.role, to: null },
    });
  });
}

/** Writes down a change of roles, with the product as its object. */
export function recordMember(
  tx: Tx,
  actor: Actor,
  { productId, personId }: MemberKey,
  action: 'membership.set' | 'membership.removed',
  data: Record<string, unknown>,
): Promise<void> {
  return recordInAudit(tx, {
    ...actor,
    action,
    objectKind: 'product',
    objectId: productId,
    data: { member: personId, ...data },
  });
}
