import { reduceArgument } from './argument-reduction';
import { productError } from './double-double';
import { cosineKernel, sineKernel } from './trigonometric-kernels';

const remainder = new Float64Array(2);
const sine = new Float64Array(2);
const cosine = new Float64Array(2);

/** Below 2^−27 the tangent is its argument to within a half of an ulp. */
const LINEAR_LIMIT = 7.450580596923828e-9;

/**
 * tan x, x in radians; error at most `ELEMENTARY_ERROR_ULPS.tan`. tan(±0) = ±0; NaN for NaN and
 * infinities; always finite otherwise, since no double is a multiple of π/2. The quotient of sine
 * and cosine, both carried as pairs so that only the last rounding counts in full.
 */
export function tan(x: number): number {
  const size = Math.abs(x);
  if (size < LINEAR_LIMIT) return x;
  if (!(size < Infinity)) return NaN;
  const quadrant = reduceArgument(size, remainder);
  sineKernel(remainder[0], remainder[1], sine);
  cosineKernel(remainder[0], remainder[1], cosine);
  const value =
    (quadrant & 1) === 0
      ? quotient(sine[0], sine[1], cosine[0], cosine[1])
      : -quotient(cosine[0], cosine[1], sine[0], sine[1]);
  return x < 0 ? -value : value;
}

function quotient(top: number, topLow: number, bottom: number, bottomLow: number): number {
  const leading = top / bottom;
  const product = leading * bottom;
  const rest = top - product - productError(leading, bottom, product);
  return leading + (rest + topLow - leading * bottomLow) / bottom;
}
