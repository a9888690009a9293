import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connectDatabase, type Database, databaseCode, recordInAudit } from '../../../server/db';
import { INSUFFICIENT_PRIVILEGE } from '../../../server/db/database-errors';
import { audit } from '../../../server/db/schema';
import { memoryLog } from '../support/memory-log';
import { createTestDatabase, type TestDatabase } from '../support/test-database';

let testDatabase: TestDatabase;
let application: Database;
let owner: Database;
beforeAll(async () => {
  testDatabase = await createTestDatabase();
  const { log } = memoryLog();
  application = connectDatabase({ url: testDatabase.url, log });
  owner = connectDatabase({ url: testDatabase.ownerUrl, log });
  await recordInAudit(application.db, { action: 'test.done', objectKind: 'test', objectId: '1' });
});
afterAll(async () => {
  await application.close();
  await owner.close();
  await testDatabase.drop();
});

const changes = [
  ['update', sql`update audit set action = 'other'`],
  ['delete', sql`delete from audit`],
  ['truncate', sql`truncate audit`],
] as const;

/** What PostgreSQL says of a statement. */
async function verdict(database: Database, statement: ReturnType<typeof sql>) {
  try {
    await database.db.execute(statement);
    return 'done';
  } catch (error) {
    const cause = error instanceof Error && error.cause instanceof Error ? error.cause.message : '';
    return { code: databaseCode(error), message: cause };
  }
}

describe('the application', () => {
  it('adds to the audit table and reads it', async () => {
    const rows = await application.db.select().from(audit);
    expect(rows).toMatchObject([{ action: 'test.done', objectKind: 'test', objectId: '1', personId: null }]);
  });

  it.each(changes)('has no right to %s it', async (_name, statement) => {
    expect(await verdict(application, statement)).toEqual({
      code: INSUFFICIENT_PRIVILEGE,
      message: 'permission denied for table audit',
    });
  });

  it.each([
    ['tables', sql`create table another (id int)`],
    ['triggers', sql`drop trigger audit_unchanged on audit`],
    ['the list of migrations', sql`delete from drizzle.__drizzle_migrations`],
  ])('cannot change %s', async (_name, statement) => {
    expect(await verdict(application, statement)).toMatchObject({ code: INSUFFICIENT_PRIVILEGE });
  });

  it('can use the tables of the queue', async () => {
    const added = await application.db.execute(
      sql`select graphile_worker.add_job('test', '{}'::json) as job`,
    );
    expect(added.rows).toHaveLength(1);
  });
});

describe('the owner', () => {
  it.each(changes)('is kept by a trigger from %s of the audit table', async (_name, statement) => {
    expect(await verdict(owner, statement)).toMatchObject({
      code: INSUFFICIENT_PRIVILEGE,
      message: 'rows of the audit table are never changed',
    });
  });
});
