import { modulus } from './modulus';

/**
 * Damping ratio of a set of poles: min over λ of −Re λ/|λ|, from −1 to 1. A pole at 0 counts as 0, a
 * real stable pole as 1; without poles it is 1.
 *
 * @param re real parts, 1/s
 * @param im imaginary parts, rad/s
 */
export function dampingRatio(re: Float64Array, im: Float64Array, count: number): number {
  let least = 1;
  for (let k = 0; k < count; k++) {
    const size = modulus(re[k], im[k]);
    const ratio = size === 0 ? 0 : -re[k] / size;
    if (ratio < least) {
      least = ratio;
    }
  }
  return least;
}
