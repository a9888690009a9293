import { fromWords } from '../float-bits';

/** Arguments for the specs: the same sequence for the same seed on every machine. */
export interface SeededArguments {
  /** 32 random bits, unsigned. */
  bits(): number;
  /** Uniform in [low, high). */
  between(low: number, high: number): number;
  /** Random sign and significand, binary exponent uniform over [lowest, highest]. */
  spread(lowest: number, highest: number): number;
}

/** Marsaglia's xorshift generator with period 2^32 − 1 ("Xorshift RNGs", 2003), output multiplied. */
export function seededArguments(seed: number): SeededArguments {
  let state = seed | 1;
  const bits = (): number => {
    state ^= state << 13;
    state ^= state >>> 17;
    state ^= state << 5;
    return Math.imul(state, 0x2545f491) >>> 0;
  };
  const unit = (): number => ((bits() >>> 5) * 67108864 + (bits() >>> 6)) / 9007199254740992;
  return {
    bits,
    between: (low, high) => low + (high - low) * unit(),
    spread: (lowest, highest) => {
      const exponent = lowest + Math.floor((highest - lowest + 1) * unit());
      const sign = bits() >= 2147483648 ? 2147483648 : 0;
      return fromWords((sign | ((exponent + 1023) << 20) | (bits() >>> 12)) >>> 0, bits());
    },
  };
}
