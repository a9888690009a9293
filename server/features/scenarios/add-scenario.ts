import type { Tx } from '../../db';
import { insertRevision } from './revisions.repository';
import { insertScenario } from './scenarios.repository';
import type { ArrivingStudy } from '../../platform/arriving-study';
import { toleranceSet, variantDescription } from './study-parts';
import { appendVariantRevision, findRevisionLike } from './variant-revisions.repository';

export interface NewScenario {
  readonly variantId: string;
  readonly name: string;
  readonly stored: ArrivingStudy;
  readonly authorId: string;
}

export interface NextRevision {
  readonly scenarioId: string;
  readonly variantId: string;
  readonly number: number;
  readonly stored: ArrivingStudy;
  readonly note: string;
  readonly authorId: string;
}

/**
 * Adds a scenario with its first revision; under the lock of the variant.
 *
 * @throws the database's error about `scenarios_name_unique`
 */
export async function addScenario(
  tx: Tx,
  { variantId, name, stored, authorId }: NewScenario,
): Promise<string> {
  const { id } = await insertScenario(tx, { variantId, name });
  await appendRevision(tx, { scenarioId: id, variantId, number: 1, stored, note: '', authorId });
  return id;
}

/**
 * Appends a revision and pins it to the variant revision that describes the same machine, control, hardware and
 * nominals: the newest that reads exactly so, else a new one. A scenario that only moves its bands therefore stays on
 * the variant revision it was on, whatever other scenarios have made of the variant, and restoring an old study makes
 * no new one. Under the lock of the variant.
 */
export async function appendRevision(tx: Tx, revision: NextRevision): Promise<void> {
  const { scenarioId, variantId, number, stored, note, authorId } = revision;
  const description = variantDescription(stored.study);
  const pinned =
    (await findRevisionLike(tx, variantId, description)) ??
    (await appendVariantRevision(tx, { variantId, description, note, authorId }));
  await insertRevision(tx, {
    ...{ scenarioId, number, note, authorId },
    variantRevisionId: pinned.id,
    toleranceSet: toleranceSet(stored.study),
    study: stored.text,
    studyHash: stored.hash,
    answerHash: stored.answerHash,
  });
}
