import type { ListedRevision, SaveScenario, ScenarioRevision } from '../../../shared/contracts/api';
import { inTransaction } from '../../db';
import { appendRevision } from './add-scenario';
import { deleteDraftEqualTo } from './drafts.repository';
import { findHead, findRevision, listRevisions } from './revisions.repository';
import { revisionView, listedRevision } from './scenario-views';
import { noRevision, noScenario, scenarioChanged } from './scenarios.errors';
import { findScenario, lockVariantOf } from './scenarios.repository';
import type { Actor, ScenarioDependencies } from './scenarios.usecases';
import { readArrivingStudy } from '../../platform/arriving-study';

/** The revisions of a scenario, newest first. */
export async function readRevisions(
  { db, summariesOf }: ScenarioDependencies,
  scenarioId: string,
): Promise<ListedRevision[]> {
  if ((await findScenario(db, scenarioId)) === undefined) throw noScenario();
  const rows = await listRevisions(db, scenarioId);
  const summaries = await summariesOf(rows.map(({ id }) => id));
  return rows.map((row) => listedRevision(row, summaries));
}

export async function readRevision(
  { db, summariesOf }: ScenarioDependencies,
  scenarioId: string,
  number: number,
): Promise<ScenarioRevision> {
  if ((await findScenario(db, scenarioId)) === undefined) throw noScenario();
  const row = await findRevision(db, scenarioId, number);
  if (row === undefined) throw noRevision();
  return revisionView(row, await summariesOf([row.id]));
}

/**
 * Saves a study as the next revision, provided that the newest is still the one it was made from.
 *
 * @throws Problem scenario-changed with the newer revision and what was sent
 */
export async function saveRevision(
  { db, summariesOf }: ScenarioDependencies,
  actor: Actor,
  scenarioId: string,
  { baseRevision, study, note }: SaveScenario,
): Promise<ScenarioRevision> {
  const stored = readArrivingStudy(study);
  const authorId = actor.personId;
  const { overtaken, head } = await inTransaction(db, async (tx) => {
    const variant = await lockVariantOf(tx, scenarioId);
    if (variant === undefined || (await findScenario(tx, scenarioId)) === undefined) throw noScenario();
    const newest = await findHead(tx, scenarioId);
    if (newest.number !== baseRevision) return { overtaken: true, head: newest };
    await appendRevision(tx, {
      ...{ scenarioId, stored, note, authorId },
      variantId: variant.id,
      number: baseRevision + 1,
    });
    await deleteDraftEqualTo(tx, { scenarioId, personId: authorId }, stored.text);
    return { overtaken: false, head: await findHead(tx, scenarioId) };
  });
  // Outside of the transaction: the summaries come by another connection, of which there are only so many.
  const view = revisionView(head, await summariesOf([head.id]));
  if (overtaken) throw scenarioChanged(view, { baseRevision, study: stored.study, note });
  return view;
}
