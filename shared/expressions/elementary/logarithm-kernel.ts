import { LN2_HIGH, LN2_LOW } from './constants';
import { productError, sumError } from './double-double';
import { fromWords, highWord, lowWord } from './float-bits';
import { MINUS_LOG_HIGH, MINUS_LOG_LOW, RECIPROCAL } from './logarithm-table';

const SMALLEST_NORMAL = 2.2250738585072014e-308;
const TWO_TO_54 = 18014398509481984;
/** Table entries from here on belong to mantissas above √2, which are halved. */
const FIRST_HALVED_ENTRY = 53;

/**
 * ln x for finite x > 0 as a pair out[0] + out[1], out[0] the rounded sum; relative error below
 * 2^−66.
 *
 * x = 2^k·m, and with c near 1/m from a table, ln x = k·ln 2 − ln c + ln(1 + z), z = m·c − 1
 * exactly as a pair, |z| <= 2^−7. Source of the scheme: Tang, "Table-driven implementation of the
 * logarithm function in IEEE floating-point arithmetic", ACM TOMS 16 (1990); here the first two
 * terms of the series are carried in double-double so that powers can use the result.
 */
export function logarithmKernel(x: number, out: Float64Array): void {
  let k = -1023;
  let normal = x;
  if (x < SMALLEST_NORMAL) {
    normal = x * TWO_TO_54;
    k -= 54;
  }
  const word = highWord(normal);
  const entry = (word >>> 13) & 127;
  k += word >>> 20;
  let exponentField = 1023;
  if (entry >= FIRST_HALVED_ENTRY) {
    exponentField = 1022;
    k += 1;
  }
  const mantissaWord = (word & 0xfffff) | (exponentField << 20);
  const low = lowWord(normal);
  const m = fromWords(mantissaWord, low);
  const mHigh = fromWords(mantissaWord, 0);

  const c = RECIPROCAL[entry];
  const zFirst = mHigh * c - 1;
  const zSecond = (m - mHigh) * c;
  const z = zFirst + zSecond;
  const zLow = sumError(zFirst, zSecond, z);

  const square = z * z;
  const squareLow = productError(z, z, square) + 2 * z * zLow;
  const half = 0.5 * square;
  const leading = z - half;
  const leadingLow = z - leading - half + (zLow - 0.5 * squareLow);
  const series =
    z *
    square *
    (1 / 3 +
      z * (-1 / 4 + z * (1 / 5 + z * (-1 / 6 + z * (1 / 7 + z * (-1 / 8 + z * (1 / 9 + z * (-1 / 10))))))));

  const base = k * LN2_HIGH + MINUS_LOG_HIGH[entry];
  const sum = base + leading;
  const rest = sumError(base, leading, sum) + (leadingLow + series + (k * LN2_LOW + MINUS_LOG_LOW[entry]));
  const high = sum + rest;
  out[0] = high;
  out[1] = rest - (high - sum);
}
