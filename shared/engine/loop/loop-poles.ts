import { scaleByPowerOfTwo } from '../../expressions';
import { EigenvalueSolver } from '../linalg';
import type { LoopMatrix } from './loop-matrix';
import { StateMatrix } from './state-matrix';

/**
 * Poles of a loop at a point, closed and with one law's loop broken, with no allocation per point.
 * Arrays hold `order` entries, in the order the solver finds them.
 */
export class LoopPoles {
  readonly order: number;
  readonly closedRe: Float64Array;
  readonly closedIm: Float64Array;
  readonly brokenRe: Float64Array;
  readonly brokenIm: Float64Array;
  /** Ratio of the leading coefficients of a and d: 1 + L(s) = ratio · Π(s − λ)/Π(s − μ). */
  leadingRatio = 1;
  private readonly matrix: StateMatrix;
  private readonly solver: EigenvalueSolver;
  private closedLeading = 1;
  private closedExponent = 0;

  constructor(loop: LoopMatrix) {
    this.matrix = new StateMatrix(loop);
    this.order = loop.order;
    this.solver = new EigenvalueSolver(this.order);
    this.closedRe = new Float64Array(this.order);
    this.closedIm = new Float64Array(this.order);
    this.brokenRe = new Float64Array(this.order);
    this.brokenIm = new Float64Array(this.order);
  }

  /**
   * Closed-loop poles at a point (SI values of all parameters).
   * @returns false where the loop has lost its order or an entry is not finite
   */
  closeLoop(parameters: ArrayLike<number>): boolean {
    this.matrix.evaluate(parameters);
    if (!this.solve(-1, this.closedRe, this.closedIm)) return false;
    this.closedLeading = this.matrix.leading;
    this.closedExponent = this.matrix.leadingExponent;
    return true;
  }

  /** Poles with one law's loop broken, at the point of the last `closeLoop`. */
  breakLoop(law: number): boolean {
    if (!this.solve(law, this.brokenRe, this.brokenIm)) return false;
    const { leading, leadingExponent } = this.matrix;
    this.leadingRatio = scaleByPowerOfTwo(
      this.closedLeading / leading,
      this.closedExponent - leadingExponent,
    );
    return true;
  }

  private solve(brokenLaw: number, re: Float64Array, im: Float64Array): boolean {
    if (!this.matrix.assemble(brokenLaw)) return false;
    for (const entry of this.matrix.a) if (!Number.isFinite(entry)) return false;
    this.solver.compute(this.matrix.a, this.order, re, im);
    return true;
  }
}
