import { reduceLargeArgument } from './large-argument-reduction';

const QUARTER_PI = 0.7853981633974483;
const TWO_OVER_PI = 0.6366197723675814;

/** π/2 as a sum: three parts of 33 bits, whose products with n < 2^20 are exact, and the rest. */
const HALF_PI_1 = 1.5707963267341256;
const HALF_PI_2 = 6.077100506303966e-11;
const HALF_PI_3 = 2.0222662487111665e-21;
const HALF_PI_4 = 8.4784276603689e-32;

const CODY_WAITE_LIMIT = 1048576;

/**
 * Remainder of a finite x >= 0 modulo π/2: writes r = out[0] + out[1], |r| <= π/4 (to within
 * rounding), and returns the quadrant q in 0…3 with x ≡ q·π/2 + r (mod 2π). The pair has at least
 * 70 correct bits.
 *
 * Source: Cody & Waite, *Software Manual for the Elementary Functions*, 1980 (subtracting a
 * multiple of a constant in exact parts), below 2^20; `reduceLargeArgument` beyond.
 */
export function reduceArgument(x: number, out: Float64Array): number {
  if (x <= QUARTER_PI) {
    out[0] = x;
    out[1] = 0;
    return 0;
  }
  if (x >= CODY_WAITE_LIMIT) return reduceLargeArgument(x, out);

  const n = Math.floor(x * TWO_OVER_PI + 0.5);
  const first = x - n * HALF_PI_1;
  const secondPart = n * HALF_PI_2;
  const second = first - secondPart;
  const secondShift = second - first;
  const secondError = first - (second - secondShift) - (secondPart + secondShift);
  const thirdPart = n * HALF_PI_3;
  const third = second - thirdPart;
  const thirdShift = third - second;
  const thirdError = second - (third - thirdShift) - (thirdPart + thirdShift);
  const low = thirdError + secondError - n * HALF_PI_4;
  const sum = third + low;
  out[0] = sum;
  out[1] = low - (sum - third);
  return n & 3;
}
