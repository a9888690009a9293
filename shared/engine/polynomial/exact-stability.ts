import { boundaryForm } from './boundary-form';
import { degreeOf, evaluateExactly } from './exact-point';
import type { LoopPolynomial } from './loop-polynomial';
import { countOutside } from './pole-count';

/** What exact coefficients tell of the closed loop at one point. */
export interface ExactStability {
  /** Every pole lies strictly left of the axis, by count, and none has left through infinity. */
  readonly stable: boolean;
  /** How many poles lie exactly at 0. */
  readonly atOrigin: number;
}

/** Counts the poles of the closed loop at a point with exact coefficients. */
export function exactStability(polynomial: LoopPolynomial, point: ArrayLike<number>): ExactStability {
  const { broken, returned } = evaluateExactly(polynomial, point);
  const closed = broken.map((value, k) => value + returned[k]);
  const form = boundaryForm('stability', 0, degreeOf(polynomial));
  const complete = closed[closed.length - 1] !== 0n;
  return {
    stable: complete && countOutside(form.sheetsAt(broken, returned)[0]) === 0,
    atOrigin: Math.max(
      0,
      closed.findIndex((value) => value !== 0n),
    ),
  };
}
