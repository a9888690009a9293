import { ELEMENTARY_ERROR_ULPS, cos as cosine } from '../elementary';
import type { Interval } from './interval';
import { encloseOscillation } from './oscillation';

/** Encloses cos x, x in radians. */
export function cos(x: Interval): Interval {
  return encloseOscillation(x, cosine, 0, ELEMENTARY_ERROR_ULPS.cos);
}
