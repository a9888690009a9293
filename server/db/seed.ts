import { sql } from 'drizzle-orm';
import { type Db, type Tx } from './client';
import { people } from './schema';
import { inTransaction } from './transaction';

/** Fills an empty database, in one transaction; what it returns is told to whoever started the server. */
export type Seed<T> = (tx: Tx) => Promise<T>;

/** "SEED" in ASCII. */
const SEED_LOCK = 0x53454544;

/**
 * Runs a seed unless somebody is in the database already; two servers that start at once seed once.
 *
 * @returns what the seed returned, undefined where it was not run
 */
export function seedIfEmpty<T>(db: Db, seed: Seed<T>): Promise<T | undefined> {
  return inTransaction(db, async (tx) => {
    await tx.execute(sql`select pg_advisory_xact_lock(${SEED_LOCK})`);
    const anybody = await tx.select({ id: people.id }).from(people).limit(1);
    return anybody.length > 0 ? undefined : seed(tx);
  });
}
