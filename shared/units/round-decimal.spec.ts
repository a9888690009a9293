import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ceilText, floorText, roundDown, roundUp } from './round-decimal';

describe('rounding to a decimal place', () => {
  it.each([
    [571.26, 1, '571.2', '571.3'],
    [571.2, 1, '571.2', '571.3'],
    [0.1, 1, '0.1', '0.2'],
    [0.5, 1, '0.5', '0.5'],
    [-0.0004, 3, '-0.001', '0.000'],
    [1234, -2, '1200', '1300'],
    [1e21, 0, '1000000000000000000000', '1000000000000000000000'],
    [5e-324, 2, '0.00', '0.01'],
    [0, 2, '0.00', '0.00'],
  ])('%d to %d places is between %s and %s', (value, decimals, below, above) => {
    expect(floorText(value, decimals)).toBe(below);
    expect(ceilText(value, decimals)).toBe(above);
  });

  it('stays on its side and within one step', () => {
    fc.assert(
      fc.property(
        fc.double({ noNaN: true, noDefaultInfinity: true }),
        fc.integer({ min: -12, max: 12 }),
        (value, decimals) => {
          const down = roundDown(value, decimals);
          const up = roundUp(value, decimals);
          expect(down).toBeLessThanOrEqual(value);
          expect(up).toBeGreaterThanOrEqual(value);
          const step = Number(`1e${-decimals}`);
          expect(value - down).toBeLessThanOrEqual(step + Math.abs(value) * 2 ** -52);
          expect(up - value).toBeLessThanOrEqual(step + Math.abs(value) * 2 ** -52);
        },
      ),
      { numRuns: 1000 },
    );
  });

  it('refuses what has no decimal text', () => {
    expect(() => floorText(NaN, 2)).toThrow(RangeError);
    expect(() => ceilText(Infinity, 2)).toThrow(RangeError);
    expect(() => floorText(1, 0.5)).toThrow(RangeError);
  });
});
