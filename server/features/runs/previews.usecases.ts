import { canonicalJson, type Result, type Warning } from '../../../shared/contracts';
import type { Db } from '../../db';
import { defineRoutine, type Engine, type MapGrid } from '../../jobs';
import { type ArrivingStudy, asProblem, readArrivingStudy, sha256 } from '../../platform/arriving-study';
import type { PreviewClaim, PreviewSlots } from './preview-slots';
import { findKept, forgetUnused, keepAnswer } from './previews.repository';

const KEPT_DAYS = 30;

export interface PreviewDependencies {
  readonly db: Db;
  readonly engine: Engine;
  readonly slots: PreviewSlots;
}

export interface PreviewRequest extends PreviewClaim {
  readonly study: unknown;
}

/** Computes as long as the slot is held, with faults of the study told as a problem. */
async function holding<T>(
  slots: PreviewSlots,
  claim: PreviewClaim,
  compute: (signal: AbortSignal) => Promise<T>,
): Promise<T> {
  try {
    return await slots.hold(claim, compute);
  } catch (error) {
    throw asProblem(error);
  }
}

/** A kept answer may come from a study of another name, and with fewer words that the engine does not know. */
function ofThisStudy(text: string, { hash, warnings }: ArrivingStudy): string {
  const result = JSON.parse(text) as Result;
  const known = result.warnings ?? [];
  const isNew = ({ path, message }: Warning) =>
    !known.some((other) => other.path === path && other.message === message);
  const all = [...warnings.filter(isNew), ...known];
  return JSON.stringify({ ...result, studyHash: hash, ...(all.length > 0 && { warnings: all }) });
}

/**
 * The answers of a draft. Nothing is stored but the answer, to be given again.
 *
 * @returns JSON text of the result, without a map
 * @throws Problem study-unusable, preview-superseded, preview-too-long, too-many-at-once
 */
export async function previewAnswer(
  { db, engine, slots }: PreviewDependencies,
  { study: value, ...claim }: PreviewRequest,
): Promise<string> {
  const arriving = readArrivingStudy(value);
  return holding(slots, claim, async (signal) => {
    const engineVersion = await engine.version();
    const key = { answerHash: arriving.answerHash, engineVersion, mapHash: '' };
    let text = await findKept(db, key);
    if (text === undefined) {
      ({ result: text } = await engine.analyse(arriving.text, false, { signal }));
      await keepAnswer(db, key, text);
    }
    return ofThisStudy(text, arriving);
  });
}

/**
 * The map of a draft, as fine as asked for or as time allows.
 *
 * @returns JSON text of the map
 * @throws as `previewAnswer` does
 */
export async function previewMap(
  { db, engine, slots }: PreviewDependencies,
  { study: value, ...claim }: PreviewRequest,
  grid: MapGrid,
): Promise<string> {
  const { study, text, answerHash } = readArrivingStudy(value);
  return holding(slots, claim, async (signal) => {
    // How fine it becomes depends on the moment, so it is no answer to be given again.
    if (grid.until !== undefined) return engine.map(text, grid, { signal });
    const { columns, rows } = grid;
    const mapHash = sha256(canonicalJson({ ...study.map, columns, rows }));
    const key = { answerHash, engineVersion: await engine.version(), mapHash };
    const kept = await findKept(db, key);
    if (kept !== undefined) return kept;
    const map = await engine.map(text, grid, { signal });
    await keepAnswer(db, key, map);
    return map;
  });
}

/** Drops answers that nobody has asked for in a while. */
export function forgetPreviewsJob({ db }: { db: Db }) {
  return defineRoutine({
    task: 'forget-previews',
    schedule: '23 3 * * *',
    run: async ({ log }) => {
      const forgotten = await forgetUnused(db, KEPT_DAYS);
      log.info({ forgotten }, 'unused previews are forgotten');
    },
  });
}
