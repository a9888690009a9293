import { describe, expect, it } from 'vitest';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { sin } from './sin';
import { errorInUlps, exactSin } from './testing/fixed-point-oracle';
import { platformDistance } from './testing/platform-distance';
import { seededArguments } from './testing/seeded-arguments';
import { worstError } from './testing/worst-error';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.sin;

describe('sin', () => {
  const draw = seededArguments(101);

  it.each<[string, () => number]>([
    ['beside 0', () => draw.between(-0.8, 0.8)],
    ['a few turns', () => draw.between(-10, 10)],
    ['below and above the change of reduction', () => draw.between(-2.1e6, 2.1e6)],
    ['the whole range of doubles', () => draw.spread(-30, 1023)],
    [
      'beside multiples of a quarter turn',
      () =>
        Math.floor(draw.between(1, 600000)) *
        (Math.PI / 2) *
        (1 + draw.between(-2, 2) * 2.220446049250313e-16),
    ],
  ])('keeps its stated error bound: %s', (_, next) => {
    const worst = worstError(sin, exactSin, next, 1500);
    expect(worst.ulps, `at ${worst.argument}`).toBeLessThan(BOUND);
    expect(worst.ulps).toBeGreaterThan(0);
  });

  it('agrees with the platform within 2 ulps', () => {
    expect(platformDistance(sin, Math.sin, () => draw.between(-1000, 1000), 5000)).toBeLessThanOrEqual(2);
  });

  it.each([
    [0, 0],
    [-0, -0],
    [5e-324, 5e-324],
    [-1e-310, -1e-310],
    [NaN, NaN],
    [Infinity, NaN],
    [-Infinity, NaN],
  ])('sin(%d) is exactly %d', (argument, expected) => {
    expect(sin(argument)).toBe(expected);
  });

  it('reduces the argument that comes closest to a multiple of a quarter turn', () => {
    // Known as the hardest double (from memory; the reference value below is computed here).
    const x = 6381956970095103 * 2 ** 797;
    expect(errorInUlps(sin(x), exactSin(x))).toBeLessThan(BOUND);
  });
});
