import { type ExactPolynomial, exponentOf } from '../exact-polynomial';
import type { RationalFunction } from '../rational-function';
import { Fraction, ZERO } from './fraction';

/** The exact value of a polynomial at a rational point. */
export function polynomialAt(polynomial: ExactPolynomial, point: readonly Fraction[]): Fraction {
  let sum = ZERO;
  for (const [key, coefficient] of polynomial.terms) {
    let term = new Fraction(coefficient);
    point.forEach((value, variable) => {
      term = term.multiply(value.power(exponentOf(key, variable, polynomial.packing.bits)));
    });
    sum = sum.add(term);
  }
  return sum.multiply(Fraction.ofDyadic({ mantissa: 1n, exponent: polynomial.exponent }));
}

/** The product of a rational function's denominator factors at a rational point. */
export function denominatorAt({ denominator }: RationalFunction, point: readonly Fraction[]): Fraction {
  let product = new Fraction(1n);
  for (const { factor, multiplicity } of denominator.values()) {
    product = product.multiply(polynomialAt(factor, point).power(multiplicity));
  }
  return product;
}

/** The exact value of a rational function at a rational point. @throws RangeError at a pole */
export function rationalAt(value: RationalFunction, point: readonly Fraction[]): Fraction {
  return polynomialAt(value.numerator, point).divide(denominatorAt(value, point));
}
