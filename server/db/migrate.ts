import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate as runMigrations } from 'drizzle-orm/node-postgres/migrator';
import { Logger, runMigrations as runQueueMigrations } from 'graphile-worker';
import { Client, Pool } from 'pg';
import { grantToApplication } from './grants';
import { MIGRATIONS_FOLDER, readSchemaState, SCHEMA_OTHER, SchemaMismatchError } from './schema-version';

/** The same for every process that migrates; "TARE" in ASCII. */
const MIGRATION_LOCK = 0x54415245;

export interface MigrateOptions {
  /** A role that may change the schema. */
  readonly ownerUrl: string;
  /** The role that the application uses; undefined where it is the owner itself. */
  readonly applicationRole: string | undefined;
  /** Another folder of migrations, for tests. */
  readonly folder?: string;
}

/**
 * Brings a database up to date: tables, the queue's own tables, rights. The migrator itself takes no lock, so
 * one is held around everything; of several processes that start at once the others find the work done.
 *
 * @returns whether there was anything to migrate
 * @throws SchemaMismatchError where the database was written by another version
 */
export async function migrate({
  ownerUrl,
  applicationRole,
  folder = MIGRATIONS_FOLDER,
}: MigrateOptions): Promise<boolean> {
  const client = new Client({ connectionString: ownerUrl, application_name: 'tareline migration' });
  await client.connect();
  try {
    // Ends with the connection, whatever happens in between.
    await client.query('select pg_advisory_lock($1)', [MIGRATION_LOCK]);
    const state = await readSchemaState(client, folder);
    if (state === 'other') throw new SchemaMismatchError(SCHEMA_OTHER);
    if (state === 'behind') {
      await runMigrations(drizzle(client), { migrationsFolder: folder });
    }
    await migrateQueue(ownerUrl);
    if (applicationRole !== undefined) await grantToApplication(client, applicationRole);
    return state === 'behind';
  } finally {
    await client.end();
  }
}

async function migrateQueue(ownerUrl: string): Promise<void> {
  const pool = new Pool({ connectionString: ownerUrl, max: 1 });
  // A connection that breaks while idle is no fault of the migration; the next statement would tell.
  pool.on('error', () => undefined);
  pool.on('connect', (client) => client.on('error', () => undefined));
  try {
    const silent = new Logger(() => () => undefined);
    await runQueueMigrations({ pgPool: pool, logger: silent });
  } finally {
    await pool.end();
  }
}
