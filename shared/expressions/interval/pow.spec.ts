import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binaryValue, exactPow } from '../elementary/testing/fixed-point-oracle';
import { isDomainIssue } from './domain-issue';
import { containsZero } from './interval';
import { pow } from './pow';
import { powerInteger } from './power-integer';
import { nextUp } from './rounding';
import { intervalAndPoint, partWay } from './testing/interval-and-point';
import { compareExactly, encloses, multiplyExactly } from './testing/containment';

/** Both by density of doubles, which crowds towards 0, and by length. */
const endIn = (min: number, max: number) =>
  fc.oneof(
    fc.double({ min, max, noNaN: true }),
    fc.double({ min: 0, max: 1, noNaN: true }).map((part) => partWay(min, max, part)),
  );
const intervalIn = (min: number, max: number) =>
  fc
    .tuple(endIn(min, max), endIn(min, max), fc.double({ min: 0, max: 1, noNaN: true }))
    .map(intervalAndPoint);

const settings = { seed: 5, numRuns: 1000 };

describe('integer powers of intervals', () => {
  it('enclose the powers of points', () => {
    fc.assert(
      fc.property(intervalIn(-30, 30), fc.integer({ min: -70, max: 70 }), ({ x, point }, n) => {
        const image = powerInteger(x, n);
        expect(isDomainIssue(image)).toBe(n < 0 && containsZero(x));
        if (isDomainIssue(image)) return;
        let power = binaryValue(1);
        for (let i = 0; i < Math.abs(n); i += 1) power = multiplyExactly(power, binaryValue(point));
        if (n >= 0) {
          expect(encloses(image, power)).toBe(true);
          return;
        }
        // low <= 1/power <= high, multiplied by power, which turns the order where it is negative.
        const one = binaryValue(1);
        const [below, above] = power.mantissa > 0n ? [image.low, image.high] : [image.high, image.low];
        if (Math.abs(below) < Infinity) {
          expect(compareExactly(multiplyExactly(binaryValue(below), power), one)).toBeLessThanOrEqual(0);
        }
        if (Math.abs(above) < Infinity) {
          expect(compareExactly(multiplyExactly(binaryValue(above), power), one)).toBeGreaterThanOrEqual(0);
        }
      }),
      settings,
    );
  });

  it('are exact where doubles are, and tight elsewhere', () => {
    expect(powerInteger({ low: -2, high: 3 }, 2)).toEqual({ low: 0, high: 9 });
    expect(powerInteger({ low: -2, high: 3 }, 3)).toEqual({ low: -8, high: 27 });
    expect(powerInteger({ low: -3, high: -2 }, 4)).toEqual({ low: 16, high: 81 });
    expect(powerInteger({ low: 2, high: 4 }, -2)).toEqual({ low: 0.0625, high: 0.25 });
    expect(powerInteger({ low: -4, high: -2 }, -1)).toEqual({ low: -0.5, high: -0.25 });
    expect(powerInteger({ low: -4, high: -2 }, -3)).toEqual({ low: -0.125, high: -0.015625 });
    expect(powerInteger({ low: -5, high: 7 }, 0)).toEqual({ low: 1, high: 1 });
    expect(powerInteger({ low: 0, high: 0 }, 5)).toEqual({ low: 0, high: 0 });
    const tenth = powerInteger({ low: 0.1, high: 0.1 }, 50);
    if (isDomainIssue(tenth)) throw new Error('a positive power has no pole');
    expect(tenth.high - tenth.low).toBeLessThan(6 * (nextUp(tenth.low) - tenth.low));
  });

  it('bound what overflows, underflows or has no end', () => {
    expect(powerInteger({ low: 1, high: Infinity }, 3)).toEqual({ low: 1, high: Infinity });
    expect(powerInteger({ low: -Infinity, high: 2 }, 3)).toEqual({ low: -Infinity, high: 8 });
    expect(powerInteger({ low: 1, high: Infinity }, -3)).toEqual({ low: 0, high: 1 });
    const large = powerInteger({ low: 1e200, high: 1e200 }, 2);
    expect(large).toEqual({ low: Number.MAX_VALUE, high: Infinity });
    const small = powerInteger({ low: 1e-200, high: 1e-200 }, 2);
    expect(small).toEqual({ low: 0, high: 5e-324 });
    expect(powerInteger({ low: 1e-200, high: 1e-200 }, -2)).toEqual({
      low: Number.MAX_VALUE,
      high: Infinity,
    });
  });

  it('report a pole and refuse a fraction', () => {
    expect(powerInteger({ low: -1, high: 1 }, -1)).toEqual({
      cause: 'division-by-zero',
      everywhere: false,
    });
    expect(powerInteger({ low: 0, high: 0 }, -2)).toEqual({ cause: 'division-by-zero', everywhere: true });
    expect(() => powerInteger({ low: 1, high: 2 }, 0.5)).toThrow(RangeError);
  });
});

describe('real powers of intervals', () => {
  it('enclose the powers of points', () => {
    fc.assert(
      fc.property(intervalIn(1e-3, 20), intervalIn(-9, 9), (base, exponent) => {
        const image = pow(base.x, exponent.x);
        if (isDomainIssue(image)) throw new Error('a positive base is in the domain');
        for (const x of [base.x.low, base.point, base.x.high]) {
          for (const y of [exponent.x.low, exponent.point, exponent.x.high]) {
            expect(encloses(image, exactPow(x, y)), `${x}^${y}`).toBe(true);
          }
        }
      }),
      settings,
    );
  });

  it('take an exponent that is one integer as such', () => {
    expect(pow({ low: -2, high: 3 }, { low: 2, high: 2 })).toEqual({ low: 0, high: 9 });
  });

  it('reach 0 and the unbounded ends', () => {
    const root = pow({ low: 0, high: 4 }, { low: 0.5, high: 0.5 });
    if (isDomainIssue(root)) throw new Error('0 has a positive power');
    expect(root.low).toBe(0);
    expect(root.high).toBeGreaterThanOrEqual(2);
    expect(root.high).toBeLessThan(2.000000000000003);
    expect(pow({ low: 0, high: 1 }, { low: 0, high: 3 })).toEqual({ low: 0, high: 1 });
    expect(pow({ low: 1, high: 2 }, { low: 0, high: Infinity })).toEqual({ low: 0, high: Infinity });
  });

  it('report what has no real value', () => {
    const half = { low: 0.5, high: 0.5 };
    expect(pow({ low: -1, high: 1 }, half)).toEqual({ cause: 'power-of-negative', everywhere: false });
    expect(pow({ low: -2, high: -1 }, half)).toEqual({ cause: 'power-of-negative', everywhere: true });
    expect(pow({ low: -2, high: -1 }, { low: 0.5, high: 1 })).toEqual({
      cause: 'power-of-negative',
      everywhere: false,
    });
    expect(pow({ low: 0, high: 1 }, { low: -0.5, high: 1 })).toEqual({
      cause: 'division-by-zero',
      everywhere: false,
    });
    expect(pow({ low: 0, high: 0 }, { low: -0.5, high: -0.25 })).toEqual({
      cause: 'division-by-zero',
      everywhere: true,
    });
  });
});
