import { bracketedZero } from './bracketed-zero';
import type { LoopSamples } from './loop-samples';
import { modulus } from './modulus';
import type { ReturnDifference } from './return-difference';

/** A grid minimum this many times above the least one cannot hide a lower value between its neighbours. */
const WORTH_REFINING = 4;

/** Bisections allowed to separate two bends between neighbouring grid points. */
const HALVINGS = 30;

/**
 * Modulus margin of a stable loop: min over ω ≥ 0, ∞ included, of |1 + L(jω)|, the distance of the
 * Nyquist curve from −1 and the inverse of the peak sensitivity. Minima on the grid are refined to the
 * zeros of d/dω log|1 + L|².
 *
 * Landau et al. 1995, Eur. J. Control 1; Åström & Hägglund, *Advanced PID Control*.
 */
export class ModulusMargin {
  value = Infinity;
  /** Frequency of the least distance, rad/s; Infinity if it is approached at infinite frequency only. */
  frequency = NaN;
  /** The level test found a lower value than the grid had shown (see `confirmModulusMargin`). */
  corrected = false;

  private readonly slope: (omega: number) => number;

  constructor(private readonly loop: ReturnDifference) {
    this.slope = (omega) => this.loop.logSlope(omega);
  }

  measure(samples: LoopSamples): void {
    const { loop } = this;
    const { omega, re, im } = samples;
    this.value = loop.atInfinity < 0 ? -loop.atInfinity : loop.atInfinity;
    this.frequency = Infinity;
    this.corrected = false;
    let least = Infinity;
    for (let k = 0; k < samples.count; k++) {
      const square = re[k] * re[k] + im[k] * im[k];
      if (square < least) {
        least = square;
      }
    }
    const worth = least * WORTH_REFINING * WORTH_REFINING;
    let before = Infinity;
    let here = samples.count > 0 ? re[0] * re[0] + im[0] * im[0] : Infinity;
    for (let k = 0; k < samples.count; k++) {
      const next = k + 1 < samples.count ? re[k + 1] * re[k + 1] + im[k + 1] * im[k + 1] : Infinity;
      if (here <= before && here <= next && here <= worth) {
        this.offer(modulus(re[k], im[k]), omega[k]);
        this.refine(
          k > 0 ? omega[k - 1] : omega[k],
          omega[k],
          k + 1 < samples.count ? omega[k + 1] : omega[k],
        );
      }
      before = here;
      here = next;
    }
  }

  /** Takes a value of |1 + L| at a frequency if it is the least so far; whether it was. */
  offer(value: number, omega: number): boolean {
    if (!(value < this.value)) {
      return false;
    }
    this.value = value;
    this.frequency = omega;
    return true;
  }

  /** Refines a minimum between low and high, given a point in the middle lower than both. */
  refine(low: number, middle: number, high: number): void {
    const { slope, loop } = this;
    let best = middle;
    let atBest = slope(best);
    let end = atBest > 0 ? low : high;
    let atEnd = slope(end);
    // With both slopes of one sign there is more than one bend between: halve until the dip is alone.
    for (let step = 0; step < HALVINGS && atBest !== 0 && atEnd < 0 === atBest < 0; step++) {
      const half = 0.5 * (best + end);
      loop.evaluate(half);
      const square = loop.re * loop.re + loop.im * loop.im;
      loop.evaluate(best);
      if (square < loop.re * loop.re + loop.im * loop.im) {
        const from = best;
        best = half;
        atBest = slope(best);
        if (atBest > 0 === from > best) {
          end = from;
        }
      } else {
        end = half;
      }
      atEnd = slope(end);
    }
    const omega =
      atBest !== 0 && atEnd < 0 !== atBest < 0 ? bracketedZero(slope, best, end, atBest, atEnd) : best;
    loop.evaluate(omega);
    this.offer(modulus(loop.re, loop.im), omega);
  }
}
