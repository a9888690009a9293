import { describe, expect, it } from 'vitest';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { atan } from './atan';
import { exactAtan } from './testing/fixed-point-oracle';
import { platformDistance } from './testing/platform-distance';
import { seededArguments } from './testing/seeded-arguments';
import { worstError } from './testing/worst-error';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.atan;

describe('atan', () => {
  const draw = seededArguments(106);

  it.each<[string, () => number]>([
    ['beside 0', () => draw.between(-0.1, 0.1)],
    ['ordinary', () => draw.between(-4, 4)],
    ['every magnitude', () => draw.spread(-40, 90)],
  ])('keeps its stated error bound: %s', (_, next) => {
    const worst = worstError(atan, exactAtan, next, 1500);
    expect(worst.ulps, `at ${worst.argument}`).toBeLessThan(BOUND);
    expect(worst.ulps).toBeGreaterThan(0);
  });

  it('agrees with the platform within 2 ulps', () => {
    expect(platformDistance(atan, Math.atan, () => draw.spread(-20, 40), 5000)).toBeLessThanOrEqual(2);
  });

  it.each([
    [0, 0],
    [-0, -0],
    [5e-324, 5e-324],
    [1, Math.PI / 4],
    [1e300, Math.PI / 2],
    [Infinity, Math.PI / 2],
    [-Infinity, -Math.PI / 2],
    [NaN, NaN],
  ])('atan(%d) is exactly %d', (argument, expected) => {
    expect(atan(argument)).toBe(expected);
  });
});
