import type { NominalAnswer } from '../../contracts';
import type { LoopProbe } from '../contact/loop-probe';
import { sortPoles } from '../linalg';
import { exactStability } from '../polynomial/exact-stability';
import type { LoopModel } from './loop-model';
import type { SearchSpace } from './search-variables';

/**
 * The closed loop at the nominal point, with margins at one law; undefined where it has no proper form there.
 * @param law index of the law, −1 without one
 */
export function nominalAnswer(model: LoopModel, space: SearchSpace, law: number): NominalAnswer | undefined {
  const { nominal } = space;
  const probe = model.probe(law);
  const polynomial = model.polynomial(law);
  const exact = polynomial && exactStability(polynomial, nominal);
  probe.visit(nominal);
  if (probe.regular) moveToOrigin(probe.poles, exact?.atOrigin ?? 0);
  const measures = probe.withMargins();
  if (measures === undefined) return undefined;
  const { order, closedRe, closedIm } = probe.poles;
  const re = closedRe.slice(0, order);
  const im = closedIm.slice(0, order);
  sortPoles(re, im, order);
  if (exact !== undefined) measures.stable = exact.stable;
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
  for (let there = zerosAmong(closedRe, closedIm, order); there < count; there++) {
    let least = -1;
    let size = Infinity;
    for (let i = 0; i < order; i++) {
      const modulus = Math.max(Math.abs(closedRe[i]), Math.abs(closedIm[i]));
      if (modulus > 0 && modulus < size) {
        size = modulus;
        least = i;
      }
    }
    if (least < 0) return;
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
