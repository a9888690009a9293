/** What one Horner evaluation of a real polynomial at a complex point leaves behind. */
export interface PolynomialValue {
  /** p′(z)/p(z), real and imaginary part; not finite where p(z) = 0. */
  ratioRe: number;
  ratioIm: number;
  /** |p(z)| / Σ|b_k||z|^k: from 0 (a root) to 1 (no cancellation at all). */
  relativeSize: number;
}

/**
 * p′/p and the relative size of p = Σ b_k z^k at z = x + jy. Outside the unit circle the reversed
 * polynomial in 1/z is evaluated, so nothing overflows before the coefficients do.
 *
 * @param b coefficients in ascending powers, b[0 … degree]
 */
export function evaluatePolynomial(
  b: Float64Array,
  degree: number,
  x: number,
  y: number,
  out: PolynomialValue,
): void {
  const inside = x * x + y * y <= 1;
  let zx = x;
  let zy = y;
  if (!inside) {
    // Smith's division: |z| may be near the ends of the exponent range.
    if (Math.abs(x) >= Math.abs(y)) {
      const t = y / x;
      const d = x + y * t;
      zx = 1 / d;
      zy = -t / d;
    } else {
      const t = x / y;
      const d = x * t + y;
      zx = t / d;
      zy = -1 / d;
    }
  }
  const size = Math.sqrt(zx * zx + zy * zy);
  let p = 0;
  let pIm = 0;
  let slope = 0;
  let slopeIm = 0;
  let bound = 0;
  for (let k = 0; k <= degree; k++) {
    const coefficient = inside ? b[degree - k] : b[k];
    const nextSlope = slope * zx - slopeIm * zy + p;
    slopeIm = slope * zy + slopeIm * zx + pIm;
    slope = nextSlope;
    const next = p * zx - pIm * zy + coefficient;
    pIm = p * zy + pIm * zx;
    p = next;
    bound = bound * size + Math.abs(coefficient);
  }
  out.relativeSize = Math.sqrt(p * p + pIm * pIm) / bound;
  const square = p * p + pIm * pIm;
  const re = (slope * p + slopeIm * pIm) / square;
  const im = (slopeIm * p - slope * pIm) / square;
  if (inside) {
    out.ratioRe = re;
    out.ratioIm = im;
  } else {
    // p(z) = z^n q(1/z), hence p′/p = w (n − w q′(w)/q(w)) with w = 1/z.
    const innerRe = degree - (zx * re - zy * im);
    const innerIm = -(zx * im + zy * re);
    out.ratioRe = zx * innerRe - zy * innerIm;
    out.ratioIm = zx * innerIm + zy * innerRe;
  }
}
