import { readStudy, type Result, StudyFaultError } from '../../../shared/contracts';
import { analyse, composeStudy } from '../../../shared/engine';

/** What the study command computes, without a process of its own. */
export function analyseText(text: string, map = false): Result {
  const { study } = readStudy(text);
  return analyse(composeStudy(study), { studyHash: 'sha256:', clock: () => 0, map });
}

/** The lines that the study command prints for an unusable study; none for one that runs. */
export function faultLines(text: string): string[] {
  try {
    analyseText(text);
    return [];
  } catch (error) {
    if (!(error instanceof StudyFaultError)) throw error;
    return error.faults.map(({ path, message }) => `${path}: ${message}`);
  }
}
