import type { RatingAnswer } from '../../contracts';

/** Up to which payload one test's requirements, or the study's own, are proved. */
export interface RatedLimit {
  /** Name of the test; null for the requirements themselves. */
  readonly name: string | null;
  readonly factor: number;
  readonly provedTo: number | null;
}

/**
 * The largest plate payload P such that every limit is proved up to factor · P, and P rounded down to the step.
 * All values are in the payload's unit; rounding never goes up.
 */
export function ratingAnswer(limits: readonly RatedLimit[], step: number | undefined): RatingAnswer {
  let allowed = Infinity;
  let limitedBy: string | null = null;
  for (const { name, factor, provedTo } of limits) {
    if (provedTo === null) return { allowed: null, plate: null, limitedBy: name };
    const payload = quotientDown(provedTo, factor);
    if (payload < allowed) {
      allowed = payload;
      limitedBy = name;
    }
  }
  return { allowed, plate: step === undefined ? allowed : wholeSteps(allowed, step), limitedBy };
}

/** The largest double q with factor · q not above the value as doubles multiply. */
function quotientDown(value: number, factor: number): number {
  let quotient = value / factor;
  while (quotient * factor > value) quotient -= Math.abs(quotient) * 2.220446049250313e-16;
  return quotient;
}

/** Rounded down to a multiple of the step. */
function wholeSteps(value: number, step: number): number {
  let count = Math.floor(value / step);
  // The quotient is rounded: 449.99999999999994 / 25 must not become 18.
  while (count * step > value) count--;
  return count * step;
}
