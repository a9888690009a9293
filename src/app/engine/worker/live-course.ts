import { readStudyValue } from '../../../../shared/contracts';
import { analyseInSteps, composeStudy } from '../../../../shared/engine';
import type { LiveAnswer } from '../live-answer';
import { faultsOf } from './faults-of';

/**
 * The live answers of one study, told as they become known. A step is a box or a sample.
 *
 * @param clock milliseconds, for `work` alone
 */
export function* liveCourse(
  value: unknown,
  clock: () => number,
  tell: (answer: LiveAnswer) => void,
): Generator<void, void> {
  try {
    const { study, warnings } = readStudyValue(value);
    const found = yield* analyseInSteps(composeStudy(study), {
      studyHash: '',
      clock,
      map: false,
      onAnswer: (result) => tell({ result, complete: false }),
    });
    const all = [...warnings, ...(found.warnings ?? [])];
    const result = { ...found, studyHash: undefined, ...(all.length > 0 && { warnings: all }) };
    tell({ result, complete: true });
  } catch (error) {
    const faults = faultsOf(error);
    if (faults === undefined) throw error;
    tell({ faults });
  }
}
