import { FrequencyGrid } from './frequency-grid';
import type { ReturnDifference } from './return-difference';

/** 1 + L(jω) on the frequency grid, shared by all frequency measures of one loop. */
export class LoopSamples {
  readonly omega: Float64Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
  count = 0;
  private readonly grid: FrequencyGrid;

  constructor(maximumOrder: number) {
    this.grid = new FrequencyGrid(maximumOrder);
    const room = this.grid.omega.length + 1;
    this.omega = new Float64Array(room);
    this.re = new Float64Array(room);
    this.im = new Float64Array(room);
  }

  /**
   * Evaluates the loop on a grid of its own, ω = 0 first. Frequencies exactly on a pole of L have no
   * value and are left out; an integrator thereby takes ω = 0 away.
   */
  take(loop: ReturnDifference): void {
    this.grid.build(loop);
    this.count = 0;
    this.add(loop, 0);
    for (let k = 0; k < this.grid.count; k++) {
      this.add(loop, this.grid.omega[k]);
    }
  }

  private add(loop: ReturnDifference, omega: number): void {
    loop.evaluate(omega);
    if (loop.re - loop.re === 0 && loop.im - loop.im === 0) {
      const k = this.count++;
      this.omega[k] = omega;
      this.re[k] = loop.re;
      this.im[k] = loop.im;
    }
  }
}
