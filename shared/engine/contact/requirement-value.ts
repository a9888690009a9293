import type { Measure } from '../../contracts';
import type { LoopProbe } from './loop-probe';

/** Decay rates are brought to this scale (1/s) where an unstable point needs a number at all. */
const UNSTABLE_SCALE = 1;

/** A pole whose modulus is this share of the largest one is not told from a pole at 0. */
const AT_ORIGIN = 1e-13;

/**
 * How far a requirement is kept at a visited point: 0 at the limit, negative where it fails, in units of the limit
 * where that is positive. Used to steer a search; every claim made from it is certified apart.
 */
export function requirementValue(probe: LoopProbe, measure: Measure, limit: number): number {
  if (!probe.regular) return -2;
  const { measures } = probe;
  const rate = measures.decayRate;
  switch (measure) {
    case 'stability':
      return rate;
    case 'decayRate':
      return rate - limit;
    case 'dampingRatio':
      return measures.dampingRatio - limit;
    default:
      if (!(rate > 0)) return -1 + Math.max(-1, rate / UNSTABLE_SCALE / (1 + Math.abs(rate)));
      return marginOf(probe, measure) / limit - 1;
  }
}

/** The margin at a visited, stable point; unlimited ones are Infinity, a gain margin is one factor, at most 1000. */
function marginOf(probe: LoopProbe, measure: Measure): number {
  const measures = probe.withMargins();
  if (measures === undefined) return 0;
  if (measure === 'gainMargin') return measures.gainFactor();
  if (measure === 'phaseMargin') return measures.phaseMargin().value;
  return measures.modulusMargin().value;
}

/**
 * The measure itself at a visited point, for reports: null where the closed loop is unstable and a margin is asked
 * for, or where the loop has lost its order.
 */
export function measureAt(probe: LoopProbe, measure: Measure): number | null {
  if (!probe.regular) return null;
  if (measure === 'stability' || measure === 'decayRate') return probe.measures.decayRate;
  if (measure === 'dampingRatio') return probe.measures.dampingRatio;
  if (!(probe.measures.decayRate > 0)) return null;
  const value = marginOf(probe, measure);
  return Number.isFinite(value) ? value : null;
}

/**
 * The frequency at which a requirement is lost at a visited point, rad/s: the modulus of the worst pole for a damping
 * ratio, its imaginary part for stability and decay rate, the crossover for a margin; null where there is none.
 */
export function limitingFrequency(probe: LoopProbe, measure: Measure): number | null {
  if (!probe.regular) return null;
  const { closedRe, closedIm, order } = probe.poles;
  const unstable = !(probe.measures.decayRate > 0);
  if (measure === 'stability' || measure === 'decayRate' || (unstable && measure !== 'dampingRatio')) {
    let worst = 0;
    for (let i = 1; i < order; i++) if (closedRe[i] > closedRe[worst]) worst = i;
    return Math.abs(closedIm[worst]);
  }
  if (measure === 'dampingRatio') {
    let least = Infinity;
    let frequency = 0;
    let largest = 0;
    for (let i = 0; i < order; i++) largest = Math.max(largest, Math.abs(closedRe[i]), Math.abs(closedIm[i]));
    for (let i = 0; i < order; i++) {
      const size = Math.sqrt(closedRe[i] * closedRe[i] + closedIm[i] * closedIm[i]);
      // The direction of a pole at the origin is nothing but rounding.
      const modulus = size <= AT_ORIGIN * largest ? 0 : size;
      const ratio = modulus === 0 ? 0 : -closedRe[i] / modulus;
      if (ratio < least) {
        least = ratio;
        frequency = modulus;
      }
    }
    return frequency;
  }
  const measures = probe.withMargins();
  if (measures === undefined) return null;
  const frequency = marginFrequency(measures, measure);
  return Number.isFinite(frequency) ? frequency : null;
}

function marginFrequency(measures: LoopProbe['measures'], measure: Measure): number {
  if (measure === 'phaseMargin') return measures.phaseMargin().frequency;
  if (measure === 'modulusMargin') return measures.modulusMargin().frequency;
  const { up, down, upFrequency, downFrequency } = measures.gainMargin();
  return up <= 1 / down ? upFrequency : downFrequency;
}
