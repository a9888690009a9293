import { fromWords, highWord, lowWord } from '../elementary/float-bits';

const SIGN = 0x80000000;

/**
 * The least double above x (IEEE 754-2019 nextUp): the least positive subnormal for ±0, −0 for the
 * greatest negative one, −1.797…e308 for −∞; ∞ and NaN stay.
 */
export function nextUp(x: number): number {
  if (!(x < Infinity)) return x;
  if (x === 0) return Number.MIN_VALUE;
  const high = highWord(x);
  const low = lowWord(x);
  if (high < SIGN) return low === 0xffffffff ? fromWords(high + 1, 0) : fromWords(high, low + 1);
  return low === 0 ? fromWords(high - 1, 0xffffffff) : fromWords(high, low - 1);
}

/** The greatest double below x (IEEE 754-2019 nextDown). */
export function nextDown(x: number): number {
  return -nextUp(-x);
}
