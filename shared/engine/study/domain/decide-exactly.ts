import { evaluateExactly } from '../../polynomial/exact-point';
import type { LoopPolynomial } from '../../polynomial/loop-polynomial';
import { halves, pointOfSignChange, type BandBox } from './band-box';
import { ScaledBernstein } from './scaled-bernstein';
import { isBroken, MET, OPEN, type Decision, type RequiredSign } from './sign-condition';

/** Most boxes for one condition. */
const MOST_BOXES = 4000;

/** Most coefficients in all, so that a large polynomial gets fewer boxes. */
const MOST_COEFFICIENTS = 100_000;

/**
 * Branch and bound on a polynomial with exact coefficients: nothing is lost to rounding, so that only a zero inside
 * the bands that is touched and not crossed can stay open.
 *
 * @param polynomial one without s
 * @param nominal values of its variables
 */
export function decideExactly(
  polynomial: LoopPolynomial,
  required: RequiredSign,
  box: BandBox,
  nominal: readonly number[],
): Decision {
  const form = new ScaledBernstein(polynomial);
  const signAt = (point: readonly number[]): number => signOf(evaluateExactly(polynomial, point).broken[0]);
  let positive: readonly number[] | undefined;
  let negative: readonly number[] | undefined;
  const refutedAt = (point: readonly number[], sign: number): readonly number[] | undefined => {
    if (isBroken(required, sign)) return point;
    if (sign > 0) positive ??= point;
    else negative ??= point;
    if (required !== 'nonzero' || positive === undefined || negative === undefined) return undefined;
    return pointOfSignChange(positive, negative, signAt);
  };
  const atNominal = refutedAt(nominal, signAt(nominal));
  if (atNominal !== undefined) return { outcome: 'broken', point: atNominal };

  const budget = Math.min(MOST_BOXES, Math.ceil(MOST_COEFFICIENTS / form.size));
  const queue = [box];
  let open = false;
  for (let next = 0; next < queue.length; next++) {
    if (next >= budget) return OPEN;
    const current = queue[next];
    const signs = form.coefficients(current).map(signOf);
    if (isMet(required, signs)) continue;
    for (let index = 0; index < signs.length; index++) {
      const corner = form.corner(index, current, nominal);
      const point = corner === undefined ? undefined : refutedAt(corner, signs[index]);
      if (point !== undefined) return { outcome: 'broken', point };
    }
    const parts = halves(current, box, (variable) => form.degrees[variable] > 0);
    if (parts === undefined) open = true;
    else queue.push(...parts);
  }
  return open ? OPEN : MET;
}

function isMet(required: RequiredSign, signs: readonly number[]): boolean {
  if (required === 'nonnegative') return signs.every((sign) => sign >= 0);
  return signs.every((sign) => sign > 0) || (required === 'nonzero' && signs.every((sign) => sign < 0));
}

function signOf(value: bigint): number {
  return value > 0n ? 1 : value < 0n ? -1 : 0;
}
