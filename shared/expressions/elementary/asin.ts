import { arctangentKernel } from './arctangent-kernel';
import { circleComplement } from './circle-complement';
import { HALF_PI_HIGH } from './constants';

const complement = new Float64Array(2);
const pair = new Float64Array(2);

/** Below 2^−27 the arcsine is its argument to within a third of an ulp. */
const LINEAR_LIMIT = 7.450580596923828e-9;

/**
 * asin x in radians, in [−π/2, π/2], as atan(x/√(1 − x²)); error at most
 * `ELEMENTARY_ERROR_ULPS.asin`. asin(±0) = ±0; NaN outside [−1, 1] and for NaN.
 */
export function asin(x: number): number {
  const size = Math.abs(x);
  if (size < LINEAR_LIMIT) return x;
  if (!(size <= 1)) return NaN;
  let value = HALF_PI_HIGH;
  if (size < 1) {
    circleComplement(size, complement);
    arctangentKernel(size, 0, complement[0], complement[1], pair);
    value = pair[0] + pair[1];
  }
  return x < 0 ? -value : value;
}
