import { cos, sin } from '../../expressions';
import { UNIT_ROUNDOFF } from './rounding';
import type { TensorShape } from './tensor-shape';

/** More than a modulus can lose where the squares under its root fall below the smallest double: 2^−537. */
const UNDERFLOWN_SQUARE = 1e-161;
/** The disc of a modulus margin is cut into this many triangles where one direction does not do for all of it. */
const SECTORS = 16;

/**
 * Shows that a box keeps away from the boundary: its values lie in the convex hull of its Bernstein coefficients, so
 * one direction e^{jφ} with Re(e^{−jφ} b_i) above the error radius for every i excludes 0 from all of it. The
 * direction is found in one pass, as the bisector of the coefficients' angular hull.
 *
 * Convex hull property: Garloff 1993; Zettler & Garloff, IEEE TAC 43 (1998) 425–431.
 */
export class ExclusionTest {
  private readonly beta: number;
  private readonly isDisc: boolean;
  /** Ends of the pieces between the two sheets: 0, the cuts, 1. */
  private readonly nodes: readonly number[];
  /** Corners of a regular polygon around the disc of radius β, the first one again at the end. */
  private readonly corners: readonly { readonly re: number; readonly im: number }[];
  private cosine = 0;
  private sine = 0;

  /**
   * @param size coefficients of one polynomial
   * @param columns coefficients along t
   */
  constructor(
    private readonly size: number,
    private readonly columns: number,
    { sheets, cuts, discRadius }: Pick<TensorShape, 'sheets' | 'cuts' | 'discRadius'>,
  ) {
    this.isDisc = discRadius !== undefined;
    this.beta = discRadius ?? 0;
    this.nodes = [0, ...(sheets === 2 ? (cuts ?? []) : []), 1];
    // A little larger than the polygon itself, so that its rounded corners still hold the disc.
    const reach = (this.beta / cos(Math.PI / SECTORS)) * (1 + 1e-12);
    this.corners = Array.from({ length: SECTORS + 1 }, (_, i) => {
      const angle = (2 * Math.PI * (i % SECTORS)) / SECTORS;
      return { re: reach * cos(angle), im: reach * sin(angle) };
    });
  }

  /** True when the whole box, laid out as in `BernsteinKernel`, is excluded; false proves nothing. */
  excludes(box: Float64Array): boolean {
    if (this.excludesJointly(box)) return true;
    return this.isDisc ? this.excludesSectors(box) : this.excludesHalves(box, 0, this.nodes.length - 1);
  }

  /** The same by one direction for all of the sheets or of the disc, without cutting them. */
  excludesJointly(box: Float64Array): boolean {
    return this.isDisc ? this.excludesDisc(box) : this.excludesZero(box);
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

  /**
   * abs(a) > β abs(d) holds where a + Δd ≠ 0 for every abs(Δ) ≤ β. Cut into triangles with a corner at 0, the disc
   * of Δ needs a direction for each triangle only: a + Δd is affine in Δ, so the values at its three corners carry
   * the whole triangle.
   */
  private excludesSectors(box: Float64Array): boolean {
    if (!this.keepsOffDisc(box)) return false;
    for (let i = 0; i < SECTORS; i++) if (!this.excludesTriangle(box, i)) return false;
    return true;
  }

  /** Whether every coefficient lies outside of its disc: without that no cut can help. */
  private keepsOffDisc(box: Float64Array): boolean {
    const { size, beta } = this;
    const second = 2 * size;
    for (let i = 0; i < size; i++) {
      const a = box[i] * box[i] + box[size + i] * box[size + i];
      const d = box[second + i] * box[second + i] + box[second + size + i] * box[second + size + i];
      if (!(a > beta * beta * d)) return false;
    }
    return true;
  }

  private excludesTriangle(box: Float64Array, sector: number): boolean {
    const { size, columns, corners } = this;
    const second = 2 * size;
    const from = corners[sector];
    const to = corners[sector + 1];
    let leftX = box[0];
    let leftY = box[size];
    let rightX = leftX;
    let rightY = leftY;
    for (let i = 0; i < size; i++) {
      const dx = box[second + i];
      const dy = box[second + size + i];
      for (let corner = 0; corner < 3; corner++) {
        const re = corner === 0 ? 0 : corner === 1 ? from.re : to.re;
        const im = corner === 0 ? 0 : corner === 1 ? from.im : to.im;
        const x = box[i] + (re * dx - im * dy);
        const y = box[size + i] + (re * dy + im * dx);
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
    const reach = Math.max(Math.abs(from.re) + Math.abs(from.im), Math.abs(to.re) + Math.abs(to.im));
    const radii = 4 * size;
    for (let row = 0; row < size; row += columns) {
      for (let k = 0; k < columns; k++) {
        const i = row + k;
        const dx = box[second + i];
        const dy = box[second + size + i];
        const sum = Math.abs(box[i]) + Math.abs(box[size + i]) + reach * (Math.abs(dx) + Math.abs(dy));
        const radius = box[radii + k] + reach * box[radii + columns + k];
        const slack = (radius + 8 * UNIT_ROUNDOFF * sum) * (1 + 1e-6);
        // Along the direction: a's part, and what Δd adds at the two outer corners.
        const a = cosine * box[i] + sine * box[size + i];
        const first = a + (cosine * (from.re * dx - from.im * dy) + sine * (from.re * dy + from.im * dx));
        const last = a + (cosine * (to.re * dx - to.im * dy) + sine * (to.re * dy + to.im * dx));
        if (!(a > slack && first > slack && last > slack)) return false;
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
}
