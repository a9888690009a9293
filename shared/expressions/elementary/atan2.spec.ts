import { describe, expect, it } from 'vitest';
import { atan2 } from './atan2';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { errorInUlps, exactAtan2 } from './testing/fixed-point-oracle';
import { seededArguments } from './testing/seeded-arguments';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.atan2;
const PI = Math.PI;

describe('atan2', () => {
  it.each([
    ['like sizes', -2, 2],
    ['unlike sizes', -60, 60],
    ['the whole range of doubles', -1022, 1023],
  ])('keeps its stated error bound: %s', (_, lowest, highest) => {
    const draw = seededArguments(109);
    let compared = 0;
    for (let i = 0; i < 3000; i += 1) {
      const y = draw.spread(lowest, highest);
      const x = draw.spread(lowest, highest);
      // The reference is in fixed point: a ratio below 2^−200 has too few of its digits.
      if (x > 0 && Math.abs(y / x) < 2 ** -200) continue;
      compared += 1;
      expect(errorInUlps(atan2(y, x), exactAtan2(y, x)), `at ${y}, ${x}`).toBeLessThan(BOUND);
    }
    expect(compared).toBeGreaterThan(1500);
  });

  it('keeps a ratio that is below the range of the arctangent series', () => {
    expect(atan2(1e-310, 1)).toBe(1e-310);
    expect(atan2(-3e-200, 1e100)).toBe(-3e-200 / 1e100);
    expect(atan2(1e-200, 1e200)).toBe(0);
    expect(atan2(1e-200, -1e200)).toBe(PI);
    expect(atan2(1e200, -1e-200)).toBe(PI / 2);
    expect(atan2(5e-324, 5e-324)).toBe(PI / 4);
    expect(atan2(1.7e308, -1.7e308)).toBe((3 * PI) / 4);
  });

  it.each([
    [0, 0, 0],
    [-0, 0, -0],
    [0, -0, PI],
    [-0, -0, -PI],
    [0, 3, 0],
    [-0, 3, -0],
    [0, -3, PI],
    [-0, -3, -PI],
    [2, 0, PI / 2],
    [-2, -0, -PI / 2],
    [Infinity, 1, PI / 2],
    [-Infinity, 1, -PI / 2],
    [1, Infinity, 0],
    [-1, Infinity, -0],
    [1, -Infinity, PI],
    [-1, -Infinity, -PI],
    [Infinity, Infinity, PI / 4],
    [Infinity, -Infinity, (3 * PI) / 4],
    [-Infinity, Infinity, -PI / 4],
    [NaN, 1, NaN],
    [1, NaN, NaN],
  ])('atan2(%d, %d) is exactly %d', (y, x, expected) => {
    expect(atan2(y, x)).toBe(expected);
  });
});
