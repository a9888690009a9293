import { addDown, addUp, divideDown, divideUp } from './directed-operations';
import type { Interval } from './interval';

/** Consecutive doubles around π. */
const PI_BELOW = 3.141592653589793;
const PI_ABOVE = 3.1415926535897936;

/** From here on neighbouring integers are not told apart reliably. */
const COUNTING_LIMIT = 1e15;

/** The integers first…last; none if last < first. */
export interface IntegerRange {
  readonly first: number;
  readonly last: number;
}

/**
 * All integers k with (k + offset)·π in x, and possibly a neighbour that rounding could not
 * exclude; undefined if the interval is too far out to count in doubles.
 */
export function halfTurnsWithin(x: Interval, offset: number): IntegerRange | undefined {
  const low = divideDown(x.low, x.low > 0 ? PI_ABOVE : PI_BELOW);
  const high = divideUp(x.high, x.high > 0 ? PI_BELOW : PI_ABOVE);
  if (!(low > -COUNTING_LIMIT && high < COUNTING_LIMIT)) return undefined;
  return { first: Math.ceil(addDown(low, -offset)), last: Math.floor(addUp(high, -offset)) };
}
