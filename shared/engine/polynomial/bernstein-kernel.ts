import { ExclusionTest } from './exclusion-test';
import { UNIT_ROUNDOFF } from './rounding';
import type { TensorShape } from './tensor-shape';

export type { TensorShape } from './tensor-shape';

/**
 * Boxes on flat arrays: what they hold, how they are split and along which dimension. A box holds, for each polynomial, the real parts,
 * the imaginary parts (`size` each; t fastest, then the last variable, sheets slowest) and one error radius per
 * power of t: every stored coefficient of column k is within radius[k] of the true one.
 *
 * Splitting: de Casteljau's algorithm; Zettler & Garloff, IEEE TAC 43 (1998) 425–431.
 * Rounding: Higham, Accuracy and Stability of Numerical Algorithms (2002), chapters 2 and 3.
 */
export class BernsteinKernel {
  /** Coefficients of one polynomial. */
  readonly size: number;
  readonly columns: number;
  /** Length of a box's array. */
  readonly length: number;
  readonly polynomials: 1 | 2;
  private readonly strides: Int32Array;
  private readonly largest: Float64Array;
  private readonly exclusion: ExclusionTest;

  constructor(readonly shape: TensorShape) {
    this.columns = shape.degree + 1;
    this.strides = new Int32Array(shape.degrees.length + 1);
    let stride = this.columns;
    this.strides[shape.degrees.length] = 1;
    for (let i = shape.degrees.length - 1; i >= 0; i--) {
      this.strides[i] = stride;
      stride *= shape.degrees[i] + 1;
    }
    this.size = stride * shape.sheets;
    this.polynomials = shape.discRadius === undefined ? 1 : 2;
    this.length = this.polynomials * (2 * this.size + this.columns);
    this.largest = new Float64Array(this.columns);
    this.exclusion = new ExclusionTest(this.size, this.columns, shape);
  }

  /** Where the radii of one polynomial start. */
  radiusOffset(polynomial: number): number {
    return this.polynomials * 2 * this.size + polynomial * this.columns;
  }

  /** Degree along a dimension; dimension m is t. */
  degreeAlong(dimension: number): number {
    return dimension === this.shape.degrees.length ? this.shape.degree : this.shape.degrees[dimension];
  }

  /** See `ExclusionTest`. */
  excludes(box: Float64Array): boolean {
    return this.exclusion.excludes(box);
  }

  /**
   * Halves a box along a dimension by de Casteljau's algorithm: the left half stays in `box`, the right half goes
   * to `right`. Radii grow by what each averaging can round away: along a variable of degree D
   * R_k ← (R_k + D u M_k)(1 + 4u), M_k the column's largest abs(re) + abs(im); along t level by level.
   */
  split(box: Float64Array, right: Float64Array, dimension: number): void {
    right.set(box);
    for (let polynomial = 0; polynomial < this.polynomials; polynomial++) {
      const start = polynomial * 2 * this.size;
      const radii = this.radiusOffset(polynomial);
      if (dimension === this.shape.degrees.length) this.splitTime(box, right, start, radii);
      else this.splitVariable(box, right, start, radii, dimension);
    }
  }

  private splitVariable(
    box: Float64Array,
    right: Float64Array,
    start: number,
    radii: number,
    dimension: number,
  ): void {
    const degree = this.shape.degrees[dimension];
    this.measureColumns(box, start);
    for (let k = 0; k < this.columns; k++) {
      const grown = (box[radii + k] + degree * UNIT_ROUNDOFF * this.largest[k]) * (1 + 4 * UNIT_ROUNDOFF);
      box[radii + k] = grown;
      right[radii + k] = grown;
    }
    const stride = this.strides[dimension];
    const span = stride * (degree + 1);
    // Real and imaginary parts lie one behind the other and are split alike.
    const end = start + 2 * this.size;
    for (let block = start; block < end; block += span) {
      for (let level = 1; level <= degree; level++) {
        for (let i = degree; i >= level; i--) {
          const upper = block + i * stride;
          const lower = upper - stride;
          for (let j = 0; j < stride; j++) box[upper + j] = 0.5 * (box[lower + j] + box[upper + j]);
        }
        const last = block + degree * stride;
        const target = block + (degree - level) * stride;
        for (let j = 0; j < stride; j++) right[target + j] = box[last + j];
      }
    }
  }

