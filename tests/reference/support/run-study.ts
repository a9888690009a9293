import { readStudy, resultSchema, type Result } from '../../../shared/contracts';
import { analyse, composeStudy, type ComposedStudy } from '../../../shared/engine';

/** A study as its author would write it; format and version are added. */
export interface StudyDraft {
  readonly machine: object;
  readonly parameters: readonly object[];
  readonly requirements?: readonly object[];
  readonly [key: string]: unknown;
}

/** The text of the study file; stability is asked for where the draft asks for nothing. */
export function studyText(draft: StudyDraft): string {
  return JSON.stringify({
    format: 'tareline-study',
    version: 1,
    requirements: [{ measure: 'stability' }],
    ...draft,
  });
}

export function composed(draft: StudyDraft): ComposedStudy {
  return composeStudy(readStudy(studyText(draft)).study);
}

/** The whole way from the text of a study file to its result, which must keep to the result's contract. */
export function runStudy(draft: StudyDraft): Result {
  const result = analyse(composed(draft), { studyHash: 'sha256:', clock: () => 0, map: false });
  return resultSchema.parse(result);
}
