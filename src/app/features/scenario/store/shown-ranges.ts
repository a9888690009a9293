import type { PayloadRanges } from '../../../ui/figures';
import { reserveOf } from '../../../core/answers';
import { rangesOf } from '../answers/payload-ranges';
import { constantNumber } from './constant-number';
import type { ShownAnswer } from './scenario-store';

/** The payload picture of an answer, with the reserve of the rated range in it; undefined without a payload. */
export function shownRanges({
  result,
  study,
}: Pick<ShownAnswer, 'result' | 'study'>):
  (PayloadRanges & { readonly reserve: number | undefined }) | undefined {
  const payload = study.parameters.find(({ id }) => id === study.payload);
  const low = constantNumber(payload?.low);
  const high = constantNumber(payload?.high);
  const rated = low === undefined || high === undefined ? undefined : { low, high };
  const ranges = rangesOf(result, rated);
  return ranges && { ...ranges, reserve: reserveOf(ranges) };
}
