import { binaryExponent, scaleByPowerOfTwo } from '../../expressions/elementary/float-bits';
import { EigenvalueSolver } from './eigenvalues';
import { NonFinitePolynomialError, ZeroPolynomialError } from './errors';
import { evaluatePolynomial, type PolynomialValue } from './polynomial-value';
import { sortPoles } from './sort-poles';

const EPSILON = 2.220446049250313e-16;

/** Corrections per root; two are usual, a cluster takes more. */
const POLISHING_LIMIT = 16;

/**
 * All roots of real polynomials: eigenvalues of the balanced companion matrix, then corrected by the
 * simultaneous iteration of Ehrlich and Aberth until |p(z)| is within rounding of Σ|a_k||z|^k. The
 * roots are then exact ones of a polynomial whose *single* coefficients differ by rounding, which
 * the companion matrix alone does not give.
 *
 * Edelman & Murakami 1995, Math. Comp. 64, 763–776; Ehrlich 1967, Comm. ACM 10, 107–108; Aberth
 * 1973, Math. Comp. 27, 339–344. Stopping rule: Bini 1996, Numer. Algorithms 13, 179–200.
 */
export class PolynomialRootSolver {
  private readonly solver: EigenvalueSolver;
  private readonly companion: Float64Array;
  private readonly scaled: Float64Array;
  private readonly keptRe: Float64Array;
  private readonly keptIm: Float64Array;
  private readonly value: PolynomialValue = { ratioRe: 0, ratioIm: 0, relativeSize: 0 };

  /** @param maximumDegree largest degree accepted by `solve` */
  constructor(readonly maximumDegree: number) {
    this.solver = new EigenvalueSolver(maximumDegree);
    this.companion = new Float64Array(maximumDegree * maximumDegree);
    this.scaled = new Float64Array(maximumDegree + 1);
    this.keptRe = new Float64Array(maximumDegree);
    this.keptIm = new Float64Array(maximumDegree);
  }

  /**
   * Solves Σ a_k z^k = 0, k = 0 … degree.
   *
   * @param a coefficients in ascending powers, degree + 1 of them; highest ones that are zero lower
   *   the degree, lowest ones that are zero give roots that are exactly 0
   * @param re receives the real parts, sorted as by `sortPoles`
   * @param im receives the imaginary parts; complex roots are exact conjugates
   * @returns number of roots
   * @throws ZeroPolynomialError all coefficients are zero
   * @throws NonFinitePolynomialError a coefficient is NaN or infinite
   * @throws RangeError degree or an array does not fit
   */
  solve(a: Float64Array, degree: number, re: Float64Array, im: Float64Array): number {
    if (!(degree >= 0 && degree <= this.maximumDegree) || a.length <= degree) {
      throw new RangeError(`degree ${degree} does not fit`);
    }
    for (let k = 0; k <= degree; k++) {
      if (a[k] - a[k] !== 0) {
        throw new NonFinitePolynomialError(k);
      }
    }
    let top = degree;
    while (top >= 0 && a[top] === 0) {
      top--;
    }
    if (top < 0) {
      throw new ZeroPolynomialError();
    }
    let bottom = 0;
    while (a[bottom] === 0) {
      bottom++;
    }
    if (re.length < top || im.length < top) {
      throw new RangeError(`arrays are too short for ${top} roots`);
    }
    const order = top - bottom;
    this.solveReduced(a, bottom, order, re, im);
    for (let k = order; k < top; k++) {
      re[k] = 0;
      im[k] = 0;
    }
    sortPoles(re, im, top);
    return top;
  }

