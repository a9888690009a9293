import { dampingRatio } from './damping-ratio';
import { decayRate } from './decay-rate';
import { DelayMargin } from './delay-margin';
import { GainCrossovers } from './gain-crossovers';
import { GainMargin } from './gain-margin';
import { LoopSamples } from './loop-samples';
import { ModulusConfirmation } from './modulus-confirmation';
import { ModulusMargin } from './modulus-margin';
import { PhaseMargin } from './phase-margin';
import { ReturnDifference } from './return-difference';

/** A gain margin as one number is never more than this. */
const LARGEST_GAIN_FACTOR = 1000;

/** All measures of one loop at one parameter point; null for an unlimited margin and for every margin of an unstable loop. */
export interface MeasureValues {
  stable: boolean;
  /** 1/s */
  decayRate: number;
  dampingRatio: number;
  gainMargin: { up: number | null; down: number | null } | null;
  /** rad */
  phaseMargin: number | null;
  /** s */
  delayMargin: number | null;
  modulusMargin: number | null;
}

/**
 * The measures of a closed loop at one parameter point, each worked out when first asked for after
 * `load`. Poles λ of the closed loop, μ with this loop broken, 1 + L = c₀ Π(s − λ)/Π(s − μ). No
 * allocation but in `values`. The frequency margins mean something for stable loops only.
 */
export class LoopMeasures {
  readonly loop: ReturnDifference;
  /** Whether all closed-loop poles lie left of the axis, or what `load` was told. */
  stable = false;
  /** min over λ of −Re λ, 1/s. */
  decayRate = NaN;
  /** min over λ of −Re λ/|λ|. */
  dampingRatio = NaN;

  private readonly samples: LoopSamples;
  private readonly gain: GainMargin;
  private readonly crossovers: GainCrossovers;
  private readonly phase = new PhaseMargin();
  private readonly delay = new DelayMargin();
  private readonly modulus: ModulusMargin;
  private readonly confirmation: ModulusConfirmation;
  private sampled = false;
  private crossed = false;
  private gainKnown = false;
  private phaseKnown = false;
  private delayKnown = false;
  private modulusKnown = false;

  /** @param maximumOrder largest number of poles on either side */
  constructor(maximumOrder: number) {
    this.loop = new ReturnDifference(maximumOrder);
    this.samples = new LoopSamples(maximumOrder);
    this.gain = new GainMargin(this.loop, this.samples);
    this.crossovers = new GainCrossovers(this.loop, this.samples);
    this.modulus = new ModulusMargin(this.loop);
    this.confirmation = new ModulusConfirmation(maximumOrder);
  }

  /**
   * Takes a new loop; arguments as for `ReturnDifference.load`.
   *
   * @param stable what an exact count says, where the caller has one; else the signs of the real parts
   * @throws RangeError more poles than `maximumOrder`
   */
  load(
    closedRe: Float64Array,
    closedIm: Float64Array,
    closedCount: number,
    openRe: Float64Array,
    openIm: Float64Array,
    openCount: number,
    leadingRatio: number,
    stable?: boolean,
  ): void {
    this.loop.load(closedRe, closedIm, closedCount, openRe, openIm, openCount, leadingRatio);
    this.decayRate = decayRate(closedRe, closedCount);
    this.dampingRatio = dampingRatio(closedRe, closedIm, closedCount);
    this.stable = stable ?? this.decayRate > 0;
    this.sampled = false;
    this.crossed = false;
    this.gainKnown = false;
    this.phaseKnown = false;
    this.delayKnown = false;
    this.modulusKnown = false;
  }

  gainMargin(): GainMargin {
    if (!this.gainKnown) {
      this.sample();
      this.gain.measure(this.samples);
      this.gainKnown = true;
    }
    return this.gain;
  }

  /** Gain margin as one number for maps and ratios: min(up, 1/down), at most 1000. */
  gainFactor(): number {
    const { up, down } = this.gainMargin();
    return Math.min(up, 1 / down, LARGEST_GAIN_FACTOR);
  }

  phaseMargin(): PhaseMargin {
    if (!this.phaseKnown) {
      this.cross();
      this.phase.measure(this.loop, this.crossovers);
      this.phaseKnown = true;
    }
    return this.phase;
  }

  delayMargin(): DelayMargin {
    if (!this.delayKnown) {
      this.cross();
      this.delay.measure(this.loop, this.crossovers);
      this.delayKnown = true;
    }
    return this.delay;
  }

  modulusMargin(): ModulusMargin {
    if (!this.modulusKnown) {
      this.sample();
      this.modulus.measure(this.samples);
      this.modulusKnown = true;
    }
    return this.modulus;
  }

  /** The modulus margin after the level test; for points that are reported. */
  confirmedModulusMargin(): ModulusMargin {
    const margin = this.modulusMargin();
    this.confirmation.confirm(this.loop, margin);
    return margin;
  }

  /** All measures as a report shows them, the modulus margin confirmed. */
  values(): MeasureValues {
    const { stable } = this;
    const base = { stable, decayRate: this.decayRate, dampingRatio: this.dampingRatio };
    if (!stable) {
      return { ...base, gainMargin: null, phaseMargin: null, delayMargin: null, modulusMargin: null };
    }
    const { up, upFrequency, down, downFrequency } = this.gainMargin();
    return {
      ...base,
      gainMargin: {
        up: Number.isNaN(upFrequency) ? null : up,
        // A factor of 0 is no loop at all: the gain may be lowered without limit.
        down: Number.isNaN(downFrequency) || down === 0 ? null : down,
      },
      phaseMargin: this.phaseMargin().value,
      delayMargin: finiteOrNull(this.delayMargin().value),
      modulusMargin: finiteOrNull(this.confirmedModulusMargin().value),
    };
  }

  private sample(): void {
    if (!this.sampled) {
      this.samples.take(this.loop);
      this.sampled = true;
    }
  }

  private cross(): void {
    if (!this.crossed) {
      this.sample();
      this.crossovers.find(this.samples);
      this.crossed = true;
    }
  }
}

function finiteOrNull(value: number): number | null {
  return value - value === 0 ? value : null;
}
