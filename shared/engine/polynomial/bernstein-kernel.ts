import { UNIT_ROUNDOFF } from './rounding';

/** More than a modulus can lose where the squares under its root fall below the smallest double: 2^−537. */
const UNDERFLOWN_SQUARE = 1e-161;

/** Shape of one or two complex polynomials in m variables and t, in tensor Bernstein form. */
export interface TensorShape {
  /** Degree in each variable. */
  readonly degrees: readonly number[];
  /** Degree in t. */
  readonly degree: number;
  /** End values of a parameter of degree one that is never split (κ or τ): the slowest index. */
  readonly sheets: number;
  /**
   * Where the way from the first sheet (0) to the second (1) may be cut, rising. Each piece needs a direction of its
   * own only, so that a long way does not ask for small boxes. Left out: none.
   */
  readonly cuts?: readonly number[] | undefined;
  /** Undefined: one polynomial, 0 is to be excluded. β: two, abs(first) > β abs(second) is to be shown. */
  readonly discRadius: number | undefined;
}

/**
 * The exclusion test and the splitting of boxes on flat arrays. A box holds, for each polynomial, the real parts,
 * the imaginary parts (`size` each; t fastest, then the last variable, sheets slowest) and one error radius per
 * power of t: every stored coefficient of column k is within radius[k] of the true one.
 *
 * Convex hull property of the Bernstein form: Garloff 1993; Zettler & Garloff, IEEE TAC 43 (1998) 425–431.
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
  private readonly beta: number;
  /** Ends of the pieces between the two sheets: 0, the cuts, 1. */
  private readonly nodes: readonly number[];
  private cosine = 0;
  private sine = 0;

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
    this.beta = shape.discRadius ?? 0;
    this.nodes = [0, ...(shape.sheets === 2 ? (shape.cuts ?? []) : []), 1];
    this.length = this.polynomials * (2 * this.size + this.columns);
    this.largest = new Float64Array(this.columns);
  }

  /** Where the radii of one polynomial start. */
  radiusOffset(polynomial: number): number {
    return this.polynomials * 2 * this.size + polynomial * this.columns;
  }

  /** Degree along a dimension; dimension m is t. */
  degreeAlong(dimension: number): number {
    return dimension === this.shape.degrees.length ? this.shape.degree : this.shape.degrees[dimension];
  }

  /** True when the whole box is shown to keep away from the boundary; false proves nothing. */
  excludes(box: Float64Array): boolean {
    if (this.polynomials === 2) return this.excludesDisc(box);
    return this.excludesZero(box) || this.excludesHalves(box, 0, this.nodes.length - 1);
  }

  private excludesZero(box: Float64Array): boolean {
    const { size, columns } = this;
    let leftX = box[0];
    let leftY = box[size];
    let rightX = leftX;
    let rightY = leftY;
    for (let i = 1; i < size; i++) {
      const x = box[i];
      const y = box[size + i];
      const beyondRight = rightX * y - rightY * x < 0;
      if (leftX * y - leftY * x > 0) {
        if (beyondRight) return false;
        leftX = x;
        leftY = y;
      } else if (beyondRight) {
        rightX = x;
        rightY = y;
      }
    }
    if (!this.bisect(leftX, leftY, rightX, rightY)) return false;
    const { cosine, sine } = this;
    const radii = 2 * size;
    for (let row = 0; row < size; row += columns) {
      for (let k = 0; k < columns; k++) {
        const x = cosine * box[row + k];
        const y = sine * box[size + row + k];
        const slack = box[radii + k] + 4 * UNIT_ROUNDOFF * (Math.abs(x) + Math.abs(y));
        if (!(x + y > slack * (1 + 1e-6))) return false;
      }
    }
    return true;
  }

  /** Excludes 0 from each half of the way between two nodes, or from the quarters where a half is too long, … */
  private excludesHalves(box: Float64Array, first: number, last: number): boolean {
    if (last - first < 2) return false;
    const middle = (first + last) >> 1;
    return this.excludesPiece(box, first, middle) && this.excludesPiece(box, middle, last);
  }

  private excludesPiece(box: Float64Array, first: number, last: number): boolean {
    return (
      this.excludesBetween(box, this.nodes[first], this.nodes[last]) || this.excludesHalves(box, first, last)
    );
  }

  /** `excludesZero` for the part of the way between two places; the part's ends are combinations of the sheets. */
  private excludesBetween(box: Float64Array, from: number, to: number): boolean {
    const { size, columns } = this;
    const half = size >> 1;
    let leftX = (1 - from) * box[0] + from * box[half];
    let leftY = (1 - from) * box[size] + from * box[size + half];
    let rightX = leftX;
    let rightY = leftY;
    for (let i = 0; i < half; i++) {
      for (let end = 0; end < 2; end++) {
        const place = end === 0 ? from : to;
        const x = (1 - place) * box[i] + place * box[half + i];
        const y = (1 - place) * box[size + i] + place * box[size + half + i];
        const beyondRight = rightX * y - rightY * x < 0;
        if (leftX * y - leftY * x > 0) {
          if (beyondRight) return false;
          leftX = x;
          leftY = y;
        } else if (beyondRight) {
          rightX = x;
          rightY = y;
        }
      }
    }
    if (!this.bisect(leftX, leftY, rightX, rightY)) return false;
    const { cosine, sine } = this;
    const radii = 2 * size;
    for (let row = 0; row < half; row += columns) {
      for (let k = 0; k < columns; k++) {
        const i = row + k;
        const firstX = cosine * box[i];
        const firstY = sine * box[size + i];
        const secondX = cosine * box[half + i];
        const secondY = sine * box[size + half + i];
        const total = Math.abs(firstX) + Math.abs(firstY) + Math.abs(secondX) + Math.abs(secondY);
        // A combination errs by no more than its sheets; a product and two sums are rounded at either end.
        const slack = (box[radii + k] + 8 * UNIT_ROUNDOFF * total) * (1 + 1e-6);
        const first = firstX + firstY;
        const second = secondX + secondY;
        if (!((1 - from) * first + from * second > slack)) return false;
        if (!((1 - to) * first + to * second > slack)) return false;
      }
    }
    return true;
  }

  /**
   * The disc of radius β abs(d_i) around a_i must lie beyond a line for every i; its extreme directions are the
   * tangents a_i (√(abs(a_i)² − β² abs(d_i)²) ± jβ abs(d_i)).
   */
  private excludesDisc(box: Float64Array): boolean {
    const { size, columns, beta } = this;
    const second = 2 * size;
    let leftX = 0;
    let leftY = 0;
    let rightX = 0;
    let rightY = 0;
    for (let i = 0; i < size; i++) {
      const ax = box[i];
      const ay = box[size + i];
      const dx = box[second + i];
      const dy = box[second + size + i];
      const discSquared = beta * beta * (dx * dx + dy * dy);
      const rest = ax * ax + ay * ay - discSquared;
      if (!(rest > 0)) return false;
      const reach = Math.sqrt(rest);
      const disc = Math.sqrt(discSquared);
      const firstX = ax * reach - ay * disc;
      const firstY = ay * reach + ax * disc;
      const secondX = ax * reach + ay * disc;
      const secondY = ay * reach - ax * disc;
      if (i === 0) {
        leftX = firstX;
        leftY = firstY;
        rightX = secondX;
        rightY = secondY;
        continue;
      }
      const firstBeyondLeft = leftX * firstY - leftY * firstX > 0;
      const secondBeyondRight = rightX * secondY - rightY * secondX < 0;
      if (firstBeyondLeft && rightX * firstY - rightY * firstX < 0) return false;
      if (secondBeyondRight && leftX * secondY - leftY * secondX > 0) return false;
      if (firstBeyondLeft) {
        leftX = firstX;
        leftY = firstY;
      }
      if (secondBeyondRight) {
        rightX = secondX;
        rightY = secondY;
      }
    }
    if (!this.bisect(leftX, leftY, rightX, rightY)) return false;
    const { cosine, sine } = this;
    const radii = 4 * size;
    for (let row = 0; row < size; row += columns) {
      for (let k = 0; k < columns; k++) {
        const i = row + k;
        const x = cosine * box[i];
        const y = sine * box[size + i];
        const dx = box[second + i];
        const dy = box[second + size + i];
        const modulus = Math.sqrt(dx * dx + dy * dy) + UNDERFLOWN_SQUARE;
        const disc = beta * (modulus + box[radii + columns + k]) * (1 + 8 * UNIT_ROUNDOFF);
        const slack = box[radii + k] + 4 * UNIT_ROUNDOFF * (Math.abs(x) + Math.abs(y) + disc);
        if (!(x + y - disc > slack * (1 + 1e-6))) return false;
      }
    }
    return true;
  }

  /** Sets the unit direction that bisects the angle from the right to the left edge; false when they are opposed. */
  private bisect(leftX: number, leftY: number, rightX: number, rightY: number): boolean {
    // Divided by their larger part first: the squares of small vectors would be 0.
    const leftSize = Math.max(Math.abs(leftX), Math.abs(leftY));
    const rightSize = Math.max(Math.abs(rightX), Math.abs(rightY));
    const x1 = leftX / leftSize;
    const y1 = leftY / leftSize;
    const x2 = rightX / rightSize;
    const y2 = rightY / rightSize;
    const left = Math.sqrt(x1 * x1 + y1 * y1);
    const right = Math.sqrt(x2 * x2 + y2 * y2);
    const x = x1 / left + x2 / right;
    const y = y1 / left + y2 / right;
    const length = Math.sqrt(x * x + y * y);
    if (!(length > 1e-14)) return false;
    this.cosine = x / length;
    this.sine = y / length;
    return true;
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
