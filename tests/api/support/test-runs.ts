import { randomUUID } from 'node:crypto';
import type { Db } from '../../../server/db';
import { runs, scenarioRevisions, scenarios, variantRevisions, variants } from '../../../server/db/schema';
import { makeProduct, type TestPerson } from './test-people';

export interface MadeScenario {
  readonly productId: string;
  readonly variantId: string;
  readonly variantRevisionId: string;
  readonly scenarioId: string;
  readonly scenarioRevisionId: string;
}

/** A product with one variant and one scenario, each with a first revision; the texts are no studies. */
export async function makeScenario(db: Db, author: TestPerson): Promise<MadeScenario> {
  const productId = await makeProduct(db, author, [[author, 'designer']]);
  const [variant] = await db
    .insert(variants)
    .values({ productId, name: 'Standard', position: 1 })
    .returning();
  const [variantRevision] = await db
    .insert(variantRevisions)
    .values({ variantId: variant.id, number: 1, description: '{}', authorId: author.id })
    .returning();
  const [scenario] = await db.insert(scenarios).values({ variantId: variant.id, name: 'Rated' }).returning();
  const [revision] = await db
    .insert(scenarioRevisions)
    .values({
      scenarioId: scenario.id,
      number: 1,
      variantRevisionId: variantRevision.id,
      toleranceSet: '{}',
      study: '{}',
      studyHash: `study-${randomUUID()}`,
      answerHash: `answer-${randomUUID()}`,
      authorId: author.id,
    })
    .returning();
  return {
    productId,
    variantId: variant.id,
    variantRevisionId: variantRevision.id,
    scenarioId: scenario.id,
    scenarioRevisionId: revision.id,
  };
}

/** A run of such a scenario, waiting in the queue that nobody works on. */
export async function makeRun(db: Db, author: TestPerson, scenario?: MadeScenario): Promise<string> {
  const { scenarioRevisionId } = scenario ?? (await makeScenario(db, author));
  const [run] = await db
    .insert(runs)
    .values({
      scenarioRevisionId,
      engineVersion: '1',
      studyHash: 'study',
      answerHash: 'answer',
      requestedBy: author.id,
    })
    .returning();
  return run.id;
}
