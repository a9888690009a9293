import { reduceArgument } from './argument-reduction';
import { cosineKernel, sineKernel } from './trigonometric-kernels';

const remainder = new Float64Array(2);
const pair = new Float64Array(2);

/** Below 2^−27 the sine is its argument to within a third of an ulp. */
const LINEAR_LIMIT = 7.450580596923828e-9;

/**
 * sin x, x in radians; error at most `ELEMENTARY_ERROR_ULPS.sin`. sin(±0) = ±0; NaN for NaN and
 * infinities. Any finite argument is reduced exactly (Cody & Waite 1980; Payne & Hanek 1983).
 */
export function sin(x: number): number {
  const size = Math.abs(x);
  if (size < LINEAR_LIMIT) return x;
  if (!(size < Infinity)) return NaN;
  const quadrant = reduceArgument(size, remainder);
  if ((quadrant & 1) === 0) sineKernel(remainder[0], remainder[1], pair);
  else cosineKernel(remainder[0], remainder[1], pair);
  return x < 0 !== quadrant >= 2 ? -pair[0] : pair[0];
}
