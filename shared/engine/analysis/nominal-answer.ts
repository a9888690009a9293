import type { NominalAnswer } from '../../contracts';
import type { LoopProbe } from '../contact/loop-probe';
import { sortPoles } from '../linalg';

/**
 * The closed loop at the nominal point.
 * @param stable what an exact count of poles says; undefined where there is none
 * @param atOrigin how many poles lie exactly at 0, as the exact coefficients tell
 */
export function nominalAnswer(
  probe: LoopProbe,
  nominal: ArrayLike<number>,
  stable: boolean | undefined,
  atOrigin: number,
): NominalAnswer | undefined {
  probe.visit(nominal);
  if (probe.regular) moveToOrigin(probe.poles, atOrigin);
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
    decayRate: onSideOf(values.stable, values.decayRate),
    dampingRatio: onSideOf(values.stable, values.dampingRatio),
    gainMargin: values.gainMargin,
    phaseMargin: values.phaseMargin,
    delayMargin: values.delayMargin,
    modulusMargin: values.modulusMargin,
  };
}

/** Rounding leaves a pole at 0 somewhere beside it, in any direction: the smallest ones are put where they belong. */
function moveToOrigin({ closedRe, closedIm, order }: LoopProbe['poles'], count: number): void {
  for (let moved = 0; moved < count; moved++) {
    let least = -1;
    let size = Infinity;
    for (let i = 0; i < order; i++) {
      const modulus = Math.max(Math.abs(closedRe[i]), Math.abs(closedIm[i]));
      if (modulus > 0 && modulus < size) {
        size = modulus;
        least = i;
      }
    }
    const alreadyThere = zerosAmong(closedRe, closedIm, order);
    if (least < 0 || alreadyThere >= count) return;
    closedRe[least] = 0;
    closedIm[least] = 0;
  }
}

function zerosAmong(re: Float64Array, im: Float64Array, order: number): number {
  let count = 0;
  for (let i = 0; i < order; i++) if (re[i] === 0 && im[i] === 0) count++;
  return count;
}

/** Where rounding and the exact count disagree about the sign, the count is right and the measure is 0; never −0. */
function onSideOf(stable: boolean, value: number): number {
  return (stable ? Math.max(value, 0) : Math.min(value, 0)) + 0;
}
