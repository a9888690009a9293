import { arctangentKernel } from './arctangent-kernel';
import { circleComplement } from './circle-complement';
import { HALF_PI_HIGH, PI_HIGH, PI_LOW } from './constants';
import { sumError } from './double-double';

const complement = new Float64Array(2);
const pair = new Float64Array(2);

/** Below 2^−60 the arccosine is π/2 to within rounding. */
const FLAT_LIMIT = 8.673617379884035e-19;

/**
 * acos x in radians, in [0, π], as the angle of (x, √(1 − x²)); error at most
 * `ELEMENTARY_ERROR_ULPS.acos`. acos(1) = 0; NaN outside [−1, 1] and for NaN.
 */
export function acos(x: number): number {
  const size = Math.abs(x);
  if (size < FLAT_LIMIT) return HALF_PI_HIGH;
  if (!(size <= 1)) return NaN;
  if (size === 1) return x < 0 ? PI_HIGH : 0;
  circleComplement(size, complement);
  arctangentKernel(complement[0], complement[1], size, 0, pair);
  if (x > 0) return pair[0] + pair[1];
  const supplement = PI_HIGH - pair[0];
  return supplement + (sumError(PI_HIGH, -pair[0], supplement) + (PI_LOW - pair[1]));
}
