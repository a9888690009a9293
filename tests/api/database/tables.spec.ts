import { eq, sql } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import {
  connectDatabase,
  findProduct,
  inTransaction,
  isUniqueViolation,
  type ProductKey,
  seedIfEmpty,
} from '../../../server/db';
import { mapValues, people, reviews, runs, variantRevisions } from '../../../server/db/schema';
import { PRODUCT_OBJECTS } from '../../../server/policies';
import { createTestDatabase } from '../support/test-database';
import { memoryLog } from '../support/memory-log';
import { useApi } from '../support/test-api';
import { makeRun, makeScenario } from '../support/test-runs';

const api = useApi();

describe('the product of a thing', () => {
  it('is found from everything that belongs to one, with the role in it', async () => {
    const { db } = api().database;
    const ada = await api().person();
    const scenario = await makeScenario(db, ada);
    const runId = await makeRun(db, ada, scenario);
    const [review] = await db
      .insert(reviews)
      .values({ scenarioRevisionId: scenario.scenarioRevisionId, runId, askedBy: ada.id })
      .returning();
    const part = await db.execute<{ id: string }>(
      sql`insert into parts (product_id, name) values (${scenario.productId}, 'Belt') returning id`,
    );
    const partRevision = await db.execute<{ id: string }>(sql`
      insert into part_revisions (part_id, number, parameters, author_id)
      values (${part.rows[0].id}, 1, '[]', ${ada.id}) returning id`);
    const ids: Record<ProductKey, string> = {
      ...scenario,
      runId,
      reviewId: review.id,
      partId: part.rows[0].id,
      partRevisionId: partRevision.rows[0].id,
    };
    const stranger = await api().person();
    for (const key of PRODUCT_OBJECTS) {
      const found = await findProduct(db, ada.id, key, ids[key]);
      expect([key, found]).toEqual([key, { id: scenario.productId, role: 'designer' }]);
      expect(await findProduct(db, stranger.id, key, ids[key])).toEqual({
        id: scenario.productId,
        role: undefined,
      });
      expect(await findProduct(db, ada.id, key, ada.id)).toBeUndefined();
    }
  });
});

describe('revisions', () => {
  it('refuse a second one of the same number', async () => {
    const { db } = api().database;
    const ada = await api().person();
    const { variantId } = await makeScenario(db, ada);
    const save = () =>
      db.insert(variantRevisions).values({ variantId, number: 2, description: '{}', authorId: ada.id });
    const saved = await Promise.allSettled([save(), save()]);
    const [failed] = saved.filter(({ status }) => status === 'rejected');
    expect(saved.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    expect(failed.status === 'rejected' && isUniqueViolation(failed.reason, 'variant_revisions_number')).toBe(
      true,
    );
  });
});

describe('the values of a map', () => {
  const map = {
    columns: 3,
    rows: 2,
    x: Float64Array.of(1, 2, 3),
    y: Float64Array.of(4, 5),
    measure: 'closest',
    others: 'nominal',
  } as const;

  it('come back to the last bit', async () => {
    const { db } = api().database;
    const runId = await makeRun(db, await api().person());
    const values = Float64Array.of(0.1, -0, Number.NaN, Infinity, 5e-324, 1.7976931348623157e308);
    await db.insert(mapValues).values({ runId, ...map, values });
    const [stored] = await db.select().from(mapValues).where(eq(mapValues.runId, runId));
    expect(stored.values).toEqual(values);
  });

  it('must fit the size of the map', async () => {
    const { db } = api().database;
    const runId = await makeRun(db, await api().person());
    const short = db.insert(mapValues).values({ runId, ...map, values: Float64Array.of(1, 2) });
    await expect(short).rejects.toMatchObject({ cause: { constraint: 'map_values_complete' } });
  });
});

describe('a run', () => {
  it.each([
    ['done without a result', { state: 'done', finishedAt: new Date() }, 'runs_result_when_done'],
    ['failed without an error', { state: 'failed', finishedAt: new Date() }, 'runs_error_when_failed'],
    ['cancelled without an end', { state: 'cancelled' }, 'runs_finished_when_over'],
  ] as const)('cannot be %s', async (_what, change, constraint) => {
    const { db } = api().database;
    const runId = await makeRun(db, await api().person());
    const changed = db.update(runs).set(change).where(eq(runs.id, runId));
    await expect(changed).rejects.toMatchObject({ cause: { constraint } });
  });
});

describe('people', () => {
  it('have one account for an address, whatever its capitals', async () => {
    await api().person({ email: 'Cleo@Example.com' });
    const second = api().person({ email: 'cleo@example.com' });
    const error = await second.catch((reason: unknown) => reason);
    expect(isUniqueViolation(error, 'people_email_unique')).toBe(true);
  });
});

describe('a transaction', () => {
  it('that the database gave up in favour of another runs again', async () => {
    const { db } = api().database;
    const ada = await api().person();
    let runs = 0;
    const rename = () =>
      inTransaction(
        db,
        async (tx) => {
          runs += 1;
          const [{ name }] = await tx.select().from(people).where(eq(people.id, ada.id));
          await tx
            .update(people)
            .set({ name: `${name}+` })
            .where(eq(people.id, ada.id));
        },
        { isolation: 'serializable' },
      );
    await Promise.all([rename(), rename(), rename()]);
    const [{ name }] = await db.select().from(people).where(eq(people.id, ada.id));
    expect(name).toBe('Test Person+++');
    expect(runs).toBeGreaterThanOrEqual(3);
  });

  it('leaves nothing of work that failed', async () => {
    const { db } = api().database;
    const ada = await api().person();
    const failing = inTransaction(db, async (tx) => {
      await tx.update(people).set({ name: 'Changed' }).where(eq(people.id, ada.id));
      throw new Error('no');
    });
    await expect(failing).rejects.toThrow('no');
    const [{ name }] = await db.select().from(people).where(eq(people.id, ada.id));
    expect(name).toBe('Test Person');
  });
});

describe('a seed', () => {
  it('is sown once, into an empty database only', async () => {
    const testDatabase = await createTestDatabase();
    const database = connectDatabase({ url: testDatabase.url, log: memoryLog().log });
    const { db } = database;
    const sow = (name: string) =>
      seedIfEmpty(db, async (tx) => {
        await tx.insert(people).values({ name, email: `${name}@example.com`, passwordHash: 'none' });
        return name;
      });
    try {
      const sown = await Promise.all([sow('one'), sow('two')]);
      expect(sown.filter((name) => name !== undefined)).toHaveLength(1);
      expect(await sow('three')).toBeUndefined();
      expect(await db.select().from(people)).toHaveLength(1);
    } finally {
      await database.close();
      await testDatabase.drop();
    }
  });
});
