import { atan2 } from '../../expressions/elementary';
import type { GainCrossovers } from './gain-crossovers';
import type { ReturnDifference } from './return-difference';

const PI = 3.141592653589793;

/**
 * Phase margin of a stable loop: the least turn of L, of either sign, at any gain crossover, that puts
 * a pole on the imaginary axis there: min |arg(−L(jω))| over |L(jω)| = 1, rad; π without a crossover.
 *
 * Bode 1945, *Network Analysis and Feedback Amplifier Design*, ch. XVIII.
 */
export class PhaseMargin {
  /** rad, from 0 to π. */
  value = PI;
  /** The crossover that limits it, rad/s; NaN without a crossover. */
  frequency = NaN;

  measure(loop: ReturnDifference, crossovers: GainCrossovers): void {
    this.value = PI;
    this.frequency = NaN;
    for (let k = 0; k < crossovers.count; k++) {
      const omega = crossovers.omega[k];
      loop.evaluate(omega);
      const turn = Math.abs(atan2(-loop.im, 1 - loop.re));
      if (turn < this.value || this.frequency !== this.frequency) {
        this.value = turn;
        this.frequency = omega;
      }
    }
  }
}
