import { arctangentKernel } from './arctangent-kernel';
import { HALF_PI_HIGH, PI_HIGH, PI_LOW } from './constants';
import { sumError } from './double-double';
import { highWord, powerOfTwo } from './float-bits';

const pair = new Float64Array(2);
const RATIO_LIMIT = 18446744073709551616;
const THREE_QUARTER_PI = 2.356194490192345;
const QUARTER_PI = 0.7853981633974483;
const LARGE = powerOfTwo(500);
const SMALL = powerOfTwo(-300);
const RESCALE_DOWN = powerOfTwo(-600);
const RESCALE_UP = powerOfTwo(600);

/**
 * Angle of the point (x, y) in radians, in [−π, π], signed as y; error at most
 * `ELEMENTARY_ERROR_ULPS.atan2`. Zeros, signed zeros and infinities as in IEEE 754-2019 (9.2.1):
 * atan2(±0, x) is ±0 for x >= +0 and ±π for x <= −0; NaN if either argument is NaN.
 */
export function atan2(y: number, x: number): number {
  if (x !== x || y !== y) return NaN;
  const angle = angleFromAxis(Math.abs(y), Math.abs(x), isNegative(x));
  return isNegative(y) ? -angle : angle;
}

/** Angle of (±x, y) for x, y >= 0: y above the positive axis, or above the negative one. */
function angleFromAxis(y: number, x: number, left: boolean): number {
  if (y === Infinity && x === Infinity) return left ? THREE_QUARTER_PI : QUARTER_PI;
  if (y === 0 && x === 0) return left ? PI_HIGH : 0;
  const ratio = y / x;
  if (ratio > RATIO_LIMIT) return HALF_PI_HIGH;
  if (ratio < 1 / RATIO_LIMIT) return left ? PI_HIGH : ratio;

  const larger = Math.max(x, y);
  const scale = larger > LARGE ? RESCALE_DOWN : larger < SMALL ? RESCALE_UP : 1;
  arctangentKernel(y * scale, 0, x * scale, 0, pair);
  if (!left) return pair[0] + pair[1];
  const supplement = PI_HIGH - pair[0];
  return supplement + (sumError(PI_HIGH, -pair[0], supplement) + (PI_LOW - pair[1]));
}

function isNegative(x: number): boolean {
  return highWord(x) >>> 31 === 1;
}
