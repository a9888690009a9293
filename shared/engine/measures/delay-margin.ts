import { atan2 } from '../../expressions/elementary';
import type { GainCrossovers } from './gain-crossovers';
import type { ReturnDifference } from './return-difference';

const TWO_PI = 6.283185307179586;

/**
 * Delay margin of a stable loop: the least extra delay T in the loop that puts a pole on the imaginary
 * axis, min θ/ω over the gain crossovers, θ = arg(−L(jω)) in [0, 2π) the lag that turns L onto −1;
 * s; Infinity when unlimited. Where |L(j∞)| ≥ 1 any delay at all brings in unstable poles: 0.
 *
 * Nyquist's criterion with L(s)e^{−sT}; Michiels & Niculescu 2007, *Stability and Stabilization of
 * Time-Delay Systems*, for the case of large gain at infinite frequency.
 */
export class DelayMargin {
  /** s; Infinity when unlimited. */
  value = Infinity;
  /** The crossover that limits it, rad/s, Infinity in the case of large gain there; NaN when unlimited. */
  frequency = NaN;

  measure(loop: ReturnDifference, crossovers: GainCrossovers): void {
    this.value = Infinity;
    this.frequency = NaN;
    if (Math.abs(loop.atInfinity - 1) >= 1) {
      this.value = 0;
      this.frequency = Infinity;
      return;
    }
    for (let k = 0; k < crossovers.count; k++) {
      const omega = crossovers.omega[k];
      loop.evaluate(omega);
      let lag = atan2(-loop.im, 1 - loop.re);
      if (lag < 0) {
        lag += TWO_PI;
      }
      if (lag / omega < this.value) {
        this.value = lag / omega;
        this.frequency = omega;
      }
    }
  }
}
