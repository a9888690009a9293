import { multiplyDown, multiplyUp } from './directed-operations';
import type { Interval } from './interval';

/** Encloses x·y for every x and y of the operands. */
export function multiply(x: Interval, y: Interval): Interval {
  return {
    low: Math.min(
      multiplyDown(x.low, y.low),
      multiplyDown(x.low, y.high),
      multiplyDown(x.high, y.low),
      multiplyDown(x.high, y.high),
    ),
    high: Math.max(
      multiplyUp(x.low, y.low),
      multiplyUp(x.low, y.high),
      multiplyUp(x.high, y.low),
      multiplyUp(x.high, y.high),
    ),
  };
}
