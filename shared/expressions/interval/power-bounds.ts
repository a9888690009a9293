import { ELEMENTARY_ERROR_ULPS, pow } from '../elementary';
import { divideDown, divideUp, multiplyDown, multiplyUp } from './directed-operations';
import { widenDown, widenUp } from './widen';

const LARGEST_MULTIPLIED = 64;

/** A lower bound of x^y for x >= 0; the exact power where it is a double and y a small integer. */
export function powerBelow(x: number, y: number): number {
  if (isExact(x, y)) return pow(x, y);
  const widened = Math.max(0, widenDown(pow(x, y), ELEMENTARY_ERROR_ULPS.pow));
  const size = Math.abs(y);
  if (!isMultiplied(size)) return widened;
  const product = y > 0 ? repeated(x, size, multiplyDown) : divideDown(1, repeated(x, size, multiplyUp));
  return Math.max(widened, product);
}

/** An upper bound of x^y for x >= 0; see `powerBelow`. */
export function powerAbove(x: number, y: number): number {
  if (isExact(x, y)) return pow(x, y);
  const widened = widenUp(pow(x, y), ELEMENTARY_ERROR_ULPS.pow);
  const size = Math.abs(y);
  if (!isMultiplied(size)) return widened;
  if (y > 0) return Math.min(widened, repeated(x, size, multiplyUp));
  const divisor = repeated(x, size, multiplyDown);
  return divisor > 0 ? Math.min(widened, divideUp(1, divisor)) : widened;
}

function isExact(x: number, y: number): boolean {
  return y === 0 || y === 1 || x === 0 || x === 1 || x === Infinity;
}

function isMultiplied(size: number): boolean {
  return size <= LARGEST_MULTIPLIED && Math.floor(size) === size;
}

/** x^count, count >= 1, by squaring with a one-sided product. */
function repeated(x: number, count: number, multiply: (a: number, b: number) => number): number {
  let bit = LARGEST_MULTIPLIED;
  while (bit > count) bit >>>= 1;
  let power = x;
  for (bit >>>= 1; bit > 0; bit >>>= 1) {
    power = multiply(power, power);
    if ((count & bit) !== 0) power = multiply(power, x);
  }
  return power;
}
