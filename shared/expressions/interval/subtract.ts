import { addDown, addUp } from './directed-operations';
import type { Interval } from './interval';

/** Encloses x − y for every x and y of the operands. */
export function subtract(x: Interval, y: Interval): Interval {
  return { low: addDown(x.low, -y.high), high: addUp(x.high, -y.low) };
}
