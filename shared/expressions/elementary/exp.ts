import { exponentialKernel } from './exponential-kernel';

const OVERFLOW = 710;
const UNDERFLOW = -746;

/**
 * e^x; error at most `ELEMENTARY_ERROR_ULPS.exp`. exp(±0) = 1, exp(−∞) = 0, exp(∞) = ∞; Infinity
 * above the range of doubles, 0 below it, NaN for NaN.
 */
export function exp(x: number): number {
  if (x > OVERFLOW) return Infinity;
  if (x < UNDERFLOW) return 0;
  if (x !== x) return NaN;
  return exponentialKernel(x, 0);
}
