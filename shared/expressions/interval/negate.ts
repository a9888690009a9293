import type { Interval } from './interval';

/** −x, exactly. */
export function negate(x: Interval): Interval {
  return { low: 0 - x.high, high: 0 - x.low };
}
