import { describe, expect, it } from 'vitest';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { acos } from './acos';
import { exactAcos } from './testing/fixed-point-oracle';
import { platformDistance } from './testing/platform-distance';
import { seededArguments } from './testing/seeded-arguments';
import { worstError } from './testing/worst-error';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.acos;

describe('acos', () => {
  const draw = seededArguments(105);

  it.each<[string, () => number]>([
    ['inside', () => draw.between(-1, 1)],
    ['small', () => draw.spread(-70, -1)],
    ['beside 1', () => 1 - Math.abs(draw.spread(-52, -2))],
    ['beside −1', () => Math.abs(draw.spread(-52, -2)) - 1],
  ])('keeps its stated error bound: %s', (_, next) => {
    const worst = worstError(acos, exactAcos, next, 1500);
    expect(worst.ulps, `at ${worst.argument}`).toBeLessThan(BOUND);
    expect(worst.ulps).toBeGreaterThan(0);
  });

  it('agrees with the platform within 2 ulps', () => {
    expect(platformDistance(acos, Math.acos, () => draw.between(-1, 1), 5000)).toBeLessThanOrEqual(2);
  });

  it.each([
    [1, 0],
    [-1, Math.PI],
    [0, Math.PI / 2],
    [-0, Math.PI / 2],
    [5e-324, Math.PI / 2],
    [1.0000000000000002, NaN],
    [-Infinity, NaN],
    [NaN, NaN],
  ])('acos(%d) is exactly %d', (argument, expected) => {
    expect(acos(argument)).toBe(expected);
  });
});
