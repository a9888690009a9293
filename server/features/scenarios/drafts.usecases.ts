import type { SaveDraft, ScenarioDraft } from '../../../shared/contracts/api';
import type { Db } from '../../db';
import { draftContent } from './draft-content';
import {
  deleteDraft,
  type DraftKey,
  findDraft,
  findRevisionId,
  insertDraft,
  updateDraft,
} from './drafts.repository';
import { draftView } from './scenario-views';
import { baseRevisionUnknown, draftChanged, noScenario } from './scenarios.errors';
import { findScenario } from './scenarios.repository';

async function currentDraft(db: Db, key: DraftKey): Promise<ScenarioDraft | null> {
  const row = await findDraft(db, key);
  return row === undefined ? null : draftView(row);
}

/**
 * Keeps a person's unsaved work, provided that the draft still has the version it was made from; 0: there is none.
 *
 * @throws Problem draft-changed with the draft as it is kept, and what was sent
 */
export async function saveDraft(
  { db }: { db: Db },
  key: DraftKey,
  { baseRevision, version, study }: SaveDraft,
): Promise<ScenarioDraft> {
  const content = draftContent(study);
  if ((await findScenario(db, key.scenarioId)) === undefined) throw noScenario();
  const baseRevisionId = await findRevisionId(db, key.scenarioId, baseRevision);
  if (baseRevisionId === undefined) throw baseRevisionUnknown(baseRevision);
  const draft = { baseRevisionId, content };
  const saved =
    version === 0 ? await insertDraft(db, key, draft) : await updateDraft(db, key, version, draft);
  if (saved === undefined) throw draftChanged(await currentDraft(db, key), { baseRevision, version, study });
  return { baseRevision, version: saved.version, study, at: saved.at.toISOString() };
}

/**
 * Throws a draft away; nothing happens where there is none.
 *
 * @param version that the draft must have, undefined for whatever there is
 * @throws Problem draft-changed where it has another
 */
export async function discardDraft(
  { db }: { db: Db },
  key: DraftKey,
  version: number | undefined,
): Promise<void> {
  if (await deleteDraft(db, key, version)) return;
  const current = await currentDraft(db, key);
  if (current !== null) throw draftChanged(current, { version });
}
