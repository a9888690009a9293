/**
 * Error terms of single operations, so that a value can be carried as the unevaluated sum of two
 * doubles. Sources: Møller 1965 and Knuth, *The Art of Computer Programming* vol. 2 (sum); Dekker,
 * "A floating-point technique for extending the available precision", 1971 (product).
 */

/** 2^27 + 1: splits a 53-bit significand into two halves whose products are exact. */
const SPLITTER = 134217729;

/** (a + b) − sum exactly, where `sum` is the rounded a + b and nothing overflows. */
export function sumError(a: number, b: number, sum: number): number {
  const bPart = sum - a;
  return a - (sum - bPart) + (b - bPart);
}

/**
 * a·b − product exactly, where `product` is the rounded a·b; needs |a|, |b| < 2^995 and a product
 * that is 0 or at least 2^−967 in size.
 */
export function productError(a: number, b: number, product: number): number {
  const aScaled = SPLITTER * a;
  const aHigh = aScaled - (aScaled - a);
  const aLow = a - aHigh;
  const bScaled = SPLITTER * b;
  const bHigh = bScaled - (bScaled - b);
  const bLow = b - bHigh;
  return aHigh * bHigh - product + aHigh * bLow + aLow * bHigh + aLow * bLow;
}
