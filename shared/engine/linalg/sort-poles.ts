/**
 * Sorts complex numbers in place: real part descending, then imaginary part descending, so the pole
 * nearest to instability comes first and a conjugate pair stays together with its upper half first.
 *
 * @param re n real parts, finite
 * @param im n imaginary parts
 */
export function sortPoles(re: Float64Array, im: Float64Array, n: number): void {
  for (let i = 1; i < n; i++) {
    const x = re[i];
    const y = im[i];
    let k = i - 1;
    while (k >= 0 && (re[k] < x || (re[k] === x && im[k] < y))) {
      re[k + 1] = re[k];
      im[k + 1] = im[k];
      k--;
    }
    re[k + 1] = x;
    im[k + 1] = y;
  }
}
