import { binaryExponent, evaluateProgram, scaleByPowerOfTwo } from '../../expressions';
import { factorLu, solveLu } from '../linalg';
import type { LoopMatrix } from './loop-matrix';

/**
 * The state matrix of a loop at given parameter values, with no allocation per point.
 *
 * Column j of P(s) with degree δ_j becomes the chain z_j, ż_j, …, z_j^(δ_j − 1). With H the matrix of the entries at
 * each column's highest power, P(s) z = 0 reads H · [top derivatives] = −(lower powers) · [chains], so one LU
 * solution gives the rows of A; columns of degree 0 are algebraic signals and drop out.
 */
export class StateMatrix {
  /** Number of states. */
  readonly order: number;
  /** A, row-major order×order, valid after `assemble`. */
  readonly a: Float64Array;
  /**
   * det H = leading · 2^leadingExponent, up to a constant the leading coefficient of det P(s). In two parts, since
   * a product of many small masses and lags leaves the range of doubles.
   */
  leading = 1;
  leadingExponent = 0;

  private readonly values: Float64Array;
  private readonly high: Float64Array;
  private readonly lower: Float64Array;
  private readonly pivots: Int32Array;
  private readonly offsets: Int32Array;

  constructor(private readonly loop: LoopMatrix) {
    const { size, order, columnDegrees, program } = loop;
    this.order = order;
    this.a = new Float64Array(order * order);
    this.values = new Float64Array(program.operations.length);
    this.high = new Float64Array(size * size);
    this.lower = new Float64Array(size * order);
    this.pivots = new Int32Array(size);
    this.offsets = new Int32Array(size);
    let offset = 0;
    columnDegrees.forEach((degree, column) => {
      this.offsets[column] = offset;
      offset += degree;
    });
  }

  /** Evaluates all coefficients at a point (SI values of all parameters). */
  evaluate(parameters: ArrayLike<number>): void {
    evaluateProgram(this.loop.program, parameters, this.values);
  }

  /**
   * Builds A for the last evaluated point.
   * @param brokenLaw index of the law whose loop is broken, −1 for the closed loop
   * @returns false where H is singular or an entry is not finite; A is then not valid
   */
  assemble(brokenLaw: number): boolean {
    const { size, order, columnDegrees, entries } = this.loop;
    this.high.fill(0);
    this.lower.fill(0);
    for (const { row, column, power, node, law } of entries) {
      if (law >= 0 && law === brokenLaw) continue;
      const value = this.values[node];
      if (power === columnDegrees[column]) this.high[row * size + column] += value;
      else this.lower[row * order + this.offsets[column] + power] -= value;
    }
    const sign = factorLu(this.high, size, this.pivots);
    if (sign === 0) return false;
    this.leading = sign;
    this.leadingExponent = 0;
    for (let i = 0; i < size; i++) {
      const pivot = this.high[i * size + i];
      if (!Number.isFinite(pivot)) return false;
      const exponent = binaryExponent(pivot);
      this.leading *= scaleByPowerOfTwo(pivot, -exponent);
      this.leadingExponent += exponent;
    }
    solveLu(this.high, size, this.pivots, this.lower, order);
    this.a.fill(0);
    for (let column = 0; column < size; column++) {
      const degree = columnDegrees[column];
      if (degree === 0) continue;
      const first = this.offsets[column];
      for (let k = 0; k < degree - 1; k++) this.a[(first + k) * order + first + k + 1] = 1;
      const top = (first + degree - 1) * order;
      for (let j = 0; j < order; j++) this.a[top + j] = this.lower[column * order + j];
    }
    return true;
  }
}
