import { describe, expect, it } from 'vitest';
import { ROOT_OF_TWO_HIGH, ROOT_OF_TWO_LOW } from './exponential-table';
import { exactPow } from './testing/fixed-point-oracle';
import { pairError } from './testing/pair-error';

describe('table of roots of two', () => {
  it('holds 2^(j/32) to 105 bits, the first part rounded to nearest', () => {
    expect(ROOT_OF_TWO_HIGH).toHaveLength(32);
    for (let j = 0; j < 32; j += 1) {
      expect(pairError(ROOT_OF_TWO_HIGH[j], ROOT_OF_TWO_LOW[j], exactPow(2, j / 32))).toBeLessThan(2 ** -105);
      expect(Math.abs(ROOT_OF_TWO_LOW[j])).toBeLessThanOrEqual(2 ** -53);
    }
  });
});
