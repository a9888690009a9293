import { ELEMENTARY_ERROR_ULPS, log as logarithm } from '../elementary';
import type { DomainIssue } from './domain-issue';
import type { Interval } from './interval';
import { widenDown, widenUp } from './widen';

/** Encloses ln x; exact at 1. An issue if the operand reaches 0 or below. */
export function log(x: Interval): Interval | DomainIssue {
  if (x.low <= 0) return { cause: 'logarithm-of-nonpositive', everywhere: x.high <= 0 };
  return {
    low: x.low === 1 ? 0 : widenDown(logarithm(x.low), ELEMENTARY_ERROR_ULPS.log),
    high: x.high === 1 ? 0 : widenUp(logarithm(x.high), ELEMENTARY_ERROR_ULPS.log),
  };
}
