import { describe, expect, it } from 'vitest';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { asin } from './asin';
import { exactAsin } from './testing/fixed-point-oracle';
import { platformDistance } from './testing/platform-distance';
import { seededArguments } from './testing/seeded-arguments';
import { worstError } from './testing/worst-error';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.asin;

describe('asin', () => {
  const draw = seededArguments(104);

  it.each<[string, () => number]>([
    ['inside', () => draw.between(-1, 1)],
    ['small', () => draw.spread(-70, -1)],
    ['beside 1', () => 1 - Math.abs(draw.spread(-52, -2))],
    ['beside −1', () => Math.abs(draw.spread(-52, -2)) - 1],
  ])('keeps its stated error bound: %s', (_, next) => {
    const worst = worstError(asin, exactAsin, next, 1500);
    expect(worst.ulps, `at ${worst.argument}`).toBeLessThan(BOUND);
    expect(worst.ulps).toBeGreaterThan(0);
  });

  it('agrees with the platform within 2 ulps', () => {
    expect(platformDistance(asin, Math.asin, () => draw.between(-1, 1), 5000)).toBeLessThanOrEqual(2);
  });

  it.each([
    [0, 0],
    [-0, -0],
    [5e-324, 5e-324],
    [1, Math.PI / 2],
    [-1, -Math.PI / 2],
    [1.0000000000000002, NaN],
    [-2, NaN],
    [Infinity, NaN],
    [NaN, NaN],
  ])('asin(%d) is exactly %d', (argument, expected) => {
    expect(asin(argument)).toBe(expected);
  });
});
