import type { Interval } from './interval';
import { negate } from './negate';

/** |x|, exactly. */
export function abs(x: Interval): Interval {
  if (x.low >= 0) return x;
  if (x.high <= 0) return negate(x);
  return { low: 0, high: Math.max(-x.low, x.high) };
}
