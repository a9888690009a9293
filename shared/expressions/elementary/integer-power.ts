import { productError } from './double-double';
import { fromWords, highWord, lowWord, scaleByPowerOfTwo } from './float-bits';

const SMALLEST_NORMAL = 2.2250738585072014e-308;
const TWO_TO_54 = 18014398509481984;

/**
 * x^n for finite x > 0 and an integer 1 <= |n| <= 64, by repeated squaring and multiplication of
 * the significand in double-double; the exponent is put back at the end. Every intermediate power
 * of an exact result is itself exact, so exact results come out exactly; all others within 0.51
 * ulp (1 ulp in the subnormal range, where scaling rounds once more). Source of the arithmetic:
 * Dekker 1971; of the binary method: Knuth, *The Art of Computer Programming* vol. 2, 4.6.3.
 */
export function integerPower(x: number, n: number): number {
  let exponent = -1023;
  let normal = x;
  if (x < SMALLEST_NORMAL) {
    normal = x * TWO_TO_54;
    exponent -= 54;
  }
  const word = highWord(normal);
  exponent += word >>> 20;
  const m = fromWords((word & 0xfffff) | 0x3ff00000, lowWord(normal));

  const count = Math.abs(n);
  let bit = 64;
  while (bit > count) bit >>>= 1;
  let high = m;
  let low = 0;
  for (bit >>>= 1; bit > 0; bit >>>= 1) {
    const square = high * high;
    const squareLow = productError(high, high, square) + 2 * high * low;
    high = square + squareLow;
    low = squareLow - (high - square);
    if ((count & bit) !== 0) {
      const product = high * m;
      const productLow = productError(high, m, product) + low * m;
      high = product + productLow;
      low = productLow - (high - product);
    }
  }
  if (n > 0) return scaleByPowerOfTwo(high, exponent * n);

  const inverse = 1 / high;
  const product = inverse * high;
  const rest = 1 - product - productError(inverse, high, product) - inverse * low;
  return scaleByPowerOfTwo(inverse + rest / high, exponent * n);
}
