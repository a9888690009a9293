import { RESULT_FORMAT, RESULT_VERSION, type Result } from '../../../../../shared/contracts';
import type { LiveAnswer } from '../../../engine';

type Part = Extract<LiveAnswer, { readonly result: unknown }>['result'];

/**
 * A result out of what is known so far. The light end and the band stretch follow later: until then those of the
 * answer before stand in. Undefined where there is nothing to stand in for them.
 */
export function joinedResult(part: Part, before: Result | undefined, complete: boolean): Result | undefined {
  const { nominal, bands, largestPayload, rating, delay, warnings } = part;
  if (bands === undefined || (!complete && before === undefined)) return undefined;
  return {
    format: RESULT_FORMAT,
    version: RESULT_VERSION,
    engine: part.engine ?? '',
    studyHash: part.studyHash ?? '',
    nominal,
    bands,
    largestPayload: largestPayload ?? null,
    smallestPayload: (complete ? part.smallestPayload : before?.smallestPayload) ?? null,
    bandStretch: (complete ? part.bandStretch : before?.bandStretch) ?? null,
    rating: complete ? rating : (rating ?? before?.rating),
    delay: complete ? delay : (delay ?? before?.delay),
    warnings,
    work: part.work ?? { boxes: 0, milliseconds: 0 },
  };
}
