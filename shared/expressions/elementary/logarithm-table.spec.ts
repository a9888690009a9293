import { describe, expect, it } from 'vitest';
import { MINUS_LOG_HIGH, MINUS_LOG_LOW, RECIPROCAL } from './logarithm-table';
import { exactLog } from './testing/fixed-point-oracle';
import { pairError } from './testing/pair-error';

describe('table of logarithms', () => {
  it('holds −ln c to 2^−95, the first part a multiple of 2^−42', () => {
    expect(RECIPROCAL).toHaveLength(128);
    for (let i = 0; i < 128; i += 1) {
      const exact = exactLog(RECIPROCAL[i]);
      const negated = { mantissa: -exact.mantissa, exponent: exact.exponent };
      expect(pairError(MINUS_LOG_HIGH[i], MINUS_LOG_LOW[i], negated)).toBeLessThan(2 ** -95);
      expect(Number.isInteger(MINUS_LOG_HIGH[i] * 2 ** 42)).toBe(true);
    }
  });

  it('has reciprocals of nine bits that bring every mantissa within 2^−7 of 1', () => {
    for (let i = 0; i < 128; i += 1) {
      const c = RECIPROCAL[i];
      const halving = i >= 53 ? 2 : 1;
      expect(Number.isInteger(c * 512)).toBe(true);
      expect(Math.abs(((1 + i / 128) / halving) * c - 1)).toBeLessThanOrEqual(2 ** -7);
      expect(Math.abs(((1 + (i + 1) / 128) / halving) * c - 1)).toBeLessThanOrEqual(2 ** -7);
    }
    expect(RECIPROCAL[0]).toBe(1);
    expect(RECIPROCAL[127]).toBe(1);
  });
});
