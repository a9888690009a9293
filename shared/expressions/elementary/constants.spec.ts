import { describe, expect, it } from 'vitest';
import { HALF_PI_HIGH, HALF_PI_LOW, LN2_HIGH, LN2_LOW, PI_HIGH, PI_LOW } from './constants';
import { exactLog, piFixed } from './testing/fixed-point-oracle';
import { pairError } from './testing/pair-error';

describe('constants', () => {
  const pi = piFixed(320);

  it('hold π, π/2 and ln 2 in two parts', () => {
    expect(pairError(PI_HIGH, PI_LOW, { mantissa: pi, exponent: -320 })).toBeLessThan(2 ** -105);
    expect(pairError(HALF_PI_HIGH, HALF_PI_LOW, { mantissa: pi, exponent: -321 })).toBeLessThan(2 ** -105);
    expect(pairError(LN2_HIGH, LN2_LOW, exactLog(2))).toBeLessThan(2 ** -96);
  });

  it('have a first part of ln 2 whose multiples are exact', () => {
    expect(Number.isInteger(LN2_HIGH * 2 ** 42)).toBe(true);
  });
});
