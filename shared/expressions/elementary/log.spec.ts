import { describe, expect, it } from 'vitest';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { log } from './log';
import { exactLog } from './testing/fixed-point-oracle';
import { platformDistance } from './testing/platform-distance';
import { seededArguments } from './testing/seeded-arguments';
import { worstError } from './testing/worst-error';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.log;

describe('log', () => {
  const draw = seededArguments(108);

  it.each<[string, () => number]>([
    ['the normal range', () => Math.abs(draw.spread(-1022, 1023))],
    ['the subnormal range', () => Math.abs(draw.spread(-1022, -990)) * 2 ** -32],
    ['around 1', () => draw.between(0.5, 2)],
    ['beside 1', () => 1 + draw.spread(-50, -4)],
  ])('keeps its stated error bound: %s', (_, next) => {
    const worst = worstError(log, exactLog, next, 1500);
    expect(worst.ulps, `at ${worst.argument}`).toBeLessThan(BOUND);
    expect(worst.ulps).toBeGreaterThan(0);
  });

  it('agrees with the platform within 2 ulps', () => {
    expect(platformDistance(log, Math.log, () => Math.abs(draw.spread(-300, 300)), 5000)).toBeLessThanOrEqual(
      2,
    );
  });

  it.each([
    [1, 0],
    [0, -Infinity],
    [-0, -Infinity],
    [-1, NaN],
    [-Infinity, NaN],
    [Infinity, Infinity],
    [NaN, NaN],
  ])('log(%d) is exactly %d', (argument, expected) => {
    expect(log(argument)).toBe(expected);
  });
});
