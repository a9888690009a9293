import { describe, expect, it } from 'vitest';
import { Fraction, ONE, ZERO } from '../../expressions/testing/fraction';
import { degreeOf, evaluateExactly, variableDegrees } from './exact-point';
import type { ExactTerm, LoopPolynomial } from './loop-polynomial';
import { loopAt } from './testing/loop-at';
import { seededRandom } from './testing/random';

const random = seededRandom(31);

function terms(count: number, power: number, degrees: readonly number[]): ExactTerm[] {
  return Array.from({ length: count }, () => ({
    power: Math.floor(random() * (power + 1)),
    exponents: degrees.map((degree) => Math.floor(random() * (degree + 1))),
    coefficient: BigInt(Math.floor((random() - 0.5) * 2 ** 40)),
  }));
}

describe('a loop at one point', () => {
  it('has the exact coefficients', () => {
    for (const exponent of [-40, 0, 12]) {
      const polynomial: LoopPolynomial = {
        variables: 3,
        exponent,
        broken: terms(12, 5, [3, 0, 2]),
        returned: terms(6, 3, [1, 2, 2]),
        divisors: [],
      };
      for (const point of [
        [0.1, 3, -1e-9],
        [1e12, -0.7, 2 ** 60],
        [0, 0, 5e-324],
      ]) {
        const { broken, returned, exponent: common } = evaluateExactly(polynomial, point);
        expect(broken).toHaveLength(degreeOf(polynomial) + 1);
        const scale = Fraction.ofDyadic({ mantissa: 1n, exponent: common });
        const at = point.map((value) => Fraction.of(value));
        for (const s of [ZERO, ONE, new Fraction(-7n, 3n)]) {
          for (const kappa of [ZERO, ONE, new Fraction(2n, 5n)]) {
            const sum = broken.reduce(
              (total, value, k) =>
                total.add(
                  new Fraction(value).add(kappa.multiply(new Fraction(returned[k]))).multiply(s.power(k)),
                ),
              ZERO,
            );
            expect(sum.multiply(scale).compare(loopAt(polynomial, s, kappa, at))).toBe(0);
          }
        }
      }
    }
  });

  it('reads the degrees over both parts', () => {
    const polynomial: LoopPolynomial = {
      variables: 2,
      exponent: 0,
      broken: [{ power: 1, exponents: [3, 0], coefficient: 1n }],
      returned: [{ power: 4, exponents: [0, 2], coefficient: 1n }],
      divisors: [],
    };
    expect(degreeOf(polynomial)).toBe(4);
    expect(variableDegrees(polynomial)).toEqual([3, 2]);
  });
});