  /** Roots of Σ a_{bottom+k} z^k, whose two end coefficients are not zero. */
  private solveReduced(
    a: Float64Array,
    bottom: number,
    order: number,
    re: Float64Array,
    im: Float64Array,
  ): void {
    if (order === 0) {
      return;
    }
    // z = 2^unit · w makes the end coefficients of like size, so the roots' moduli have mean about 1.
    const spread = binaryExponent(a[bottom]) - binaryExponent(a[bottom + order]);
    const unit = Math.floor(spread / order + 0.5);
    const lead = binaryExponent(a[bottom + order]) + unit * order;
    const b = this.scaled;
    for (let k = 0; k <= order; k++) {
      b[k] = scaleByPowerOfTwo(a[bottom + k], unit * k - lead);
    }
    const companion = this.companion;
    companion.fill(0, 0, order * order);
    for (let k = 0; k < order; k++) {
      companion[k] = -b[order - 1 - k] / b[order];
      if (k + 1 < order) {
        companion[(k + 1) * order + k] = 1;
      }
    }
    this.solver.compute(companion, order, re, im);
    this.polish(order, re, im);
    this.reunite(order, re, im);
    for (let k = 0; k < order; k++) {
      re[k] = scaleByPowerOfTwo(re[k], unit);
      im[k] = scaleByPowerOfTwo(im[k], unit);
    }
  }

  /** Corrects all roots in turn; false when some root is still off after the limit. */
  private polish(order: number, re: Float64Array, im: Float64Array): boolean {
    const value = this.value;
    const b = this.scaled;
    for (let pass = 0; pass < POLISHING_LIMIT; pass++) {
      let settled = true;
      for (let k = 0; k < order; k++) {
        if (im[k] < 0) {
          continue;
        }
        evaluatePolynomial(b, order, re[k], im[k], value);
        if (value.relativeSize <= 2 * EPSILON) {
          continue;
        }
        let pullRe = value.ratioRe;
        let pullIm = value.ratioIm;
        for (let j = 0; j < order; j++) {
          const dx = re[k] - re[j];
          const dy = im[k] - im[j];
          const square = dx * dx + dy * dy;
          if (j !== k && square > 0) {
            pullRe -= dx / square;
            pullIm += dy / square;
          }
        }
        const square = pullRe * pullRe + pullIm * pullIm;
        const stepRe = pullRe / square;
        const stepIm = -pullIm / square;
        if (stepRe - stepRe !== 0 || stepIm - stepIm !== 0) {
          continue;
        }
        const size = Math.abs(re[k]) + Math.abs(im[k]);
        if (Math.abs(stepRe) + Math.abs(stepIm) > EPSILON * size) {
          settled = false;
        }
        re[k] -= stepRe;
        if (im[k] > 0) {
          im[k] = Math.abs(im[k] - stepIm);
          // The solver leaves conjugates side by side, the positive one first.
          re[k + 1] = re[k];
          im[k + 1] = -im[k];
        }
      }
      if (settled) {
        return true;
      }
    }
    return false;
  }

  /**
   * Two real roots so close that the companion matrix took them for a conjugate pair cannot come
   * apart by corrections that keep the pair conjugate. Such a pair is tried as two real numbers, and
   * kept so if both then satisfy the polynomial better.
   */
  private reunite(order: number, re: Float64Array, im: Float64Array): void {
    for (let k = 0; k + 1 < order; k++) {
      if (!(im[k] > 0) || im[k] > 1e-4 * Math.abs(re[k])) {
        continue;
      }
      const before = this.sizeAt(order, re[k], im[k]);
      if (before <= 16 * EPSILON) {
        continue;
      }
      for (let j = 0; j < order; j++) {
        this.keptRe[j] = re[j];
        this.keptIm[j] = im[j];
      }
      const half = im[k];
      im[k] = 0;
      im[k + 1] = 0;
      re[k] += half;
      re[k + 1] -= half;
      this.polish(order, re, im);
      const after = Math.max(this.sizeAt(order, re[k], 0), this.sizeAt(order, re[k + 1], 0));
      if (!(after < before)) {
        for (let j = 0; j < order; j++) {
          re[j] = this.keptRe[j];
          im[j] = this.keptIm[j];
        }
      }
    }
  }

  private sizeAt(order: number, x: number, y: number): number {
    evaluatePolynomial(this.scaled, order, x, y, this.value);
    return this.value.relativeSize;
  }
}
