import { describe, expect, it } from 'vitest';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { exp } from './exp';
import { exactExp } from './testing/fixed-point-oracle';
import { platformDistance } from './testing/platform-distance';
import { seededArguments } from './testing/seeded-arguments';
import { worstError } from './testing/worst-error';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.exp;

describe('exp', () => {
  const draw = seededArguments(107);

  it.each<[string, () => number]>([
    ['the normal range', () => draw.between(-708, 709.7)],
    ['the subnormal range', () => draw.between(-745, -708)],
    ['beside 0', () => draw.spread(-60, 2)],
  ])('keeps its stated error bound: %s', (_, next) => {
    const worst = worstError(exp, exactExp, next, 1500);
    expect(worst.ulps, `at ${worst.argument}`).toBeLessThan(BOUND);
    expect(worst.ulps).toBeGreaterThan(0);
  });

  it('agrees with the platform within 2 ulps', () => {
    expect(platformDistance(exp, Math.exp, () => draw.between(-700, 700), 5000)).toBeLessThanOrEqual(2);
  });

  it.each([
    [0, 1],
    [-0, 1],
    [5e-324, 1],
    [1e-17, 1],
    [709.782712893385, Infinity],
    [1e300, Infinity],
    [Infinity, Infinity],
    [-745.2, 0],
    [-1e300, 0],
    [-Infinity, 0],
    [NaN, NaN],
  ])('exp(%d) is exactly %d', (argument, expected) => {
    expect(exp(argument)).toBe(expected);
  });
});
