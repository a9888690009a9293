import { Fraction, ONE } from '../../../expressions/testing/fraction';
import type { BernsteinKernel } from '../bernstein-kernel';
import { COMPLEX_ZERO, ComplexFraction } from './complex-fraction';

function binomial(n: number, k: number): bigint {
  let result = 1n;
  for (let i = 0; i < k; i++) result = (result * BigInt(n - i)) / BigInt(i + 1);
  return result;
}

/** The Bernstein polynomials of one degree at a point of [0, 1], exact. */
export function bernsteinWeights(degree: number, at: Fraction): Fraction[] {
  const rest = ONE.subtract(at);
  return Array.from({ length: degree + 1 }, (_, k) =>
    new Fraction(binomial(degree, k)).multiply(at.power(k)).multiply(rest.power(degree - k)),
  );
}

/**
 * The exact value of a polynomial whose Bernstein coefficients are the doubles stored in a box, and the bound of its
 * error that the radii give there, Σ R_k B_k(t).
 *
 * @param at point of the unit cube: the variables in order, then t
 * @param sheet which of the end values of the parameter that is never split
 */
export function bernsteinValueAt(
  kernel: BernsteinKernel,
  box: Float64Array,
  at: readonly Fraction[],
  polynomial = 0,
  sheet = 0,
): { value: ComplexFraction; radius: Fraction } {
  const { shape, size } = kernel;
  const degrees = [...shape.degrees, shape.degree];
  let weights = [ONE];
  degrees.forEach((degree, i) => {
    const own = bernsteinWeights(degree, at[i]);
    weights = weights.flatMap((weight) => own.map((other) => weight.multiply(other)));
  });
  const start = polynomial * 2 * size + (sheet * size) / shape.sheets;
  let value = COMPLEX_ZERO;
  weights.forEach((weight, i) => {
    const coefficient = new ComplexFraction(Fraction.of(box[start + i]), Fraction.of(box[start + size + i]));
    value = value.add(coefficient.scale(weight));
  });
  let radius = new Fraction(0n);
  bernsteinWeights(shape.degree, at[degrees.length - 1]).forEach((weight, k) => {
    radius = radius.add(Fraction.of(box[kernel.radiusOffset(polynomial) + k]).multiply(weight));
  });
  return { value, radius };
}
