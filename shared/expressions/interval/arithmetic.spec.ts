import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binaryValue } from '../elementary/testing/fixed-point-oracle';
import { abs } from './abs';
import { add } from './add';
import { divide } from './divide';
import { isDomainIssue } from './domain-issue';
import { containsZero, interval, pointInterval } from './interval';
import { multiply } from './multiply';
import { negate } from './negate';
import { sqrt } from './sqrt';
import { subtract } from './subtract';
import { intervalAndPoint, partWay } from './testing/interval-and-point';
import { addExactly, compareExactly, encloses, multiplyExactly, negateExactly } from './testing/containment';

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

const settings = { seed: 3, numRuns: 1500 };
const operand = fc.oneof(intervalIn(-10, 10), intervalIn(-1e308, 1e308));

describe('intervals', () => {
  it('are closed and in order', () => {
    expect(interval(-1, 2)).toEqual({ low: -1, high: 2 });
    expect(interval(-Infinity, Infinity)).toEqual({ low: -Infinity, high: Infinity });
    expect(pointInterval(3)).toEqual({ low: 3, high: 3 });
    expect(() => interval(2, 1)).toThrow(RangeError);
    expect(() => interval(NaN, 1)).toThrow(RangeError);
    expect(() => pointInterval(Infinity)).toThrow(RangeError);
    expect(containsZero({ low: 0, high: 1 })).toBe(true);
    expect(containsZero({ low: -1, high: -5e-324 })).toBe(false);
  });
});

describe('arithmetic of intervals', () => {
  it('encloses sums, differences, products, negatives and sizes of points', () => {
    fc.assert(
      fc.property(operand, operand, (a, b) => {
        const p = binaryValue(a.point);
        const q = binaryValue(b.point);
        expect(encloses(add(a.x, b.x), addExactly(p, q))).toBe(true);
        expect(encloses(subtract(a.x, b.x), addExactly(p, negateExactly(q)))).toBe(true);
        expect(encloses(multiply(a.x, b.x), multiplyExactly(p, q))).toBe(true);
        expect(encloses(negate(a.x), negateExactly(p))).toBe(true);
        expect(encloses(abs(a.x), binaryValue(Math.abs(a.point)))).toBe(true);
      }),
      settings,
    );
  });

  it('encloses quotients, and reports every divisor that contains 0', () => {
    let divided = 0;
    fc.assert(
      fc.property(operand, operand, (a, b) => {
        const quotient = divide(a.x, b.x);
        expect(isDomainIssue(quotient)).toBe(containsZero(b.x));
        if (isDomainIssue(quotient)) return;
        divided += 1;
        // low·|q| <= ±p <= high·|q|
        const p = binaryValue(b.point > 0 ? a.point : -a.point);
        const q = binaryValue(Math.abs(b.point));
        if (quotient.low !== -Infinity) {
          expect(compareExactly(multiplyExactly(binaryValue(quotient.low), q), p)).toBeLessThanOrEqual(0);
        }
        if (quotient.high !== Infinity) {
          expect(compareExactly(multiplyExactly(binaryValue(quotient.high), q), p)).toBeGreaterThanOrEqual(0);
        }
      }),
      settings,
    );
    expect(divided).toBeGreaterThan(300);
  });

  it('encloses roots', () => {
    fc.assert(
      fc.property(fc.oneof(intervalIn(0, 10), intervalIn(0, 1e308)), ({ x, point }) => {
        const root = sqrt(x);
        if (isDomainIssue(root)) throw new Error('a root without a negative part');
        const square = (end: number) => multiplyExactly(binaryValue(end), binaryValue(end));
        expect(compareExactly(square(root.low), binaryValue(point))).toBeLessThanOrEqual(0);
        expect(compareExactly(square(root.high), binaryValue(point))).toBeGreaterThanOrEqual(0);
      }),
      settings,
    );
  });

  it('reports domains with their extent', () => {
    expect(divide({ low: 1, high: 1 }, { low: 0, high: 0 })).toEqual({
      cause: 'division-by-zero',
      everywhere: true,
    });
    expect(divide({ low: 1, high: 1 }, { low: -1, high: 0 })).toEqual({
      cause: 'division-by-zero',
      everywhere: false,
    });
    expect(sqrt({ low: -1, high: 0 })).toEqual({ cause: 'root-of-negative', everywhere: false });
    expect(sqrt({ low: -2, high: -1 })).toEqual({ cause: 'root-of-negative', everywhere: true });
  });

  it('keeps exact ends and unbounded ones', () => {
    const x = { low: -2, high: 3 };
    expect(add(x, { low: 0.5, high: 1 })).toEqual({ low: -1.5, high: 4 });
    expect(subtract(x, x)).toEqual({ low: -5, high: 5 });
    expect(multiply(x, { low: -4, high: 0.25 })).toEqual({ low: -12, high: 8 });
    expect(divide(x, { low: 0.5, high: 4 })).toEqual({ low: -4, high: 6 });
    expect(sqrt({ low: 0, high: 9 })).toEqual({ low: 0, high: 3 });
    expect(abs(x)).toEqual({ low: 0, high: 3 });
    expect(abs({ low: -3, high: -1 })).toEqual({ low: 1, high: 3 });
    const half = { low: 1, high: Infinity };
    expect(multiply({ low: 0, high: 1 }, half)).toEqual({ low: 0, high: Infinity });
    expect(divide(half, half)).toEqual({ low: 0, high: Infinity });
    expect(divide(half, { low: -Infinity, high: -2 })).toEqual({ low: -Infinity, high: 0 });
    expect(subtract(half, half)).toEqual({ low: -Infinity, high: Infinity });
  });
});
