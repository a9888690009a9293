const value = new Float64Array(1);
const words = new Uint32Array(value.buffer);

value[0] = 1;
/** Which of the two words holds sign and exponent depends on the machine's byte order. */
const HIGH = words[1] === 0 ? 0 : 1;
const LOW = 1 - HIGH;

/** Sign, exponent and upper 20 fraction bits of a double, as an unsigned 32-bit integer. */
export function highWord(x: number): number {
  value[0] = x;
  return words[HIGH];
}

/** Lower 32 fraction bits of a double, as an unsigned integer. */
export function lowWord(x: number): number {
  value[0] = x;
  return words[LOW];
}

/** The double with the given upper and lower 32 bits. */
export function fromWords(high: number, low: number): number {
  words[HIGH] = high;
  words[LOW] = low;
  return value[0];
}

/** 2^k for any integer k: exact, 0 below the smallest subnormal, Infinity above the largest double. */
export function powerOfTwo(k: number): number {
  return k >= -1022 && k <= 1023 ? fromWords((k + 1023) << 20, 0) : scaleFar(1, k);
}

/**
 * x·2^k for any double x and any integer k: exact in the normal range, with a single rounding into the
 * subnormal range, ±Infinity above the largest double.
 */
export function scaleByPowerOfTwo(x: number, k: number): number {
  return k >= -1022 && k <= 1023 ? x * fromWords((k + 1023) << 20, 0) : scaleFar(x, k);
}

const TWO_TO_1023 = powerOfTwo(1023);
const TWO_TO_MINUS_969 = powerOfTwo(-969);

/**
 * The same in up to three factors. Going down by 2^−969 a product rounds only where x is below 2^−53;
 * 2^−54 or less is then still to come, so the end is 0 with or without that rounding.
 */
function scaleFar(x: number, k: number): number {
  let value = x;
  let left = k;
  for (let i = 0; i < 2 && left > 1023; i++, left -= 1023) value *= TWO_TO_1023;
  for (let i = 0; i < 2 && left < -1022; i++, left += 969) value *= TWO_TO_MINUS_969;
  return value * powerOfTwo(Math.max(-1022, Math.min(1023, left)));
}

/** Largest integer e with 2^e <= |x|, for a finite x other than 0. */
export function binaryExponent(x: number): number {
  const biased = (highWord(x) >>> 20) & 0x7ff;
  return biased !== 0 ? biased - 1023 : ((highWord(x * 18014398509481984) >>> 20) & 0x7ff) - 1077;
}
