import { modulus } from './modulus';
import type { ReturnDifference } from './return-difference';

/** Neighbouring frequencies are never further apart than this factor. */
const LARGEST_RATIO = 1.3;
/** Reach below the smallest and above the largest pole. */
const REACH = 1e3;
/** Points closer than this, relative to themselves, are one. */
const SAME = 1e-10;
/** Room for points around one pole and for the filling between poles. */
const POINTS_PER_POLE = 64;
const POINTS_TO_FILL = 400;

/**
 * Frequencies at which a loop is looked at before anything is refined. 1 + L changes over distances
 * like that from jω to the nearest pole of either list, so the points are placed by the poles: for
 * each p, |p|, |Im p| and |Im p| ± k|Re p| with k = ½, 1, 2, 4 and then three times as far each until
 * half of |Im p| is reached; a logarithmic filling between, and three decades beyond both ends.
 * ω = 0 and ω → ∞ are left to the measures. Reusable without allocation.
 */
export class FrequencyGrid {
  /** Ascending frequencies, rad/s, the first `count` of them. */
  readonly omega: Float64Array;
  count = 0;
  private readonly around: Float64Array;

  /** @param maximumOrder largest number of poles in each of the two lists */
  constructor(maximumOrder: number) {
    this.around = new Float64Array(2 * maximumOrder * POINTS_PER_POLE);
    this.omega = new Float64Array(this.around.length + POINTS_TO_FILL);
  }

  /** Lays the grid out for the loop that is loaded. */
  build(loop: ReturnDifference): void {
    let points = 0;
    for (let k = 0; k < loop.closedCount; k++) {
      points = this.addPole(loop.closedRe, loop.closedIm, k, points);
    }
    for (let k = 0; k < loop.openCount; k++) {
      if (!nearAnother(loop, k)) {
        points = this.addPole(loop.openRe, loop.openIm, k, points);
      }
    }
    if (points === 0) {
      this.around[0] = 1;
      points = 1;
    }
    sort(this.around, points);
    this.fill(points);
  }

  private addPole(re: Float64Array, im: Float64Array, k: number, points: number): number {
    const around = this.around;
    const size = modulus(re[k], im[k]);
    if (im[k] < 0 || size === 0) {
      return points;
    }
    let at = points;
    around[at++] = size;
    const y = im[k];
    const x = Math.abs(re[k]);
    if (y === 0) {
      around[at++] = 0.5 * x;
      around[at++] = 2 * x;
      return at;
    }
    around[at++] = y;
    // An undamped pole has no width of its own; what happens beside it is set by the others.
    const width = Math.max(x, 1e-6 * y);
    let offset = 0.5 * width;
    for (let step = 0; step < 4 || (offset < 0.5 * y && at - points < POINTS_PER_POLE - 2); step++) {
      around[at++] = y + offset;
      if (offset < y) {
        around[at++] = y - offset;
      }
      offset *= step < 3 ? 2 : 3;
    }
    return at;
  }

  private fill(points: number): void {
    const { around, omega } = this;
    const room = omega.length - points;
    let filled = 0;
    let count = 0;
    let last = around[0] / REACH;
    omega[count++] = last;
    const end = around[points - 1] * REACH;
    for (let k = 0; k <= points; k++) {
      const next = k < points ? around[k] : end;
      // The two outer stretches hold no pole: twice the step, in the logarithm, will do.
      const ratio = k === 0 || k === points ? LARGEST_RATIO * LARGEST_RATIO : LARGEST_RATIO;
      while (last * ratio < next && filled < room - 2) {
        last *= ratio;
        omega[count++] = last;
        filled++;
      }
      if (next > last * (1 + SAME)) {
        last = next;
        omega[count++] = next;
      }
    }
    this.count = count;
  }
}

/** Whether the grid already has the points of open-loop pole k, laid for a closed-loop pole close by. */
function nearAnother(loop: ReturnDifference, k: number): boolean {
  const x = loop.openRe[k];
  const y = loop.openIm[k];
  const reach = 0.01 * Math.abs(x);
  for (let j = 0; j < loop.closedCount; j++) {
    if (Math.abs(loop.closedRe[j] - x) <= reach && Math.abs(loop.closedIm[j] - y) <= reach) {
      return true;
    }
  }
  return false;
}

/** Shell's sort with Ciura's gaps (Ciura 2001, FCT, LNCS 2138): in place, and fast at this size. */
function sort(values: Float64Array, count: number): void {
  for (const gap of GAPS) {
    for (let i = gap; i < count; i++) {
      const value = values[i];
      let k = i - gap;
      while (k >= 0 && values[k] > value) {
        values[k + gap] = values[k];
        k -= gap;
      }
      values[k + gap] = value;
    }
  }
}

const GAPS = [1750, 701, 301, 132, 57, 23, 10, 4, 1];
