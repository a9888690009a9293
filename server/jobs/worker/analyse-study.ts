import { createHash } from 'node:crypto';
import { performance } from 'node:perf_hooks';
import { canonicalText, readStudy, type Result } from '../../../shared/contracts';
import { analyseInSteps, composeStudy, ENGINE_VERSION, MapCourse } from '../../../shared/engine';
import type { AnalysisAnswer } from '../engine-task';
import { flattenMap } from '../flat-map';
import type { RunControl } from '../run-control';
import { driveCourse } from './course';
import { figuresOf } from './figures';

/** Nobody knows how many steps a search takes; after this many an analysis is shown as half done. */
const HALF_DONE = 4000;
/** The analysis' part of the whole where a map follows. */
const ANALYSIS_PART = 0.5;

/**
 * The whole analysis of a study's text; its result is what the study command prints.
 *
 * @throws StudyFaultError, Stopped
 */
export function analyseStudy(text: string, withMap: boolean, control: RunControl): AnalysisAnswer {
  const { study, warnings } = readStudy(text);
  const composed = composeStudy(study);
  const { map } = composed;
  const part = withMap && map !== undefined ? ANALYSIS_PART : 1;
  const digest = createHash('sha256').update(canonicalText(study)).digest('hex');
  const course = analyseInSteps(composed, {
    studyHash: `sha256:${digest}`,
    clock: () => performance.now(),
    map: false,
  });
  const found = driveCourse(course, control, (steps) => (part * steps) / (steps + HALF_DONE));
  const all = [...warnings, ...(found.warnings ?? [])];
  const result: Result = all.length === 0 ? found : { ...found, warnings: all };
  const answer = {
    engineVersion: ENGINE_VERSION,
    result: JSON.stringify(result),
    figures: figuresOf(study, composed, result),
  };
  if (!withMap || map === undefined) return { ...answer, map: undefined };
  const nodes = map.columns * map.rows;
  const sweep = new MapCourse(composed).sweep(map);
  const swept = driveCourse(sweep, control, (steps) => part + ((1 - part) * steps) / nodes);
  return { ...answer, map: flattenMap(swept) };
}
