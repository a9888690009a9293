import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { binaryValue } from '../elementary/testing/fixed-point-oracle';
import {
  addDown,
  addUp,
  divideDown,
  divideUp,
  multiplyDown,
  multiplyUp,
  sqrtDown,
  sqrtUp,
} from './directed-operations';
import { nextUp } from './rounding';
import { addExactly, compareExactly, encloses, multiplyExactly } from './testing/containment';

const anyDouble = fc.double({ noNaN: true, noDefaultInfinity: true });
const ordinary = fc.oneof(
  fc.double({ min: -1e100, max: 1e100, noNaN: true }).filter((x) => Math.abs(x) > 1e-100),
  fc.integer({ min: -1000, max: 1000 }).map((n) => (n === 0 ? 1 : n / 8)),
);
const settings = { seed: 2, numRuns: 1500 };

/** Whether two bounds are one double, or neighbours. */
function areClose(low: number, high: number): boolean {
  return low === high || nextUp(low) === high;
}

describe('directed operations', () => {
  it('enclose sums and products of all doubles', () => {
    fc.assert(
      fc.property(anyDouble, anyDouble, (a, b) => {
        const sum = addExactly(binaryValue(a), binaryValue(b));
        expect(encloses({ low: addDown(a, b), high: addUp(a, b) }, sum)).toBe(true);
        const product = multiplyExactly(binaryValue(a), binaryValue(b));
        expect(encloses({ low: multiplyDown(a, b), high: multiplyUp(a, b) }, product)).toBe(true);
      }),
      settings,
    );
  });

  it('enclose quotients and roots of all doubles', () => {
    fc.assert(
      fc.property(anyDouble, anyDouble, (a, b) => {
        if (b !== 0) {
          const [top, divisor] = b > 0 ? [a, b] : [-a, -b];
          const low = divideDown(a, b);
          const high = divideUp(a, b);
          const exact = binaryValue(top);
          const times = (q: number) => multiplyExactly(binaryValue(q), binaryValue(divisor));
          if (low !== -Infinity) expect(compareExactly(times(low), exact)).toBeLessThanOrEqual(0);
          if (high !== Infinity) expect(compareExactly(times(high), exact)).toBeGreaterThanOrEqual(0);
        }
        const radicand = Math.abs(a);
        const root = { low: binaryValue(sqrtDown(radicand)), high: binaryValue(sqrtUp(radicand)) };
        const exact = binaryValue(radicand);
        expect(compareExactly(multiplyExactly(root.low, root.low), exact)).toBeLessThanOrEqual(0);
        expect(compareExactly(multiplyExactly(root.high, root.high), exact)).toBeGreaterThanOrEqual(0);
      }),
      settings,
    );
  });

  it('are the nearest doubles on either side away from overflow and underflow', () => {
    fc.assert(
      fc.property(ordinary, ordinary, (a, b) => {
        expect(areClose(addDown(a, b), addUp(a, b))).toBe(true);
        expect(areClose(multiplyDown(a, b), multiplyUp(a, b))).toBe(true);
        expect(areClose(divideDown(a, b), divideUp(a, b))).toBe(true);
        expect(areClose(sqrtDown(Math.abs(a)), sqrtUp(Math.abs(a)))).toBe(true);
      }),
      settings,
    );
  });

  it('keep exact results', () => {
    for (const [down, up, expected] of [
      [addDown(0.25, 1e6), addUp(0.25, 1e6), 1000000.25],
      [multiplyDown(-1.5, 7), multiplyUp(-1.5, 7), -10.5],
      [divideDown(-21, 4), divideUp(-21, 4), -5.25],
      [sqrtDown(6.25), sqrtUp(6.25), 2.5],
      [multiplyDown(0, -3), multiplyUp(0, -3), 0],
    ]) {
      expect(down).toBe(expected);
      expect(up).toBe(expected);
    }
    expect(addDown(0.1, 0.2)).toBeLessThan(addUp(0.1, 0.2));
    expect(divideDown(1, 3)).toBeLessThan(divideUp(1, 3));
    expect(divideDown(1, -3)).toBeLessThan(divideUp(1, -3));
  });

  it('treat overflow and unbounded ends as bounds', () => {
    const most = Number.MAX_VALUE;
    expect(addDown(most, most)).toBe(most);
    expect(addUp(most, most)).toBe(Infinity);
    expect(multiplyDown(-most, 2)).toBe(-Infinity);
    expect(multiplyUp(-most, 2)).toBe(-most);
    expect(divideDown(most, 0.5)).toBe(most);
    expect(addDown(-Infinity, 1)).toBe(-Infinity);
    expect(addDown(-Infinity, Infinity)).toBe(-Infinity);
    expect(addUp(-Infinity, Infinity)).toBe(Infinity);
    expect(multiplyDown(0, Infinity)).toBe(0);
    expect(multiplyUp(-2, -Infinity)).toBe(Infinity);
    expect(divideDown(3, Infinity)).toBe(0);
    expect(multiplyDown(5e-324, 0.5)).toBeLessThanOrEqual(0);
    expect(multiplyUp(5e-324, 0.5)).toBe(5e-324);
    expect(sqrtUp(Infinity)).toBe(Infinity);
  });
});
