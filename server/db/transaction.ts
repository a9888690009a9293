import type { Db, Tx } from './client';
import { isWorthRepeating } from './database-errors';

const ATTEMPTS = 4;

export interface TransactionOptions {
  readonly isolation?: 'read committed' | 'repeatable read' | 'serializable';
}

/**
 * Runs work in a transaction, again where the database gave it up in favour of another one. The work may
 * therefore run more than once: outside of the transaction it changes nothing.
 */
export async function inTransaction<T>(
  db: Db,
  work: (tx: Tx) => Promise<T>,
  { isolation = 'read committed' }: TransactionOptions = {},
): Promise<T> {
  for (let attempt = 1; ; attempt++) {
    try {
      return await db.transaction(work, { isolationLevel: isolation });
    } catch (error) {
      if (attempt >= ATTEMPTS || !isWorthRepeating(error)) throw error;
    }
  }
}
