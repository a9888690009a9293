import { addDown, addUp } from './directed-operations';
import type { Interval } from './interval';

/** Encloses x + y for every x and y of the operands. */
export function add(x: Interval, y: Interval): Interval {
  return { low: addDown(x.low, y.low), high: addUp(x.high, y.high) };
}
