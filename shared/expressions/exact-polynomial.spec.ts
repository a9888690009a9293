import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  ExactPolynomial,
  exponentOf,
  exponentPacking,
  ExpansionLimitError,
  MAXIMUM_POLYNOMIAL_TERMS,
} from './exact-polynomial';
import { polynomialAt } from './testing/exact-value';
import { Fraction } from './testing/fraction';

const packing = exponentPacking(3);
const one = ExactPolynomial.constant(packing, 1);
const zero = ExactPolynomial.constant(packing, 0);
const [x, y, z] = [0, 1, 2].map((i) => ExactPolynomial.variable(packing, i));

function power(base: ExactPolynomial, exponent: number): ExactPolynomial {
  let result = one;
  for (let i = 0; i < exponent; i++) result = result.multiply(base);
  return result;
}

const coefficient = fc.oneof(
  fc.integer({ min: -3, max: 3 }).map(Number),
  fc.double({ min: -1e6, max: 1e6, noNaN: true }),
  fc.double({ noNaN: true, noDefaultInfinity: true }),
);
const polynomial = fc
  .array(fc.tuple(coefficient, fc.nat(3), fc.nat(3), fc.nat(3)), { maxLength: 5 })
  .map((terms) =>
    terms.reduce(
      (sum, [value, i, j, k]) =>
        sum.add(
          ExactPolynomial.constant(packing, value)
            .multiply(power(x, i))
            .multiply(power(y, j))
            .multiply(power(z, k)),
        ),
      zero,
    ),
  );
const rational = fc
  .tuple(fc.bigInt({ min: -99n, max: 99n }), fc.bigInt({ min: 1n, max: 40n }))
  .map(([n, d]) => new Fraction(n, d));
const point = fc.tuple(rational, rational, rational);

/** Equal as polynomials: the difference has no terms left. */
function same(a: ExactPolynomial, b: ExactPolynomial): boolean {
  return a.add(b.negate()).isZero;
}

