import type { NominalAnswer } from '../../contracts';
import type { LoopProbe } from '../contact/loop-probe';
import { sortPoles } from '../linalg';

/**
 * The closed loop at the nominal point.
 * @param stable what an exact count of poles says; undefined where there is none
 */
export function nominalAnswer(
  probe: LoopProbe,
  nominal: ArrayLike<number>,
  stable: boolean | undefined,
): NominalAnswer | undefined {
  probe.visit(nominal);
  const measures = probe.withMargins();
  if (measures === undefined) return undefined;
  const { order, closedRe, closedIm } = probe.poles;
  const re = closedRe.slice(0, order);
  const im = closedIm.slice(0, order);
  sortPoles(re, im, order);
  if (stable !== undefined) measures.stable = stable;
  const values = measures.values();
  return {
    stable: values.stable,
    poles: Array.from(re, (real, i) => ({ re: real + 0, im: im[i] + 0 })),
    // Where rounding and the exact count disagree about the sign, the count is right and the rate is 0.
    decayRate: values.stable ? Math.max(values.decayRate, 0) : Math.min(values.decayRate, 0),
    dampingRatio: values.stable ? Math.max(values.dampingRatio, 0) : Math.min(values.dampingRatio, 0),
    gainMargin: values.gainMargin,
    phaseMargin: values.phaseMargin,
    delayMargin: values.delayMargin,
    modulusMargin: values.modulusMargin,
  };
}
