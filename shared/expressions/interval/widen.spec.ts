import { describe, expect, it } from 'vitest';
import { nextDown } from './rounding';
import { widenDown, widenUp } from './widen';

describe('widening', () => {
  it('reaches an exact value one of its own ulps away, across a power of two', () => {
    // The ulp of the exact value 1 + 2^−53 is 2^−52, twice that of the computed one.
    const computed = 1 - 2 ** -53;
    expect(widenUp(computed, 1)).toBeGreaterThan(1);
    expect(widenDown(-computed, 1)).toBeLessThan(-1);
  });

  it('moves by one step more than the error bound', () => {
    expect(widenUp(1, 1)).toBe(1 + 2 ** -51);
    expect(widenDown(1, 2)).toBe(1 - 3 * 2 ** -53);
    expect(widenDown(0, 1)).toBe(-1e-323);
    expect(widenUp(Infinity, 1)).toBe(Infinity);
    expect(widenDown(Infinity, 1)).toBe(nextDown(Number.MAX_VALUE));
  });
});
