import type { Interval } from '../interval';

export interface IntervalAndPoint {
  readonly x: Interval;
  readonly point: number;
}

/** The value at `part` (0…1) of the way from low to high. */
export function partWay(low: number, high: number, part: number): number {
  return Math.min(high, Math.max(low, low * (1 - part) + high * part));
}

/** The interval between two values in either order, and the point at `part` of its way. */
export function intervalAndPoint([a, b, part]: readonly [number, number, number]): IntervalAndPoint {
  const low = Math.min(a, b);
  const high = Math.max(a, b);
  return { x: { low, high }, point: partWay(low, high, part) };
}
