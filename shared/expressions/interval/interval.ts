/**
 * The closed interval of all real numbers between `low` and `high`, low <= high. An infinite end
 * means unbounded on that side; `low` is never +∞, `high` never −∞.
 */
export interface Interval {
  readonly low: number;
  readonly high: number;
}

/** @throws RangeError if the ends are NaN, out of order, or both the same infinity. */
export function interval(low: number, high: number): Interval {
  if (!(low <= high) || low === Infinity || high === -Infinity) {
    throw new RangeError(`No closed interval from ${low} to ${high}.`);
  }
  return { low, high };
}

/** The interval that holds x alone. @throws RangeError if x is not finite. */
export function pointInterval(x: number): Interval {
  return interval(x, x);
}

export function containsZero(x: Interval): boolean {
  return x.low <= 0 && x.high >= 0;
}
