export interface Scale {
  readonly end: number;
  readonly step: number;
  /** Labelled values from 0 to the end. */
  readonly ticks: readonly number[];
}

/** Steps that people count in, times powers of ten. */
const ROUND_STEPS = [1, 2, 2.5, 5, 10];

/**
 * A scale from 0 that covers `most` in at most `count` round steps. A `most` that is not above 0 gives the scale
 * of 0 to 1.
 */
export function scaleFromZero(most: number, count: number): Scale {
  const covered = most > 0 && Number.isFinite(most) ? most : 1;
  const wanted = covered / count;
  const power = 10 ** Math.floor(Math.log10(wanted));
  const step = (ROUND_STEPS.find((candidate) => candidate * power >= wanted * (1 - 1e-9)) ?? 10) * power;
  const steps = Math.max(1, Math.ceil(covered / step - 1e-9));
  const ticks = Array.from({ length: steps + 1 }, (_, index) => Number((index * step).toPrecision(12)));
  return { end: ticks[steps], step, ticks };
}
