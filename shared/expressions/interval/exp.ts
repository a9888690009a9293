import { ELEMENTARY_ERROR_ULPS, exp as exponential } from '../elementary';
import type { Interval } from './interval';
import { widenDown, widenUp } from './widen';

/** Encloses e^x; exact at 0, never negative. */
export function exp(x: Interval): Interval {
  return {
    low: x.low === 0 ? 1 : Math.max(0, widenDown(exponential(x.low), ELEMENTARY_ERROR_ULPS.exp)),
    high: x.high === 0 ? 1 : widenUp(exponential(x.high), ELEMENTARY_ERROR_ULPS.exp),
  };
}
