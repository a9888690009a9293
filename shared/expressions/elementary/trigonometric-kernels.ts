/**
 * Sine and cosine of r = y + yLow, |r| <= π/4, |yLow| at most an ulp of y, each written to `out` as
 * an unevaluated sum out[0] + out[1] whose error is below 0.35 ulp of the value. The polynomials
 * are Taylor's, carried until the first term left out is below 0.001 ulp.
 */
export function sineKernel(y: number, yLow: number, out: Float64Array): void {
  const z = y * y;
  const tail =
    z *
    (1 / 120 +
      z *
        (-1 / 5040 +
          z *
            (1 / 362880 +
              z *
                (-1 / 39916800 +
                  z * (1 / 6227020800 + z * (-1 / 1307674368000 + z * (1 / 355687428096000)))))));
  const correction = y * (z * (-1 / 6 + tail)) + yLow * (1 - 0.5 * z);
  const sum = y + correction;
  out[0] = sum;
  out[1] = correction - (sum - y);
}

/** See `sineKernel`. */
export function cosineKernel(y: number, yLow: number, out: Float64Array): void {
  const z = y * y;
  const half = 0.5 * z;
  const tail =
    z *
    z *
    (1 / 24 +
      z *
        (-1 / 720 +
          z *
            (1 / 40320 +
              z *
                (-1 / 3628800 +
                  z *
                    (1 / 479001600 +
                      z * (-1 / 87178291200 + z * (1 / 20922789888000 + z * (-1 / 6402373705728000))))))));
  const leading = 1 - half;
  const correction = 1 - leading - half + (tail - yLow * y * (1 - z * (1 / 6)));
  const sum = leading + correction;
  out[0] = sum;
  out[1] = correction - (sum - leading);
}
