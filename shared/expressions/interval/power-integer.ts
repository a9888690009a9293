import { abs } from './abs';
import type { DomainIssue } from './domain-issue';
import type { Interval } from './interval';
import { containsZero } from './interval';
import { powerAbove, powerBelow } from './power-bounds';

/**
 * Encloses x^n for an integer n, tight across 0 for even n; x^0 is 1. An issue if n is negative
 * and the operand contains 0.
 *
 * @throws RangeError if n is not an integer of at most 53 bits.
 */
export function powerInteger(x: Interval, n: number): Interval | DomainIssue {
  if (!Number.isSafeInteger(n)) throw new RangeError(`The exponent ${n} is not an integer.`);
  if (n === 0) return { low: 1, high: 1 };
  if (n < 0 && containsZero(x)) {
    return { cause: 'division-by-zero', everywhere: x.low === 0 && x.high === 0 };
  }
  if (n % 2 === 0) {
    const size = abs(x);
    return n > 0
      ? { low: powerBelow(size.low, n), high: powerAbove(size.high, n) }
      : { low: powerBelow(size.high, n), high: powerAbove(size.low, n) };
  }
  return n > 0
    ? { low: oddPowerBelow(x.low, n), high: 0 - oddPowerBelow(-x.high, n) }
    : { low: oddPowerBelow(x.high, n), high: 0 - oddPowerBelow(-x.low, n) };
}

/** A lower bound of x^n for odd n and either sign of x. */
function oddPowerBelow(x: number, n: number): number {
  return x < 0 ? -powerAbove(-x, n) : powerBelow(x, n);
}