  private splitTime(box: Float64Array, right: Float64Array, start: number, radii: number): void {
    const degree = this.shape.degree;
    const end = start + 2 * this.size;
    const { largest } = this;
    this.measureColumns(box, start);
    for (let level = 1; level <= degree; level++) {
      for (let i = degree; i >= level; i--) {
        // No coefficient of an average is larger than the average of the columns' largest: no need to measure again.
        largest[i] = 0.5 * (largest[i - 1] + largest[i]) * (1 + 4 * UNIT_ROUNDOFF);
        box[radii + i] =
          0.5 * (box[radii + i - 1] + box[radii + i]) * (1 + 4 * UNIT_ROUNDOFF) + UNIT_ROUNDOFF * largest[i];
      }
      right[radii + degree - level] = box[radii + degree];
      for (let row = start; row < end; row += this.columns) {
        for (let i = degree; i >= level; i--) box[row + i] = 0.5 * (box[row + i - 1] + box[row + i]);
        right[row + degree - level] = box[row + degree];
      }
    }
  }

  /** Sets `largest[k]` to the largest abs(re) + abs(im) of column k of the polynomial at `start`. */
  private measureColumns(box: Float64Array, start: number): void {
    const { size, columns, largest } = this;
    const imaginary = start + size;
    for (let k = 0; k < columns; k++) {
      let top = 0;
      for (let i = k; i < size; i += columns) {
        const value = Math.abs(box[start + i]) + Math.abs(box[imaginary + i]);
        if (value > top) top = value;
      }
      largest[k] = top;
    }
  }

  /**
   * The dimension along which the coefficients turn most: the largest Σ abs(Δb)/(abs(b) + abs(b′)) · (degree + 1)
   * over neighbouring coefficients; −1 when no dimension may be split.
   * @param allowed allowed[i] !== 0 where dimension i may still be split (m + 1 entries, t last)
   */
  splitDimension(box: Float64Array, allowed: Uint8Array): number {
    let best = -1;
    let bestScore = -1;
    for (let dimension = 0; dimension < allowed.length; dimension++) {
      const degree = this.degreeAlong(dimension);
      if (allowed[dimension] === 0 || degree === 0) continue;
      const score = this.variation(box, this.strides[dimension], degree) * (degree + 1);
      if (score > bestScore) {
        bestScore = score;
        best = dimension;
      }
    }
    return best;
  }

  private variation(box: Float64Array, stride: number, degree: number): number {
    const { size } = this;
    const span = stride * (degree + 1);
    let total = 0;
    for (let block = 0; block < size; block += span) {
      for (let i = block; i < block + stride * degree; i++) {
        const x = box[i];
        const y = box[size + i];
        const nextX = box[i + stride];
        const nextY = box[size + i + stride];
        const sum = Math.abs(x) + Math.abs(y) + Math.abs(nextX) + Math.abs(nextY);
        if (sum > 0) total += (Math.abs(nextX - x) + Math.abs(nextY - y)) / sum;
      }
    }
    return total;
  }

  /** True when the first polynomial is everywhere as small as its error radius: splitting cannot help any more. */
  isNoise(box: Float64Array): boolean {
    const { size, columns } = this;
    const radii = this.radiusOffset(0);
    for (let k = 0; k < columns; k++) {
      let allowed = 16 * box[radii + k];
      if (this.polynomials === 2) allowed += 16 * box[radii + columns + k];
      for (let i = k; i < size; i += columns) {
        if (Math.abs(box[i]) + Math.abs(box[size + i]) > allowed) return false;
      }
    }
    return true;
  }
}