describe('exact polynomials', () => {
  it('obey the laws of a ring', () => {
    fc.assert(
      fc.property(polynomial, polynomial, polynomial, (a, b, c) => {
        expect(same(a.add(b), b.add(a))).toBe(true);
        expect(same(a.add(b).add(c), a.add(b.add(c)))).toBe(true);
        expect(same(a.add(zero), a)).toBe(true);
        expect(a.add(a.negate()).isZero).toBe(true);
        expect(same(a.multiply(b), b.multiply(a))).toBe(true);
        expect(same(a.multiply(b).multiply(c), a.multiply(b.multiply(c)))).toBe(true);
        expect(same(a.multiply(one), a)).toBe(true);
        expect(a.multiply(zero).isZero).toBe(true);
        expect(same(a.multiply(b.add(c)), a.multiply(b).add(a.multiply(c)))).toBe(true);
        expect(same(a.negate().multiply(b), a.multiply(b).negate())).toBe(true);
      }),
      { seed: 1, numRuns: 200 },
    );
  });

  it('are added and multiplied as their values are', () => {
    fc.assert(
      fc.property(polynomial, polynomial, point, (a, b, at) => {
        const [left, right] = [polynomialAt(a, at), polynomialAt(b, at)];
        expect(polynomialAt(a.add(b), at).compare(left.add(right))).toBe(0);
        expect(polynomialAt(a.multiply(b), at).compare(left.multiply(right))).toBe(0);
        expect(polynomialAt(a.negate(), at).compare(left.negate())).toBe(0);
      }),
      { seed: 2, numRuns: 200 },
    );
  });

  it('have no zero divisors and exact degrees', () => {
    fc.assert(
      fc.property(polynomial, polynomial, (a, b) => {
        const product = a.multiply(b);
        expect(product.isZero).toBe(a.isZero || b.isZero);
        if (product.isZero) return;
        expect(product.degrees).toEqual(a.degrees.map((degree, i) => degree + b.degrees[i]));
      }),
      { seed: 3, numRuns: 200 },
    );
  });

  it('store no zero and forget a degree that cancels', () => {
    const tenth = ExactPolynomial.constant(packing, 0.1);
    const sum = x.multiply(x).multiply(tenth).add(y);
    const rest = sum.add(x.multiply(x).multiply(tenth).negate());
    expect(rest.degrees).toEqual([0, 1, 0]);
    expect([...rest.terms.values()]).not.toContain(0n);
    // (x + y)(x − y) has no mixed term.
    const product = x.add(y).multiply(x.add(y.negate()));
    expect(product.terms.size).toBe(2);
    // 0.1 + 0.2 is not 0.3 in exact arithmetic over doubles.
    const parts = [0.1, 0.2, -0.3].map((value) => ExactPolynomial.constant(packing, value));
    expect(parts[0].add(parts[1]).add(parts[2]).isZero).toBe(false);
  });

  it('tell a constant from what varies', () => {
    expect(zero.constantValue).toEqual({ mantissa: 0n, exponent: 0 });
    expect(ExactPolynomial.constant(packing, -0.75).constantValue).toEqual({ mantissa: -3n, exponent: -2 });
    expect(x.constantValue).toBeUndefined();
    expect(x.add(one).constantValue).toBeUndefined();
    expect(x.add(one).add(x.negate()).constantValue).toEqual({ mantissa: 1n, exponent: 0 });
  });

  it('have the same primitive when they differ by ±2^e, and are restored by their constant', () => {
    fc.assert(
      fc.property(polynomial, fc.integer({ min: -200, max: 200 }), fc.boolean(), (a, exponent, negative) => {
        fc.pre(!a.isZero);
        const factor = ExactPolynomial.constant(packing, { mantissa: negative ? -1n : 1n, exponent });
        const { constant, primitive } = a.primitive();
        expect(a.multiply(factor).primitive().primitive.fingerprint).toBe(primitive.fingerprint);
        expect(same(primitive.multiply(ExactPolynomial.constant(packing, constant)), a)).toBe(true);
        expect(primitive.exponent).toBe(0);
        expect([...primitive.terms.values()].some((value) => value % 2n !== 0n)).toBe(true);
      }),
      { seed: 4, numRuns: 200 },
    );
  });

  it('have different fingerprints when they differ', () => {
    const list = [one, x, y, x.add(one), x.add(one.negate()), x.multiply(x), x.add(x)];
    expect(new Set(list.map(({ fingerprint }) => fingerprint)).size).toBe(list.length);
  });
});

describe('limits of exact polynomials', () => {
  it.each([1, 2, 8, 10, 26])('%i variables keep their exponents apart', (variables) => {
    const own = exponentPacking(variables);
    let product = ExactPolynomial.constant(own, 1);
    let key = 0;
    for (let i = 0; i < variables; i++) {
      for (let k = 0; k < own.largest; k++) product = product.multiply(ExactPolynomial.variable(own, i));
    }
    for (key of product.terms.keys()) expect(Number.isSafeInteger(key)).toBe(true);
    for (let i = 0; i < variables; i++) expect(exponentOf(key, i, own.bits)).toBe(own.largest);
    expect(() => product.multiply(ExactPolynomial.variable(own, variables - 1))).toThrow(
      /a power above \d+, the largest that is expanded/,
    );
  });

  it('more than 26 variables are refused', () => {
    expect(() => exponentPacking(27)).toThrow(ExpansionLimitError);
    expect(exponentPacking(0).largest).toBe(63);
  });

  it('products with too many terms are refused', () => {
    const sum = (variable: ExactPolynomial): ExactPolynomial => {
      let result = one;
      for (let k = 1; k <= 40; k++) result = result.add(power(variable, k));
      return result;
    };
    const flat = sum(x).multiply(sum(y));
    expect(flat.terms.size).toBe(41 * 41);
    expect(41 * 41 * 41).toBeGreaterThan(MAXIMUM_POLYNOMIAL_TERMS);
    expect(() => flat.multiply(sum(z))).toThrow(ExpansionLimitError);
    expect(() => flat.multiply(flat)).toThrow(ExpansionLimitError);
  });
});
