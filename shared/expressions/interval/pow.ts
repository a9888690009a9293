import type { DomainIssue } from './domain-issue';
import type { Interval } from './interval';
import { powerAbove, powerBelow } from './power-bounds';
import { powerInteger } from './power-integer';

/**
 * Encloses x^y for every x and y of the operands; 0^0 is 1. An exponent that is one integer goes to
 * `powerInteger`. Otherwise an issue if the base has a negative part, or contains 0 while the
 * exponent has a negative part. For x >= 0 the power is monotone in x and in y, so its extremes are
 * at the corners.
 */
export function pow(x: Interval, y: Interval): Interval | DomainIssue {
  if (y.low === y.high && Number.isSafeInteger(y.low)) return powerInteger(x, y.low);
  if (x.low < 0) {
    return { cause: 'power-of-negative', everywhere: x.high < 0 && Math.ceil(y.low) > y.high };
  }
  if (x.low === 0 && y.low < 0) {
    return { cause: 'division-by-zero', everywhere: x.high === 0 && y.high < 0 };
  }
  const low = Math.min(
    powerBelow(x.low, y.low),
    powerBelow(x.low, y.high),
    powerBelow(x.high, y.low),
    powerBelow(x.high, y.high),
  );
  const high = Math.max(
    powerAbove(x.low, y.low),
    powerAbove(x.low, y.high),
    powerAbove(x.high, y.low),
    powerAbove(x.high, y.high),
  );
  // NaN from 1^∞ at an unbounded end.
  return low <= high ? { low, high } : { low: 0, high: Infinity };
}
