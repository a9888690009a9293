import { divideDown, divideUp } from './directed-operations';
import type { DomainIssue } from './domain-issue';
import type { Interval } from './interval';
import { containsZero } from './interval';

/** Encloses x/y for every x and y of the operands; an issue if the divisor contains 0. */
export function divide(x: Interval, y: Interval): Interval | DomainIssue {
  if (containsZero(y)) {
    return { cause: 'division-by-zero', everywhere: y.low === 0 && y.high === 0 };
  }
  return {
    low: Math.min(
      divideDown(x.low, y.low),
      divideDown(x.low, y.high),
      divideDown(x.high, y.low),
      divideDown(x.high, y.high),
    ),
    high: Math.max(
      divideUp(x.low, y.low),
      divideUp(x.low, y.high),
      divideUp(x.high, y.low),
      divideUp(x.high, y.high),
    ),
  };
}
