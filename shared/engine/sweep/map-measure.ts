import type { MapMeasure } from '../../contracts';
import type { LoopProbe } from '../contact/loop-probe';
import { measureAt } from '../contact/requirement-value';
import type { ComposedRequirement } from '../study';

/** Decay rate that counts as the limit of stability in `closest`: this share of the nominal one. */
const STABILITY_SHARE = 0.01;

export interface MapMeasureContext {
  readonly requirements: readonly ComposedRequirement[];
  /** Decay rate at the nominal point, 1/s. */
  readonly nominalDecayRate: number;
  /** Visits the point with a law's probe, once per point. */
  readonly visit: (law: number) => LoopProbe;
}

/** The law at which a map's margin is read: that of the first requirement of this measure, else the first law. */
export function lawOfMeasure(
  measure: MapMeasure,
  requirements: readonly ComposedRequirement[],
  laws: number,
): number {
  const named = requirements.find((requirement) => requirement.measure === measure);
  return named?.law ?? (laws > 0 ? 0 : -1);
}

/**
 * The value of one cell; NaN where the measure has none (a margin of an unstable loop), Infinity where it is
 * unlimited.
 *
 * `closest` is the least ratio of measure to limit over the requirements with a limit above 0. Stability counts by
 * the ratio of the decay rate to 1 % of the nominal one: where that is at least 1, stability is no concern and says
 * no more than 1, which matters only if nothing else is required; in unstable cells the ratio is negative and is
 * the value.
 */
export function mapValue(measure: MapMeasure, law: number, context: MapMeasureContext): number {
  if (measure === 'closest') return closest(context);
  const probe = context.visit(law);
  if (measure === 'delayMargin') {
    if (!probe.regular || !(probe.measures.decayRate > 0)) return NaN;
    return probe.withMargins()?.delayMargin().value ?? NaN;
  }
  return measureAt(probe, measure) ?? NaN;
}

function closest({ requirements, nominalDecayRate, visit }: MapMeasureContext): number {
  const probe = visit(requirements[0]?.law ?? -1);
  if (!probe.regular) return NaN;
  const rate = probe.measures.decayRate;
  const scale = STABILITY_SHARE * Math.abs(nominalDecayRate);
  const stability = scale > 0 ? rate / scale : rate;
  if (!(rate > 0)) return stability;
  let least = Infinity;
  for (const { measure, limit, law } of requirements) {
    if (measure === 'stability' || !(limit > 0)) continue;
    const value = measureAt(visit(law), measure);
    least = Math.min(least, value === null ? Infinity : value / limit);
  }
  if (stability < 1) return Math.min(least, stability);
  return least === Infinity ? 1 : least;
}
