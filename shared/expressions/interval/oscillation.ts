import { halfTurnsWithin } from './half-turns';
import type { Interval } from './interval';
import { widenDown, widenUp } from './widen';

const WHOLE_RANGE: Interval = { low: -1, high: 1 };

/**
 * Encloses a function f between −1 and 1 that rises or falls from each (k + offset)·π to the next,
 * with maxima at even k and minima at odd k; `ulps` bounds the error of f, which is exact at 0.
 */
export function encloseOscillation(
  x: Interval,
  f: (x: number) => number,
  offset: number,
  ulps: number,
): Interval {
  const start = f(x.low);
  const end = f(x.high);
  // NaN at unbounded ends.
  if (!(start >= -1 && end >= -1)) return WHOLE_RANGE;
  let low = Math.min(lower(x.low, start, ulps), lower(x.high, end, ulps));
  let high = Math.max(upper(x.low, start, ulps), upper(x.high, end, ulps));
  if (x.low < x.high) {
    const extrema = halfTurnsWithin(x, offset);
    if (extrema === undefined || extrema.last > extrema.first) return WHOLE_RANGE;
    if (extrema.last === extrema.first) {
      if (extrema.first % 2 === 0) high = 1;
      else low = -1;
    }
  }
  return { low, high };
}

function lower(x: number, value: number, ulps: number): number {
  return x === 0 ? value : Math.max(-1, widenDown(value, ulps));
}

function upper(x: number, value: number, ulps: number): number {
  return x === 0 ? value : Math.min(1, widenUp(value, ulps));
}
