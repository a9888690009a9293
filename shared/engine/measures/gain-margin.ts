import type { LoopSamples } from './loop-samples';
import type { ReturnDifference } from './return-difference';
import { SignChanges } from './sign-changes';

/** Im L smaller than this, relative to 1 + |L|, is not told from the rounding of the poles. */
const NOISE = 1e-12;
/** Factors beyond this, and below its inverse, are not told from unlimited and from zero. */
const LARGEST_FACTOR = 1e9;

/**
 * Gain margin of a stable loop: the factors κ on L next to 1 at which a closed-loop pole reaches the
 * imaginary axis, that is 1 + κL(jω) = 0, κ = −1/Re L where Im L = 0 and Re L < 0, the ends ω = 0 and
 * ω → ∞ included. Poles of L on the axis itself make κ = 0 such a factor.
 *
 * Factors above 1e9 count as unlimited, below 1e−9 as 0. Nyquist 1932, Bell Syst. Tech. J. 11, 126–147.
 */
export class GainMargin {
  /** Least factor above 1; Infinity when unlimited. */
  up = Infinity;
  /** Frequency of the pole on the axis at `up`, rad/s, Infinity for one that leaves through infinity; NaN when unlimited. */
  upFrequency = NaN;
  /** Largest factor below 1, 0 or more; 0 also when unlimited, told apart by `downFrequency`. */
  down = 0;
  /** Frequency of the pole on the axis at `down`, as above; NaN when unlimited. */
  downFrequency = NaN;

  private readonly changes: SignChanges;
  private readonly loop: ReturnDifference;

  constructor(loop: ReturnDifference, samples: LoopSamples) {
    this.loop = loop;
    this.changes = new SignChanges(samples, (omega) => {
      this.loop.evaluate(omega);
      return projectedImaginary(this.loop.re, this.loop.im);
    });
  }

  /** Measures the loop given to the constructor from fresh samples of it. */
  measure(samples: LoopSamples): void {
    const { loop, changes } = this;
    this.up = Infinity;
    this.upFrequency = NaN;
    this.down = 0;
    this.downFrequency = NaN;
    for (let k = 0; k < samples.count; k++) {
      const value = projectedImaginary(samples.re[k], samples.im[k]);
      changes.values[k] = Math.abs(value) < NOISE ? 0 : value;
    }
    changes.find(samples);
    for (let k = 0; k < changes.count; k++) {
      const omega = changes.omega[k];
      loop.evaluate(omega);
      this.consider(loop.re - 1, omega);
    }
    if (samples.count > 0 && samples.omega[0] === 0) {
      this.consider(samples.re[0] - 1, 0);
    }
    this.consider(loop.atInfinity - 1, Infinity);
    if (this.downFrequency !== this.downFrequency) {
      this.considerBrokenLoop();
    }
  }

  private consider(realPart: number, omega: number): void {
    if (!(realPart < 0)) {
      return;
    }
    const factor = -1 / realPart;
    if (factor >= 1) {
      if (factor < this.up && factor <= LARGEST_FACTOR) {
        this.up = factor;
        this.upFrequency = omega;
      }
    }
    if (factor <= 1) {
      const down = factor * LARGEST_FACTOR < 1 ? 0 : factor;
      if (down > this.down || this.downFrequency !== this.downFrequency) {
        this.down = down;
        this.downFrequency = omega;
      }
    }
  }

  /** With the loop broken, κ = 0, the poles of L are the poles: those on the axis are reached there. */
  private considerBrokenLoop(): void {
    const { loop } = this;
    for (let k = 0; k < loop.openCount; k++) {
      if (Math.abs(loop.openRe[k]) <= 1e-13 * Math.abs(loop.openIm[k])) {
        this.downFrequency = Math.abs(loop.openIm[k]);
        return;
      }
    }
    if (loop.closedCount > loop.openCount) {
      this.downFrequency = Infinity;
    }
  }
}

/**
 * Im L divided by 1 + |L|²: the same signs, but bounded and continuous through poles of L on the axis,
 * as on Riemann's sphere.
 */
function projectedImaginary(re: number, im: number): number {
  const x = re - 1;
  const value = im / (1 + x * x + im * im);
  return value === value ? value : 0;
}
