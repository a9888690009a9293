import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { nextDown, nextUp } from './rounding';

describe('neighbouring doubles', () => {
  it.each([
    [0, 5e-324],
    [-0, 5e-324],
    [5e-324, 1e-323],
    [-5e-324, -0],
    [-1e-323, -5e-324],
    [2.225073858507201e-308, 2.2250738585072014e-308],
    [1, 1.0000000000000002],
    [-1, -0.9999999999999999],
    [0.9999999999999999, 1],
    [4294967295 * 2 ** -1074, 4294967296 * 2 ** -1074],
    [-4294967296 * 2 ** -1074, -4294967295 * 2 ** -1074],
    [Number.MAX_VALUE, Infinity],
    [-Infinity, -Number.MAX_VALUE],
    [Infinity, Infinity],
    [NaN, NaN],
  ])('nextUp(%d) is %d', (x, expected) => {
    expect(nextUp(x)).toBe(expected);
    expect(nextDown(-x)).toBe(-expected);
  });

  it('has nothing between a double and its neighbour', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => {
        const up = nextUp(x);
        expect(up).toBeGreaterThan(x);
        expect(nextDown(up) === x).toBe(true);
        const middle = x / 2 + up / 2;
        if (Math.abs(x) > 1e-300 && up < Infinity) expect(middle === x || middle === up).toBe(true);
      }),
      { seed: 1, numRuns: 1000 },
    );
  });
});
