/** Steps that people count in, times powers of ten; falling. */
const ROUND_STEPS = [5, 2, 1];

/** The largest of 1, 2, 5 times a power of ten that is not above `most`. A `most` that is not above 0 gives 0. */
export function roundStep(most: number): number {
  if (!(most > 0) || !Number.isFinite(most)) return 0;
  const power = 10 ** Math.floor(Math.log10(most));
  const digit = ROUND_STEPS.find((candidate) => candidate * power <= most * (1 + 1e-9)) ?? 1;
  return Number((digit * power).toPrecision(12));
}

/** The multiple of `step` nearest to `value`, without the digits that the division adds; a step of 0 changes nothing. */
export function toStep(value: number, step: number): number {
  return step > 0 ? Number((Math.round(value / step) * step).toPrecision(12)) : value;
}

/** `value` held between the two ends; the lower end counts where they have passed each other. */
export function clamped(value: number, minimum: number, maximum: number): number {
  return Math.max(minimum, Math.min(maximum, value));
}
