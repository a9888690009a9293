import { ROOT_OF_TWO_HIGH, ROOT_OF_TWO_LOW } from './exponential-table';
import { scaleByPowerOfTwo } from './float-bits';

const STEPS_PER_UNIT = 46.16624130844683;
/** ln 2/32 in two parts; the product of the first with an integer below 2^16 is exact. */
const STEP_HIGH = 0.021660849392446835;
const STEP_LOW = 5.145609244655338e-14;

/**
 * exp(x + xLow) for |x| < 760 and |xLow| at most a few ulps of x; overflows to Infinity and
 * underflows to 0 by itself.
 *
 * Source: Tang, "Table-driven implementation of the exponential function in IEEE floating-point
 * arithmetic", ACM TOMS 15 (1989): x = n·ln 2/32 + r, exp x = 2^(n/32)·exp r, the root of two from
 * a table as a pair. Taylor's polynomial of degree 7 on |r| <= 0.011 leaves less than 2^−67.
 */
export function exponentialKernel(x: number, xLow: number): number {
  const n = Math.floor(x * STEPS_PER_UNIT + 0.5);
  const r1 = x - n * STEP_HIGH;
  const r2 = xLow - n * STEP_LOW;
  const r = r1 + r2;
  const tail = r * r * (1 / 2 + r * (1 / 6 + r * (1 / 24 + r * (1 / 120 + r * (1 / 720 + r * (1 / 5040))))));
  const growth = r1 + (r2 + tail);
  const entry = n & 31;
  const high = ROOT_OF_TWO_HIGH[entry];
  const low = ROOT_OF_TWO_LOW[entry];
  return scaleByPowerOfTwo(high + (low + (high + low) * growth), (n - entry) / 32);
}
