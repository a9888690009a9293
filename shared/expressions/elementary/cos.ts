import { reduceArgument } from './argument-reduction';
import { cosineKernel, sineKernel } from './trigonometric-kernels';

const remainder = new Float64Array(2);
const pair = new Float64Array(2);

/**
 * cos x, x in radians; error at most `ELEMENTARY_ERROR_ULPS.cos`. NaN for NaN and infinities. Any
 * finite argument is reduced exactly (Cody & Waite 1980; Payne & Hanek 1983).
 */
export function cos(x: number): number {
  const size = Math.abs(x);
  if (!(size < Infinity)) return NaN;
  const quadrant = reduceArgument(size, remainder);
  if ((quadrant & 1) === 0) cosineKernel(remainder[0], remainder[1], pair);
  else sineKernel(remainder[0], remainder[1], pair);
  return quadrant === 1 || quadrant === 2 ? -pair[0] : pair[0];
}
