import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { ExactPolynomial, exponentPacking } from './exact-polynomial';
import { leastCommonMultiple, RationalFunction } from './rational-function';
import { denominatorAt, polynomialAt, rationalAt } from './testing/exact-value';
import { Fraction } from './testing/fraction';

const packing = exponentPacking(2);
const [x, y] = [0, 1].map((i) => new RationalFunction(ExactPolynomial.variable(packing, i)));
const constant = (value: number): RationalFunction => RationalFunction.constant(packing, value);

interface Built {
  readonly value: RationalFunction;
  /** The same by exact fractions; throws RangeError at a pole. */
  readonly at: (point: readonly Fraction[]) => Fraction;
  readonly text: string;
}

function reciprocal(built: Built): Built | undefined {
  return built.value.numerator.isZero
    ? undefined
    : {
        value: built.value.reciprocal(),
        at: (p) => new Fraction(1n).divide(built.at(p)),
        text: `1/(${built.text})`,
      };
}

const { built } = fc.letrec<{ built: Built }>((tie) => ({
  built: fc.oneof(
    { maxDepth: 4 },
    fc.constantFrom<Built>(
      { value: x, at: ([a]) => a, text: 'x' },
      { value: y, at: ([, b]) => b, text: 'y' },
      ...[0, 1, -2, 3, 0.1, 0.375].map((value) => ({
        value: constant(value),
        at: () => Fraction.of(value),
        text: String(value),
      })),
    ),
    fc.tuple(tie('built'), tie('built')).map(([a, b]) => ({
      value: a.value.add(b.value),
      at: (p: readonly Fraction[]) => a.at(p).add(b.at(p)),
      text: `(${a.text}+${b.text})`,
    })),
    fc.tuple(tie('built'), tie('built')).map(([a, b]) => ({
      value: a.value.multiply(b.value),
      at: (p: readonly Fraction[]) => a.at(p).multiply(b.at(p)),
      text: `(${a.text}*${b.text})`,
    })),
    tie('built').map((a) => ({
      value: a.value.negate(),
      at: (p: readonly Fraction[]) => a.at(p).negate(),
      text: `-${a.text}`,
    })),
    tie('built').map((a) => reciprocal(a) ?? a),
    fc.tuple(tie('built'), fc.integer({ min: -3, max: 3 })).map(([a, n]) =>
      a.value.numerator.isZero && n < 0
        ? a
        : {
            value: a.value.power(n),
            at: (p: readonly Fraction[]) => a.at(p).power(n),
            text: `(${a.text})^${n}`,
          },
    ),
  ),
}));

const coordinate = fc
  .tuple(fc.bigInt({ min: -50n, max: 50n }), fc.bigInt({ min: 1n, max: 20n }))
  .map(([n, d]) => new Fraction(n, d));

function valueOrPole(compute: () => Fraction): Fraction | undefined {
  try {
    return compute();
  } catch (error) {
    if (error instanceof RangeError) return undefined;
    throw error;
  }
}

describe('rational functions', () => {
  it('have the values that exact fractions give', () => {
    let compared = 0;
    fc.assert(
      fc.property(built, coordinate, coordinate, (f, a, b) => {
        const expected = valueOrPole(() => f.at([a, b]));
        const value = valueOrPole(() => rationalAt(f.value, [a, b]));
        if (expected === undefined) return;
        // A divisor inside, such as that of 1/(1/x), may have been multiplied out but never been lost.
        if (value === undefined) throw new Error(`${f.text} has a pole at ${a.toString()}, ${b.toString()}`);
        expect(value.compare(expected), f.text).toBe(0);
        compared++;
      }),
      { seed: 1, numRuns: 600 },
    );
    expect(compared).toBeGreaterThan(400);
  });

  it('share a divisor that occurs in several', () => {
    const divisor = x.add(y);
    const sum = constant(1).multiply(divisor.reciprocal()).add(x.multiply(divisor.reciprocal()));
    expect(sum.denominator.size).toBe(1);
    expect([...sum.denominator.values()][0].multiplicity).toBe(1);
    // The same divisor up to −4 is the same factor.
    const scaled = divisor.multiply(constant(-4)).reciprocal();
    expect([...sum.add(scaled).denominator.values()].map(({ multiplicity }) => multiplicity)).toEqual([1]);
    const squared = divisor.reciprocal().multiply(scaled);
    expect([...squared.denominator.values()].map(({ multiplicity }) => multiplicity)).toEqual([2]);
  });

  it('take a power of two into the numerator and keep other divisors', () => {
    expect(constant(-8).reciprocal().denominator.size).toBe(0);
    expect(rationalAt(constant(-8).reciprocal(), []).toString()).toBe('-1/8');
    expect(constant(3).reciprocal().denominator.size).toBe(1);
    expect(rationalAt(constant(3).reciprocal(), []).toString()).toBe('1/3');
  });

  it('come over the least common multiple without changing', () => {
    fc.assert(
      fc.property(built, built, coordinate, coordinate, (f, g, a, b) => {
        const common = leastCommonMultiple(f.value.denominator, g.value.denominator);
        const whole = new RationalFunction(f.value.numerator, common);
        const at = [a, b];
        // numerator over common · own denominator = common · own numerator
        const left = polynomialAt(f.value.over(common), at).multiply(denominatorAt(f.value, at));
        const right = polynomialAt(f.value.numerator, at).multiply(denominatorAt(whole, at));
        expect(left.compare(right)).toBe(0);
        for (const [key, { multiplicity }] of common) {
          const needed = [f, g].map(({ value }) => value.denominator.get(key)?.multiplicity ?? 0);
          expect(multiplicity).toBe(Math.max(...needed));
        }
      }),
      { seed: 2, numRuns: 200 },
    );
  });

  it('refuse a division by zero', () => {
    expect(() => constant(0).reciprocal()).toThrow(RangeError);
    expect(() => x.add(x.negate()).reciprocal()).toThrow(RangeError);
    expect(() => constant(0).power(-1)).toThrow(RangeError);
    expect(rationalAt(constant(0).power(0), []).toString()).toBe('1/1');
  });
});
