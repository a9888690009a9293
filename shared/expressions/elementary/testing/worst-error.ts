import type { BinaryValue } from './fixed-point-oracle';
import { errorInUlps } from './fixed-point-oracle';

export interface WorstError {
  readonly ulps: number;
  readonly argument: number;
}

/** The largest error of `computed` against `exact` over `count` arguments drawn from `draw`. */
export function worstError(
  computed: (x: number) => number,
  exact: (x: number) => BinaryValue,
  draw: () => number,
  count: number,
): WorstError {
  let worst: WorstError = { ulps: -1, argument: NaN };
  for (let i = 0; i < count; i += 1) {
    const argument = draw();
    const ulps = errorInUlps(computed(argument), exact(argument));
    if (ulps > worst.ulps) worst = { ulps, argument };
  }
  return worst;
}
