import type { RunSummary } from '../../../../shared/contracts/api';
import type { PayloadRanges } from '../../ui/figures';
import { failsAbove, failsBelow, provedFrom, provedTo, withUnit } from './figure';

/** What the pictures show of a run; undefined while there is no answer. */
export function rangesOfRun(run: RunSummary | null): PayloadRanges | undefined {
  if (run === null || run.verdict === null) return undefined;
  const { ratedLow, ratedHigh, provedLow, provedHigh } = run;
  const rated = ratedLow === null || ratedHigh === null ? undefined : { low: ratedLow, high: ratedHigh };
  const proved = provedLow === null || provedHigh === null ? undefined : { low: provedLow, high: provedHigh };
  return {
    rated,
    proved,
    failsBelow: run.failsBelow ?? undefined,
    failsAbove: run.failsAt ?? undefined,
    sampled: run.proof === 'sampled',
  };
}

/**
 * The smaller of the distances from both ends of the rated range to the ends of the proved one; negative where the
 * rated range reaches beyond. A proved range from 0 on has nothing to lose at its light end.
 */
export function reserveOf({ rated, proved }: PayloadRanges): number | undefined {
  if (rated === undefined || proved === undefined) return undefined;
  const heavy = proved.high - rated.high;
  const light = rated.low - proved.low;
  return proved.low > 0 ? Math.min(heavy, light) : heavy;
}

/** "0–571", rounded into the proved range. */
export function provedText({ proved }: PayloadRanges): string {
  return proved === undefined ? 'none' : `${provedFrom(proved.low)}\u2013${provedTo(proved.high)}`;
}

/** A payload picture in words. */
export function rangesInWords(ranges: PayloadRanges, unit: string | null): string {
  const { rated, proved, failsAbove: above, failsBelow: below, sampled } = ranges;
  const word = sampled === true ? 'Sampled' : 'Proved';
  const parts = [
    proved === undefined
      ? 'Nothing proved'
      : `${word} ${provedFrom(proved.low)} to ${withUnit(provedTo(proved.high), unit)}`,
    ...(rated === undefined ? [] : [`rated ${rated.low} to ${withUnit(String(rated.high), unit)}`]),
    ...(below === undefined ? [] : [`fails at ${withUnit(failsBelow(below), unit)}`]),
    ...(above === undefined ? [] : [`fails at ${withUnit(failsAbove(above), unit)}`]),
  ];
  return `${parts.join('; ')}.`;
}
