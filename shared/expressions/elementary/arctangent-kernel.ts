import { ARCTANGENT_HIGH, ARCTANGENT_LOW } from './arctangent-table';
import { HALF_PI_HIGH, HALF_PI_LOW } from './constants';
import { productError, sumError } from './double-double';

/**
 * atan(n/d) for n = nHigh + nLow >= 0 and d = dHigh + dLow > 0, n/d within 2^±70 and both far from
 * overflow and underflow; written to `out` as a pair good to about 2^−62 of the value.
 *
 * The quotient is brought to [0, 1] by atan q = π/2 − atan(1/q), then to |t| <= 1/32 by
 * atan q = atan c + atan((q − c)/(1 + c·q)) with the nearest c = i/16, and ends in Gregory's
 * series. Source of the table-and-addition-theorem scheme: Cody & Waite, *Software Manual for the
 * Elementary Functions*, 1980; Tang, "Table-lookup algorithms for elementary functions and their
 * error analysis", ARITH-10, 1991.
 */
export function arctangentKernel(
  nHigh: number,
  nLow: number,
  dHigh: number,
  dLow: number,
  out: Float64Array,
): void {
  const swapped = nHigh > dHigh;
  const top = swapped ? dHigh : nHigh;
  const topLow = swapped ? dLow : nLow;
  const bottom = swapped ? nHigh : dHigh;
  const bottomLow = swapped ? nLow : dLow;

  const q = top / bottom;
  const qBottom = q * bottom;
  const qLow = (top - qBottom - productError(q, bottom, qBottom) + topLow - q * bottomLow) / bottom;

  const entry = Math.floor(16 * q + 0.5);
  let t = q;
  let tLow = qLow;
  if (entry > 0) {
    const c = entry / 16;
    const difference = q - c;
    const cq = c * q;
    const divisor = 1 + cq;
    const divisorLow = sumError(1, cq, divisor) + productError(c, q, cq) + c * qLow;
    t = difference / divisor;
    const product = t * divisor;
    tLow = (difference - product - productError(t, divisor, product) + qLow - t * divisorLow) / divisor;
  }

  const z = t * t;
  const series = t * z * (-1 / 3 + z * (1 / 5 + z * (-1 / 7 + z * (1 / 9 + z * (-1 / 11 + z * (1 / 13))))));
  const base = ARCTANGENT_HIGH[entry];
  let high = base + t;
  let low = sumError(base, t, high) + (ARCTANGENT_LOW[entry] + (tLow + series));
  if (swapped) {
    const complement = HALF_PI_HIGH - high;
    low = sumError(HALF_PI_HIGH, -high, complement) + (HALF_PI_LOW - low);
    high = complement;
  }
  out[0] = high;
  out[1] = low;
}
