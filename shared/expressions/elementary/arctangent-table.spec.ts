import { describe, expect, it } from 'vitest';
import { ARCTANGENT_HIGH, ARCTANGENT_LOW } from './arctangent-table';
import { exactAtan } from './testing/fixed-point-oracle';
import { pairError } from './testing/pair-error';

describe('table of arctangents', () => {
  it('holds atan(i/16) to 105 bits', () => {
    expect(ARCTANGENT_HIGH).toHaveLength(17);
    expect(ARCTANGENT_HIGH[0]).toBe(0);
    expect(ARCTANGENT_LOW[0]).toBe(0);
    for (let i = 1; i <= 16; i += 1) {
      expect(pairError(ARCTANGENT_HIGH[i], ARCTANGENT_LOW[i], exactAtan(i / 16))).toBeLessThan(2 ** -105);
    }
  });
});
