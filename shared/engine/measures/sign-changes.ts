import { bracketedZero } from './bracketed-zero';
import type { LoopSamples } from './loop-samples';

/** Trials for a dip between grid points to reach zero. */
const PROBE_LIMIT = 14;

/**
 * Frequencies at which a real function of ω changes sign, found from its values on the grid and
 * refined to the last digits. Where three neighbouring values of one sign dip towards zero and their
 * parabola comes near it, the dip is followed to its bottom, so that two changes close together
 * between grid points are found as well. Reusable without allocation.
 */
export class SignChanges {
  /** Frequencies of the changes found, rad/s, the first `count` of them, ascending but for dips. */
  readonly omega: Float64Array;
  count = 0;
  /** Values on the grid, to be filled in before `find`; 0 marks a value not told from rounding. */
  readonly values: Float64Array;

  constructor(
    samples: LoopSamples,
    private readonly f: (omega: number) => number,
  ) {
    this.values = new Float64Array(samples.omega.length);
    this.omega = new Float64Array(2 * samples.omega.length);
  }

  find(samples: LoopSamples): void {
    const { values } = this;
    const { omega } = samples;
    this.count = 0;
    let before = -1;
    let last = -1;
    for (let k = 0; k < samples.count; k++) {
      const value = values[k];
      if (value === 0) {
        continue;
      }
      if (last >= 0) {
        if (value < 0 !== values[last] < 0) {
          this.add(omega[last], omega[k], values[last], value);
          before = -1;
          last = k;
          continue;
        }
        if (
          before >= 0 &&
          Math.abs(values[last]) <= Math.abs(values[before]) &&
          Math.abs(values[last]) < Math.abs(value)
        ) {
          this.followDip(omega, before, last, k);
        }
      }
      before = last;
      last = k;
    }
  }

  private add(low: number, high: number, atLow: number, atHigh: number): void {
    this.omega[this.count++] = bracketedZero(this.f, low, high, atLow, atHigh);
  }

  private followDip(omega: Float64Array, before: number, middle: number, after: number): void {
    const { values } = this;
    const sign = values[middle] < 0 ? -1 : 1;
    let a = omega[before];
    let b = omega[middle];
    let c = omega[after];
    let fa = sign * values[before];
    let fb = sign * values[middle];
    let fc = sign * values[after];
    for (let probe = 0; probe < PROBE_LIMIT; probe++) {
      // Vertex of the parabola through the three points, relative to the middle one.
      const left = (fb - fa) / (b - a);
      const right = (fc - fb) / (c - b);
      const curvature = (right - left) / (c - a);
      const slope = left + curvature * (b - a);
      let x = b - slope / (2 * curvature);
      const bottom = fb - (slope * slope) / (4 * curvature);
      if (!(bottom < (probe < 2 ? 0.6 : 0.1) * fb)) {
        return;
      }
      if (!(x > a && x < c) || Math.abs(x - b) < 1e-3 * (c - a)) {
        x = b - a > c - b ? b - 0.1 * (b - a) : b + 0.1 * (c - b);
      }
      const fx = sign * this.f(x);
      if (fx < 0) {
        this.add(omega[before], x, values[before], sign * fx);
        this.add(x, omega[after], sign * fx, values[after]);
        return;
      }
      if (fx < fb) {
        if (x < b) {
          c = b;
          fc = fb;
        } else {
          a = b;
          fa = fb;
        }
        b = x;
        fb = fx;
      } else if (x < b) {
        a = x;
        fa = fx;
      } else {
        c = x;
        fc = fx;
      }
    }
  }
}
