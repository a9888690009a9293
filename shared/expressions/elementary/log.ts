import { logarithmKernel } from './logarithm-kernel';

const pair = new Float64Array(2);

/**
 * Natural logarithm of x; error at most `ELEMENTARY_ERROR_ULPS.log`. log(±0) = −∞, log(∞) = ∞,
 * log(1) = +0; NaN for negative x and NaN.
 */
export function log(x: number): number {
  if (!(x > 0)) return x === 0 ? -Infinity : NaN;
  if (x === Infinity) return Infinity;
  logarithmKernel(x, pair);
  return pair[0];
}
