import { nextDown, nextUp } from './neighbour';
import type { Unit } from './unit';

/** The value in SI: value × numerator / denominator. Monotone in `value`, at most two roundings. */
export function toSi(value: number, unit: Unit): number {
  return (value * unit.numerator) / unit.denominator;
}

/**
 * The value in `unit` of an SI value. Where some double `v` has `toSi(v) === value`, such a `v` is returned, and among
 * neighbours the one with the shortest decimal form: what a person typed comes back as it was typed.
 */
export function fromSi(value: number, unit: Unit): number {
  const quotient = (value * unit.denominator) / unit.numerator;
  if (!Number.isFinite(quotient)) return quotient;
  let best = quotient;
  let bestLength = Infinity;
  for (const candidate of candidatesNear(quotient)) {
    if (toSi(candidate, unit) !== value) continue;
    const length = String(candidate).length;
    if (length < bestLength) {
      best = candidate;
      bestLength = length;
    }
  }
  return best;
}

/**
 * A value in `unit` that stands for no more than the SI value: `toSi(fromSiDown(v)) ≤ v`, and equal wherever a double
 * allows it. For upper ends of proved ranges.
 */
export function fromSiDown(value: number, unit: Unit): number {
  let converted = fromSi(value, unit);
  while (toSi(converted, unit) > value) converted = nextDown(converted);
  return converted;
}

/** The mirror image of `fromSiDown`, for lower ends of proved ranges: `toSi(fromSiUp(v)) ≥ v`. */
export function fromSiUp(value: number, unit: Unit): number {
  return -fromSiDown(-value, unit);
}

/** Two conversions of two roundings each leave the right double at most a few places away. */
function* candidatesNear(value: number): Generator<number> {
  yield value;
  let below = value;
  let above = value;
  for (let step = 0; step < 4; step += 1) {
    below = nextDown(below);
    above = nextUp(above);
    yield below;
    yield above;
  }
}
