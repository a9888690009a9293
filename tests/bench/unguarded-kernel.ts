import type { TensorShape } from '../../shared/engine/polynomial/bernstein-kernel';

/**
 * The exclusion test and the splitting of `BernsteinKernel` with no error radii: neither kept, nor grown by a split,
 * nor tested. For measuring what the radii cost; it proves nothing. A box holds the real parts of a polynomial, then
 * its imaginary parts, and for a disc the second polynomial behind the first.
 */
export class UnguardedKernel {
  readonly size: number;
  readonly length: number;
  private readonly columns: number;
  private readonly strides: number[];
  private cosine = 0;
  private sine = 0;

  constructor(readonly shape: TensorShape) {
    this.columns = shape.degree + 1;
    let stride = this.columns;
    this.strides = [];
    for (let i = shape.degrees.length - 1; i >= 0; i--) {
      this.strides[i] = stride;
      stride *= shape.degrees[i] + 1;
    }
    this.strides.push(1);
    this.size = stride * shape.sheets;
    this.length = (shape.discRadius === undefined ? 2 : 4) * this.size;
  }

  excludes(box: Float64Array): boolean {
    return this.shape.discRadius === undefined ? this.excludesZero(box) : this.excludesDisc(box);
  }

  private excludesZero(box: Float64Array): boolean {
    const { size } = this;
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
    for (let i = 0; i < size; i++) {
      if (!(cosine * box[i] + sine * box[size + i] > 0)) return false;
    }
    return true;
  }

  private excludesDisc(box: Float64Array): boolean {
    const { size } = this;
    const beta = this.shape.discRadius ?? 0;
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
    for (let i = 0; i < size; i++) {
      const dx = box[second + i];
      const dy = box[second + size + i];
      const disc = beta * Math.sqrt(dx * dx + dy * dy);
      if (!(cosine * box[i] + sine * box[size + i] - disc > 0)) return false;
    }
    return true;
  }

  private bisect(leftX: number, leftY: number, rightX: number, rightY: number): boolean {
    const left = Math.sqrt(leftX * leftX + leftY * leftY);
    const right = Math.sqrt(rightX * rightX + rightY * rightY);
    const x = leftX / left + rightX / right;
    const y = leftY / left + rightY / right;
    const length = Math.sqrt(x * x + y * y);
    if (!(length > 1e-14)) return false;
    this.cosine = x / length;
    this.sine = y / length;
    return true;
  }

  split(box: Float64Array, right: Float64Array, dimension: number): void {
    right.set(box);
    if (dimension === this.shape.degrees.length) this.splitTime(box, right);
    else this.splitVariable(box, right, dimension);
  }

  private splitVariable(box: Float64Array, right: Float64Array, dimension: number): void {
    const degree = this.shape.degrees[dimension];
    const stride = this.strides[dimension];
    const span = stride * (degree + 1);
    for (let block = 0; block < this.length; block += span) {
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

  private splitTime(box: Float64Array, right: Float64Array): void {
    const { degree } = this.shape;
    for (let level = 1; level <= degree; level++) {
      for (let row = 0; row < this.length; row += this.columns) {
        for (let i = degree; i >= level; i--) box[row + i] = 0.5 * (box[row + i - 1] + box[row + i]);
        right[row + degree - level] = box[row + degree];
      }
    }
  }

  splitDimension(box: Float64Array, allowed: Uint8Array): number {
    let best = -1;
    let bestScore = -1;
    for (let dimension = 0; dimension < allowed.length; dimension++) {
      const isTime = dimension === this.shape.degrees.length;
      const degree = isTime ? this.shape.degree : this.shape.degrees[dimension];
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
}
