import type { Result } from '../../../../../shared/contracts';
import type { PayloadRanges } from '../../../ui/figures';

/** What the payload pictures show of a result; undefined where the study names no payload. */
export function rangesOf(result: Result, rated: PayloadRanges['rated']): PayloadRanges | undefined {
  const { largestPayload: largest, smallestPayload: smallest } = result;
  if (largest === null) return undefined;
  const low = smallest?.provedTo ?? null;
  return {
    rated,
    proved: largest.provedTo === null || low === null ? undefined : { low, high: largest.provedTo },
    failsAbove: largest.failsAt ?? undefined,
    failsBelow: largest.provedTo === null ? undefined : (smallest?.failsAt ?? undefined),
    sampled: largest.proof === 'sampled',
  };
}
