const EPSILON = 2.220446049250313e-16;

/** Bisection alone needs about sixty steps from any bracket; the interpolation rarely ten. */
const STEP_LIMIT = 200;

/**
 * A zero of a continuous function between two points where its signs differ, to the last digits of
 * the argument, by inverse quadratic interpolation with bisection where that is not safe.
 *
 * Chandrupatla 1997, Adv. Eng. Software 28, 145–149.
 *
 * @param f the function
 * @param low one end
 * @param high the other end
 * @param atLow f(low)
 * @param atHigh f(high), of the other sign
 */
export function bracketedZero(
  f: (x: number) => number,
  low: number,
  high: number,
  atLow: number,
  atHigh: number,
): number {
  let a = high;
  let b = low;
  let fa = atHigh;
  let fb = atLow;
  let t = 0.5;
  for (let step = 0; step < STEP_LIMIT; step++) {
    const x = a + t * (b - a);
    const fx = f(x);
    let c: number;
    let fc: number;
    if (fx < 0 === fa < 0) {
      c = a;
      fc = fa;
    } else {
      c = b;
      fc = fb;
      b = a;
      fb = fa;
    }
    a = x;
    fa = fx;
    const best = Math.abs(fa) < Math.abs(fb) ? a : b;
    const least = Math.abs(fa) < Math.abs(fb) ? fa : fb;
    const tolerance = (2 * EPSILON * Math.abs(best)) / Math.abs(b - a);
    if (least === 0 || !(tolerance < 0.5)) {
      return best;
    }
    const xi = (a - b) / (c - b);
    const phi = (fa - fb) / (fc - fb);
    if (phi * phi < xi && (1 - phi) * (1 - phi) < 1 - xi) {
      t = (fa / (fb - fa)) * (fc / (fb - fc)) + ((c - a) / (b - a)) * (fa / (fc - fa)) * (fb / (fc - fb));
    } else {
      t = 0.5;
    }
    t = Math.min(1 - tolerance, Math.max(tolerance, t));
  }
  return Math.abs(fa) < Math.abs(fb) ? a : b;
}
