import { scenarioSchema, type Scenario, type Variant, variantSchema } from '../../../shared/contracts/api';
import { people, runs, scenarioRevisions } from '../../../server/db/schema';
import { and, eq } from 'drizzle-orm';
import { liftTableStudy, type StudyChanges } from './lift-table-study';
import type { TestApi } from './test-api';
import type { TestPerson } from './test-people';

/** Two designers, a reviewer and a viewer of one product, and an administrator without a role in it. */
export interface Team {
  readonly productId: string;
  readonly designer: TestPerson;
  readonly secondDesigner: TestPerson;
  readonly reviewer: TestPerson;
  readonly viewer: TestPerson;
  readonly administrator: TestPerson;
}

export async function makeTeam(api: TestApi): Promise<Team> {
  const designer = await api.person({ name: 'Dora Designer' });
  const secondDesigner = await api.person({ name: 'Sven Second' });
  const reviewer = await api.person({ name: 'Rita Reviewer' });
  const viewer = await api.person({ name: 'Vito Viewer' });
  const administrator = await api.person({ name: 'Ada Administrator', organisationRole: 'administrator' });
  const productId = await api.product(designer, [
    [designer, 'designer'],
    [secondDesigner, 'designer'],
    [reviewer, 'reviewer'],
    [viewer, 'viewer'],
  ]);
  return { productId, designer, secondDesigner, reviewer, viewer, administrator };
}

export async function makeVariant(
  { designer, productId }: Pick<Team, 'designer' | 'productId'>,
  name: string,
  changes?: StudyChanges,
): Promise<Variant> {
  const body = { name, study: liftTableStudy(changes) };
  return (await designer.post(`/api/products/${productId}/variants`, body)).read(variantSchema);
}

/** The scenario "Rated" of a new variant. */
export async function makeScenario(
  team: Pick<Team, 'designer' | 'productId'>,
  variantName: string,
  changes?: StudyChanges,
): Promise<Scenario> {
  const { scenarios } = await makeVariant(team, variantName, changes);
  return readScenario(team.designer, scenarios[0].id);
}

export async function readScenario(reader: TestPerson, scenarioId: string): Promise<Scenario> {
  return (await reader.get(`/api/scenarios/${scenarioId}`)).read(scenarioSchema);
}

/** A run that waits, written to the database: what computes is not under test here. */
export async function makeRun(
  { database: { db } }: TestApi,
  scenario: { id: string },
  requestedBy: TestPerson,
): Promise<string> {
  const [revision] = await db
    .select()
    .from(scenarioRevisions)
    .where(and(eq(scenarioRevisions.scenarioId, scenario.id), eq(scenarioRevisions.number, 1)));
  const [run] = await db
    .insert(runs)
    .values({
      scenarioRevisionId: revision.id,
      engineVersion: '1',
      studyHash: revision.studyHash,
      answerHash: revision.answerHash,
      requestedBy: requestedBy.id,
    })
    .returning({ id: runs.id });
  return run.id;
}

/** Somebody leaves the organisation: every session of theirs is worth nothing from now on. */
export async function disable({ database: { db } }: TestApi, { id }: TestPerson): Promise<void> {
  await db.update(people).set({ disabledAt: new Date() }).where(eq(people.id, id));
}
