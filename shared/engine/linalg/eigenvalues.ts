import { binaryExponent, scaleByPowerOfTwo } from '../../expressions/elementary/float-bits';
import { type ActiveWindow, balance } from './balance';
import { doubleShiftQr } from './double-shift-qr';
import { EigenvalueIterationError, NonFiniteMatrixError } from './errors';
import { reduceToHessenberg } from './hessenberg';

/** QR steps allowed for each eigenvalue unless the caller says otherwise; two to four are usual. */
export const DEFAULT_ITERATION_LIMIT = 30;

// Between these the squares that balancing and shifting form can neither overflow nor vanish.
const LARGEST_UNSCALED = 1e120;
const SMALLEST_UNSCALED = 1e-120;

/**
 * All eigenvalues of real general matrices: finite check, balancing, elimination to Hessenberg form,
 * double-shift QR. One solver serves any number of matrices up to its order without allocating.
 *
 * Normwise backward stable with respect to the balanced matrix. See the three steps for sources.
 */
export class EigenvalueSolver {
  private readonly window: ActiveWindow = { low: 0, high: -1 };

  /**
   * @param maximumOrder largest n accepted by `compute`
   * @param iterationLimit QR steps allowed for each eigenvalue
   */
  constructor(
    readonly maximumOrder: number,
    readonly iterationLimit: number = DEFAULT_ITERATION_LIMIT,
  ) {}

  /**
   * Solves det(λI − A) = 0.
   *
   * @param a row-major n×n, overwritten
   * @param n order, 0 … maximumOrder
   * @param re receives n real parts, in no particular order (see `sortPoles`)
   * @param im receives n imaginary parts; complex ones are exact conjugates in neighbouring places,
   *   the positive one first
   * @throws NonFiniteMatrixError an entry is NaN or infinite; nothing has been written
   * @throws EigenvalueIterationError the iteration limit was reached
   * @throws RangeError n or an array does not fit
   */
  compute(a: Float64Array, n: number, re: Float64Array, im: Float64Array): void {
    if (!(n >= 0 && n <= this.maximumOrder)) {
      throw new RangeError(`order ${n} is outside 0 … ${this.maximumOrder}`);
    }
    if (a.length < n * n || re.length < n || im.length < n) {
      throw new RangeError(`arrays are too short for order ${n}`);
    }
    const largest = largestEntry(a, n);
    if (largest > LARGEST_UNSCALED || (largest < SMALLEST_UNSCALED && largest !== 0)) {
      this.computeScaled(a, n, re, im, binaryExponent(largest));
    } else {
      this.computeUnchecked(a, n, re, im);
    }
  }

  private computeScaled(
    a: Float64Array,
    n: number,
    re: Float64Array,
    im: Float64Array,
    exponent: number,
  ): void {
    for (let k = 0; k < n * n; k++) {
      a[k] = scaleByPowerOfTwo(a[k], -exponent);
    }
    this.computeUnchecked(a, n, re, im);
    for (let k = 0; k < n; k++) {
      re[k] = scaleByPowerOfTwo(re[k], exponent);
      im[k] = scaleByPowerOfTwo(im[k], exponent);
    }
  }

  private computeUnchecked(a: Float64Array, n: number, re: Float64Array, im: Float64Array): void {
    const window = this.window;
    balance(a, n, window);
    const { low, high } = window;
    for (let k = 0; k < n; k++) {
      if (k < low || k > high) {
        re[k] = a[k * n + k];
        im[k] = 0;
      }
    }
    reduceToHessenberg(a, n, low, high);
    const unresolved = doubleShiftQr(a, n, low, high, re, im, this.iterationLimit);
    if (unresolved > 0) {
      throw new EigenvalueIterationError(unresolved, this.iterationLimit);
    }
  }
}

/** Largest modulus of the n×n entries; throws at the first that is not finite. */
function largestEntry(a: Float64Array, n: number): number {
  let largest = 0;
  let poison = 0;
  for (let k = 0; k < n * n; k++) {
    const size = Math.abs(a[k]);
    poison += size * 0;
    if (size > largest) {
      largest = size;
    }
  }
  if (poison !== 0) {
    for (let k = 0; k < n * n; k++) {
      if (a[k] - a[k] !== 0) {
        throw new NonFiniteMatrixError(Math.floor(k / n), k % n);
      }
    }
  }
  return largest;
}
