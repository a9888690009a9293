import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connectDatabase, type Database } from '../../server/db';
import { runs } from '../../server/db/schema';
import { type Result, resultSchema, type Study } from '../../shared/contracts';
import { runMapSchema, variantSchema } from '../../shared/contracts/api';
import { liftTableStudy } from '../api/support/lift-table-study';
import { memoryLog } from '../api/support/memory-log';
import { followRuns, isEnd, readRun, startRun } from '../api/support/run-follower';
import { createTestDatabase, type TestDatabase } from '../api/support/test-database';
import { makePerson, makeProduct, TestPerson } from '../api/support/test-people';
import { runCommand } from '../commands/support/run-command';
import { type ServerProcess, startServerProcess } from './support/server-process';

/** Seconds of work: time enough to be killed in the middle, and to be done again. */
const study: Study = {
  ...liftTableStudy(),
  map: { x: 'm', y: 'k', columns: 61, rows: 61, measure: 'modulusMargin', others: 'anywhere' },
};

/** Text of a result without what differs from one computation to the next. */
function lastingText(text: string): string {
  return text.replace(/"milliseconds":[\d.e+-]+/, '"milliseconds":0');
}

describe('a run whose server is ended in the middle', () => {
  let testDatabase: TestDatabase;
  let database: Database;
  let expected: Result;
  let server: ServerProcess | undefined;

  beforeAll(async () => {
    testDatabase = await createTestDatabase();
    database = connectDatabase({ url: testDatabase.url, log: memoryLog().log });
    const { status, output } = runCommand(['-', '--map'], { input: JSON.stringify(study) });
    expect(status).toBe(0);
    expected = resultSchema.parse(JSON.parse(output));
  });
  afterAll(async () => {
    await server?.kill();
    await database.close();
    await testDatabase.drop();
  });

  const restart = async (person?: TestPerson) => {
    server = await startServerProcess(testDatabase);
    if (person !== undefined) {
      return new TestPerson(server.address, person.cookie ?? '', person.id, person.email);
    }
    return makePerson(database.db, server.address);
  };
  /** Starts the run of a new scenario and waits until it is under way. */
  const begin = async (designer: TestPerson): Promise<string> => {
    const productId = await makeProduct(database.db, designer, [[designer, 'designer']]);
    const variant = await designer.post(`/api/products/${productId}/variants`, { name: 'Standard', study });
    const [scenario] = variant.read(variantSchema).scenarios;
    const follower = await followRuns(designer);
    const { id } = await startRun(designer, scenario.id);
    await follower.until(({ runId, kind, progress }) => runId === id && kind === 'progress' && progress > 0);
    follower.reader.leave();
    return id;
  };
  const finish = async (designer: TestPerson, runId: string) => {
    const follower = await followRuns(designer);
    await follower.until(isEnd(runId));
    follower.reader.leave();
    const run = await readRun(designer, runId);
    expect(run).toMatchObject({ state: 'done', error: null });
    const [row] = await database.db.select().from(runs).where(eq(runs.id, runId));
    const { map: expectedMap, ...expectedResult } = expected;
    expect(lastingText(row.result ?? '')).toBe(lastingText(JSON.stringify(expectedResult)));
    const map = (await designer.get(`/api/runs/${runId}/map`)).read(runMapSchema);
    expect(map).toEqual(expectedMap);
    return row.attempts;
  };

  it('is finished after the next start, with the digits of the study command', async () => {
    const designer = await restart();
    const runId = await begin(designer);
    await server?.kill();
    const [row] = await database.db.select().from(runs).where(eq(runs.id, runId));
    expect(row).toMatchObject({ state: 'running', result: null });
    const again = await restart(designer);
    expect(await finish(again, runId)).toBe(2);
    expect(await server?.stop()).toBe(0);
  });

  it('is put back by a stop in order, and finished after the next start as if nothing had been', async () => {
    const designer = await restart();
    const runId = await begin(designer);
    expect(await server?.stop()).toBe(0);
    const [row] = await database.db.select().from(runs).where(eq(runs.id, runId));
    expect(row).toMatchObject({ state: 'queued', progress: 0, attempts: 0, result: null });
    const again = await restart(designer);
    expect(await finish(again, runId)).toBe(1);
    expect(await server?.stop()).toBe(0);
  });
});
