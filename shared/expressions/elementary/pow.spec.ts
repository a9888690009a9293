import { describe, expect, it } from 'vitest';
import { ELEMENTARY_ERROR_ULPS } from './error-bounds';
import { pow } from './pow';
import { binaryValue, errorInUlps, exactPow } from './testing/fixed-point-oracle';
import { seededArguments } from './testing/seeded-arguments';

/** The stated bound has a tenth in hand over everything measured here. */
const BOUND = 0.9 * ELEMENTARY_ERROR_ULPS.pow;
const draw = seededArguments(110);

describe('pow', () => {
  it.each<[string, () => number, () => number]>([
    ['real exponents', () => draw.between(0, 20), () => draw.between(-80, 80)],
    ['bases beside 1', () => 1 + draw.spread(-52, -4), () => draw.spread(0, 60)],
    ['every base', () => Math.abs(draw.spread(-1022, 1023)), () => draw.between(-1.1, 1.1)],
    ['integer exponents', () => draw.between(0, 3), () => Math.floor(draw.between(-70, 71))],
    [
      'into the subnormal range',
      () => Math.abs(draw.spread(-60, -40)),
      () => Math.floor(draw.between(15, 26)),
    ],
  ])('keeps its stated error bound: %s', (_, nextBase, nextExponent) => {
    let compared = 0;
    for (let i = 0; i < 3000; i += 1) {
      const x = nextBase();
      const y = nextExponent();
      const logarithm = y * Math.log(x);
      if (!(logarithm < 709.7 && logarithm > -745)) continue;
      compared += 1;
      expect(errorInUlps(pow(x, y), exactPow(x, y)), `at ${x}, ${y}`).toBeLessThan(BOUND);
    }
    expect(compared).toBeGreaterThan(700);
  });

  it('agrees with the platform within 2 ulps', () => {
    for (let i = 0; i < 5000; i += 1) {
      const x = draw.between(0.1, 10);
      const y = draw.between(-8, 8);
      expect(errorInUlps(pow(x, y), binaryValue(Math.pow(x, y))), `at ${x}, ${y}`).toBeLessThanOrEqual(2);
    }
  });

  it('returns exact powers exactly', () => {
    for (let base = 2; base <= 40; base += 1) {
      let power = 1n;
      for (let n = 1; power * BigInt(base) < 9007199254740992n; n += 1) {
        power *= BigInt(base);
        expect(pow(base, n)).toBe(Number(power));
        expect(pow(-base, n)).toBe(n % 2 === 1 ? -Number(power) : Number(power));
      }
    }
    expect(pow(2, -1074)).toBe(5e-324);
    expect(pow(2, 1023)).toBe(8.98846567431158e307);
    expect(pow(0.5, 64)).toBe(1 / 18446744073709551616);
    expect(pow(1.5, 5)).toBe(7.59375);
    expect(pow(2.25, 1.5)).toBe(3.375);
    expect(pow(81, 0.25)).toBe(3);
    expect(pow(0.0625, -0.75)).toBe(8);
  });

  it('squares and inverts as × and ÷ do', () => {
    for (let i = 0; i < 1000; i += 1) {
      const x = draw.spread(-600, 600);
      expect(pow(x, 2)).toBe(x * x);
      expect(pow(x, -1)).toBe(1 / x);
      expect(pow(x, 1)).toBe(x);
    }
  });

  it.each([
    [NaN, 0, 1],
    [Infinity, -0, 1],
    [1, 1e305, 1],
    [1, -1e305, 1],
    [1, NaN, NaN],
    [NaN, 2, NaN],
    [1, Infinity, NaN],
    [-1, -Infinity, NaN],
    [1.1, Infinity, Infinity],
    [-1.1, -Infinity, 0],
    [0.9, Infinity, 0],
    [0.9, -Infinity, Infinity],
    [Infinity, 0.5, Infinity],
    [-Infinity, 3, -Infinity],
    [-Infinity, 4, Infinity],
    [-Infinity, 0.5, Infinity],
    [-Infinity, -3, -0],
    [0, 3, 0],
    [-0, 3, -0],
    [-0, 4, 0],
    [-0, 0.5, 0],
    [0, -3, Infinity],
    [-0, -3, -Infinity],
    [-0, -0.5, Infinity],
    [-8, 1 / 3, NaN],
    [-2, 65, -36893488147419103232],
    [-2, 9007199254740994, Infinity],
    [10, 400, Infinity],
    [10, -400, 0],
    [-10, -401, -0],
    [1e300, 1e300, Infinity],
    [1e300, -1e300, 0],
    [5e-324, 5e-324, 1],
    [5e-324, 64, 0],
    [5e-324, -64, Infinity],
  ])('pow(%d, %d) is exactly %d', (x, y, expected) => {
    expect(pow(x, y)).toBe(expected);
  });
});
