import { readStudyValue, type Result } from '../../../shared/contracts';
import { analyse, composeStudy } from '../../../shared/engine';

/** The result of a study that is given as a value, by the whole path: as text, read, composed, analysed. */
export function analyseValue(value: object): Result {
  const { study } = readStudyValue(JSON.parse(JSON.stringify(value)));
  return analyse(composeStudy(study), { studyHash: '', clock: () => performance.now(), map: false });
}
