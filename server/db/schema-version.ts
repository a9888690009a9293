import { readMigrationFiles } from 'drizzle-orm/migrator';
import { join } from 'node:path';
import type { ClientBase, Pool } from 'pg';
import { packageRoot } from '../platform/package-root';
import { databaseCode, UNDEFINED_TABLE } from './database-errors';

export const MIGRATIONS_FOLDER = join(packageRoot, 'drizzle');

/** `other`: the database holds a migration that this version of the program does not know, or knows otherwise. */
export type SchemaState = 'current' | 'behind' | 'other';

/**
 * Compares the migrations that a database has seen with those that the program brings.
 *
 * @param folder of the migrations
 */
export async function readSchemaState(
  connection: Pool | ClientBase,
  folder = MIGRATIONS_FOLDER,
): Promise<SchemaState> {
  const known = readMigrationFiles({ migrationsFolder: folder }).map(({ hash }) => hash);
  const applied = await appliedMigrations(connection);
  if (applied.some((hash, i) => hash !== known[i])) return 'other';
  return applied.length < known.length ? 'behind' : 'current';
}

async function appliedMigrations(connection: Pool | ClientBase): Promise<string[]> {
  try {
    const { rows } = await connection.query<{ hash: string }>(
      'select hash from drizzle.__drizzle_migrations order by created_at',
    );
    return rows.map(({ hash }) => hash);
  } catch (error) {
    if (databaseCode(error) === UNDEFINED_TABLE) return [];
    throw error;
  }
}

/** The database cannot be used with this version of the program; the message is all that the person needs. */
export class SchemaMismatchError extends Error {
  override readonly name = 'SchemaMismatchError';
}

export const SCHEMA_OTHER =
  'the database was written by another version of Tareline; use that version, or a newer one, or another database';
export const SCHEMA_BEHIND = 'the database must be brought up to date first: run npm start';

/**
 * Servers and workers call this before they work; only `start` migrates.
 *
 * @throws SchemaMismatchError
 */
export async function requireCurrentSchema(connection: Pool | ClientBase): Promise<void> {
  const state = await readSchemaState(connection);
  if (state !== 'current') {
    throw new SchemaMismatchError(state === 'other' ? SCHEMA_OTHER : SCHEMA_BEHIND);
  }
}
