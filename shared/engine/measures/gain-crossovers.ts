import type { LoopSamples } from './loop-samples';
import type { ReturnDifference } from './return-difference';
import { SignChanges } from './sign-changes';

/**
 * Gain crossovers of a loop: the frequencies at which |L(jω)| = 1, where a turn of L alone, by a phase
 * or by a delay, can carry it onto −1.
 */
export class GainCrossovers {
  private readonly changes: SignChanges;
  private readonly loop: ReturnDifference;

  constructor(loop: ReturnDifference, samples: LoopSamples) {
    this.loop = loop;
    this.changes = new SignChanges(samples, (omega) => {
      this.loop.evaluate(omega);
      return projectedSize(this.loop.re, this.loop.im);
    });
  }

  get count(): number {
    return this.changes.count;
  }

  /** Crossover frequencies, rad/s, the first `count` of them. */
  get omega(): Float64Array {
    return this.changes.omega;
  }

  /** Finds them from fresh samples of the loop given to the constructor. */
  find(samples: LoopSamples): void {
    const { changes } = this;
    for (let k = 0; k < samples.count; k++) {
      changes.values[k] = projectedSize(samples.re[k], samples.im[k]);
    }
    changes.find(samples);
  }
}

/** (|L|² − 1)/(|L|² + 1): the height on Riemann's sphere, bounded through poles of L on the axis. */
function projectedSize(re: number, im: number): number {
  const x = re - 1;
  const square = x * x + im * im;
  const value = (square - 1) / (square + 1);
  return value === value ? value : 1;
}
