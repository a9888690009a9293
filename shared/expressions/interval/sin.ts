import { ELEMENTARY_ERROR_ULPS, sin as sine } from '../elementary';
import type { Interval } from './interval';
import { encloseOscillation } from './oscillation';

/** Encloses sin x, x in radians. */
export function sin(x: Interval): Interval {
  return encloseOscillation(x, sine, 0.5, ELEMENTARY_ERROR_ULPS.sin);
}
