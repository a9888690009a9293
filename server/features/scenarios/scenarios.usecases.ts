import type { NewScenario, Rename, Scenario } from '../../../shared/contracts/api';
import { type Db, inTransaction, isUniqueViolation, recordInAudit } from '../../db';
import type { ProductAccess } from '../../platform/routing';
import { addScenario } from './add-scenario';
import { findDraft } from './drafts.repository';
import { findHead } from './revisions.repository';
import { draftView, revisionView } from './scenario-views';
import { noScenario, noVariant, scenarioNameTaken, scenarioUnderReview } from './scenarios.errors';
import {
  archiveScenario,
  findScenario,
  hasStandingReview,
  lockVariant,
  lockVariantOf,
  renameScenario,
} from './scenarios.repository';
import { readArrivingStudy } from '../../platform/arriving-study';
import type { SummariesOf } from './summaries';

export interface ScenarioDependencies {
  readonly db: Db;
  readonly summariesOf: SummariesOf;
}

/** Who acts, and by which request. */
export interface Actor {
  readonly personId: string;
  readonly requestId: string;
}

/** @throws Problem scenario-name-taken in place of the database's refusal */
async function namingScenario<T>(name: string, work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    if (isUniqueViolation(error, 'scenarios_name_unique')) throw scenarioNameTaken(name);
    throw error;
  }
}

/** A scenario with its newest revision and the reader's own draft. */
export async function readScenario(
  { db, summariesOf }: ScenarioDependencies,
  reader: { personId: string; role: ProductAccess['role'] },
  scenarioId: string,
): Promise<Scenario> {
  const scenario = await findScenario(db, scenarioId);
  if (scenario === undefined) throw noScenario();
  const [head, draft] = await Promise.all([
    findHead(db, scenarioId),
    findDraft(db, { scenarioId, personId: reader.personId }),
  ]);
  return {
    ...scenario,
    role: reader.role ?? null,
    head: revisionView(head, await summariesOf([head.id])),
    draft: draft === undefined ? null : draftView(draft),
  };
}

/** @returns the key of the new scenario */
export function createScenario(
  { db }: ScenarioDependencies,
  actor: Actor,
  variantId: string,
  { name, study }: NewScenario,
): Promise<string> {
  const stored = readArrivingStudy(study);
  return namingScenario(name, () =>
    inTransaction(db, async (tx) => {
      if ((await lockVariant(tx, variantId)) === undefined) throw noVariant();
      return addScenario(tx, { variantId, name, stored, authorId: actor.personId });
    }),
  );
}

export async function changeScenarioName(
  { db }: ScenarioDependencies,
  scenarioId: string,
  { name }: Rename,
): Promise<void> {
  await namingScenario(name, () =>
    inTransaction(db, async (tx) => {
      await lockVariantOf(tx, scenarioId);
      if ((await findScenario(tx, scenarioId)) === undefined) throw noScenario();
      await renameScenario(tx, scenarioId, name);
    }),
  );
}

/**
 * Takes a scenario out of its variant. Its revisions, runs and drafts stay in the database.
 *
 * @throws Problem scenario-under-review
 */
export async function deleteScenario(
  { db }: ScenarioDependencies,
  actor: Actor,
  scenarioId: string,
): Promise<void> {
  await inTransaction(db, async (tx) => {
    await lockVariantOf(tx, scenarioId);
    const scenario = await findScenario(tx, scenarioId);
    if (scenario === undefined) throw noScenario();
    if (await hasStandingReview(tx, scenarioId)) throw scenarioUnderReview(scenario.name);
    await archiveScenario(tx, scenarioId);
    const { name, variantId, productId } = scenario;
    await recordInAudit(tx, {
      ...actor,
      action: 'scenario.deleted',
      objectKind: 'scenario',
      objectId: scenarioId,
      data: { name, variantId, productId },
    });
  });
}
