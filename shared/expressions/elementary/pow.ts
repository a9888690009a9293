import { productError } from './double-double';
import { exponentialKernel } from './exponential-kernel';
import { highWord } from './float-bits';
import { integerPower } from './integer-power';
import { logarithmKernel } from './logarithm-kernel';

const logarithm = new Float64Array(2);
const LARGEST_MULTIPLIED = 64;
const OVERFLOW = 710;
const UNDERFLOW = -746;

/**
 * x^y; error at most `ELEMENTARY_ERROR_ULPS.pow`, exact where the result is a double, and exactly
 * the rounded x·x and 1/x for y = 2 and y = −1. Integer exponents up to 64 in size by repeated
 * multiplication, others as exp(y·ln x) with the logarithm in double-double.
 *
 * Special cases as ECMA-262 has them: x^±0 = 1; NaN for a NaN exponent, for (±1)^±∞, and for a
 * negative base with a fractional exponent; (±0)^y is ±0 or ±∞, signed for odd integers y.
 */
export function pow(x: number, y: number): number {
  if (y === 0) return 1;
  if (x !== x || y !== y) return NaN;
  if (y === 1) return x;
  if (y === 2) return x * x;
  if (y === -1) return 1 / x;

  const size = Math.abs(x);
  if (y === Infinity || y === -Infinity) {
    if (size === 1) return NaN;
    return size > 1 === y > 0 ? Infinity : 0;
  }
  const integer = Math.floor(y) === y;
  const odd = integer && Math.floor(y / 2) * 2 !== y;
  const sign = odd && highWord(x) >>> 31 === 1 ? -1 : 1;
  if (size === 0 || size === Infinity) return (size === 0) === y > 0 ? sign * 0 : sign * Infinity;
  if (x < 0 && !integer) return NaN;
  return sign * positivePower(size, y, integer);
}

function positivePower(x: number, y: number, integer: boolean): number {
  if (x === 1) return 1;
  if (integer && Math.abs(y) <= LARGEST_MULTIPLIED) return integerPower(x, y);
  logarithmKernel(x, logarithm);
  const product = y * logarithm[0];
  if (product > OVERFLOW) return Infinity;
  if (product < UNDERFLOW) return 0;
  return exponentialKernel(product, productError(y, logarithm[0], product) + y * logarithm[1]);
}
