import { arctangentKernel } from './arctangent-kernel';
import { HALF_PI_HIGH } from './constants';

const pair = new Float64Array(2);

/** Below 2^−27 the arctangent is its argument to within a half of an ulp. */
const LINEAR_LIMIT = 7.450580596923828e-9;
/** From 2^64 on it is π/2 to within rounding. */
const SATURATION = 18446744073709551616;

/**
 * atan x in radians, in [−π/2, π/2]; error at most `ELEMENTARY_ERROR_ULPS.atan`.
 * atan(±0) = ±0, atan(±∞) = ±π/2, NaN for NaN.
 */
export function atan(x: number): number {
  const size = Math.abs(x);
  if (!(size >= LINEAR_LIMIT)) return x;
  let value = HALF_PI_HIGH;
  if (size < SATURATION) {
    arctangentKernel(size, 0, 1, 0, pair);
    value = pair[0] + pair[1];
  }
  return x < 0 ? -value : value;
}
