import { generateDrizzleJson, generateMigration } from 'drizzle-kit/api';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Client, type ClientBase } from 'pg';
import { describe, expect, it } from 'vitest';
import { migrate, readSchemaState, SchemaMismatchError } from '../../../server/db';
import { CASING } from '../../../server/db/client';
import { APPLICATION_ROLE } from '../../../server/db/roles';
import * as schema from '../../../server/db/schema';
import { MIGRATIONS_FOLDER, requireCurrentSchema } from '../../../server/db/schema-version';
import { createTestDatabase } from '../support/test-database';

async function onDatabase<T>(
  template: string | undefined,
  work: (client: Client, url: string) => Promise<T>,
) {
  const database = await createTestDatabase(template);
  const client = new Client({ connectionString: database.ownerUrl });
  await client.connect();
  try {
    return await work(client, database.ownerUrl);
  } finally {
    await client.end();
    await database.drop();
  }
}

/** Every column, constraint, index and enumeration of the product's tables, as the database itself describes them. */
async function describeTables(client: ClientBase) {
  const query = async (text: string) => (await client.query<Record<string, unknown>>(text)).rows;
  return {
    columns: await query(`
      select table_name, column_name, data_type, udt_name, is_nullable, column_default, is_identity,
        identity_generation, datetime_precision
      from information_schema.columns where table_schema = 'public' order by table_name, column_name`),
    constraints: await query(`
      select conrelid::regclass::text as table, conname, pg_get_constraintdef(oid) as definition
      from pg_constraint where connamespace = 'public'::regnamespace order by 1, 2`),
    indexes: await query(`
      select indexname, indexdef from pg_indexes where schemaname = 'public' order by indexname`),
    enumerations: await query(`
      select typname, array_agg(enumlabel order by enumsortorder)::text as labels
      from pg_enum join pg_type on pg_type.oid = enumtypid group by typname order by typname`),
  };
}

interface Journal {
  readonly entries: readonly { readonly tag: string; readonly when: number }[];
}

describe('the migrations', () => {
  it('lead to the schema of the code', async () => {
    const migrated = await onDatabase(undefined, describeTables);
    const fresh = await onDatabase('template0', async (client) => {
      const statements = await generateMigration(
        generateDrizzleJson({}),
        generateDrizzleJson(schema, undefined, undefined, CASING),
      );
      for (const statement of statements) await client.query(statement);
      return describeTables(client);
    });
    expect(migrated.columns.length).toBeGreaterThan(100);
    expect(migrated).toEqual(fresh);
  });

  it('bear rising times, since the migrator skips one that is older than the newest applied', () => {
    const text = readFileSync(join(MIGRATIONS_FOLDER, 'meta', '_journal.json'), 'utf8');
    const times = (JSON.parse(text) as Journal).entries.map(({ when }) => when);
    expect(times.length).toBeGreaterThan(0);
    expect(times).toEqual([...new Set(times)].sort((a, b) => a - b));
  });

  it('are applied once where four processes start at the same time', async () => {
    await onDatabase('template0', async (client, ownerUrl) => {
      const start = () => migrate({ ownerUrl, applicationRole: APPLICATION_ROLE });
      const migrated = await Promise.all([start(), start(), start(), start()]);
      expect(migrated.filter(Boolean)).toHaveLength(1);
      expect(await readSchemaState(client)).toBe('current');
      expect(await start()).toBe(false);
    });
  });

  it('wait for another process that is at it', async () => {
    await onDatabase('template0', async (client, ownerUrl) => {
      await client.query(`select pg_advisory_lock(${0x54415245})`);
      const waiting = migrate({ ownerUrl, applicationRole: undefined });
      const isWaiting = async () => {
        const { rows } = await client.query(`select from pg_locks where locktype = 'advisory' and not granted
          and database = (select oid from pg_database where datname = current_database())`);
        return rows.length > 0;
      };
      await expect.poll(isWaiting).toBe(true);
      expect(await readSchemaState(client)).toBe('behind');
      await client.query('select pg_advisory_unlock_all()');
      expect(await waiting).toBe(true);
    });
  });
});

describe('a database of another version', () => {
  it('is refused where it lacks a migration', async () => {
    await onDatabase('template0', async (client) => {
      await expect(requireCurrentSchema(client)).rejects.toThrow(/npm start/);
    });
  });

  it('is neither used nor migrated where it holds a migration that is not known', async () => {
    await onDatabase(undefined, async (client, ownerUrl) => {
      await client.query(
        "insert into drizzle.__drizzle_migrations (hash, created_at) values ('later', 9999999999999)",
      );
      expect(await readSchemaState(client)).toBe('other');
      await expect(requireCurrentSchema(client)).rejects.toThrow(SchemaMismatchError);
      await expect(migrate({ ownerUrl, applicationRole: undefined })).rejects.toThrow(/another version/);
    });
  });
});
