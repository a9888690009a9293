import { ELEMENTARY_ERROR_ULPS, tan as tangent } from '../elementary';
import type { DomainIssue } from './domain-issue';
import { halfTurnsWithin } from './half-turns';
import type { Interval } from './interval';
import { widenDown, widenUp } from './widen';

/**
 * Encloses tan x, x in radians; an issue if the operand contains an odd multiple of π/2 or comes so
 * close that rounding cannot exclude it. No double is such a multiple, so it never holds everywhere.
 */
export function tan(x: Interval): Interval | DomainIssue {
  if (x.low < x.high) {
    const poles = halfTurnsWithin(x, 0.5);
    if (poles === undefined || poles.first <= poles.last) {
      return { cause: 'pole-of-tangent', everywhere: false };
    }
  }
  return {
    low: x.low === 0 ? 0 : widenDown(tangent(x.low), ELEMENTARY_ERROR_ULPS.tan),
    high: x.high === 0 ? 0 : widenUp(tangent(x.high), ELEMENTARY_ERROR_ULPS.tan),
  };
}
