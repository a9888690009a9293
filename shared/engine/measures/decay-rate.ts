/**
 * Decay rate of a set of poles: min over λ of −Re λ, 1/s; negative when one lies right of the axis,
 * Infinity without poles.
 *
 * @param re real parts, 1/s
 */
export function decayRate(re: Float64Array, count: number): number {
  let rate = Infinity;
  for (let k = 0; k < count; k++) {
    if (-re[k] < rate) {
      rate = -re[k];
    }
  }
  return rate;
}
