import { toDyadic } from '../../expressions';
import type { ExactTerm, LoopPolynomial } from './loop-polynomial';

/** Coefficients of d and n at one point, ascending powers of s, exact up to the common factor 2^exponent. */
export interface ExactPoint {
  readonly broken: bigint[];
  readonly returned: bigint[];
  readonly exponent: number;
}

/** Largest power of s with a coefficient that is not identically zero. */
export function degreeOf(polynomial: LoopPolynomial): number {
  let degree = 0;
  for (const { power } of [...polynomial.broken, ...polynomial.returned]) degree = Math.max(degree, power);
  return degree;
}

/** True degree in each variable, over both parts. */
export function variableDegrees(polynomial: LoopPolynomial): number[] {
  const degrees = new Array<number>(polynomial.variables).fill(0);
  for (const { exponents } of [...polynomial.broken, ...polynomial.returned]) {
    exponents.forEach((exponent, i) => (degrees[i] = Math.max(degrees[i], exponent)));
  }
  return degrees;
}

/** Evaluates d and n at a point with exact arithmetic. */
export function evaluateExactly(polynomial: LoopPolynomial, point: ArrayLike<number>): ExactPoint {
  const degrees = variableDegrees(polynomial);
  let exponent = polynomial.exponent;
  // powers[i][k]: p_i^k · 2^(shift that brings every power of p_i to one exponent)
  const powers = degrees.map((degree, i) => {
    const dyadic = toDyadic(point[i]);
    if (dyadic.exponent < 0) exponent += dyadic.exponent * degree;
    const list: bigint[] = [];
    let power = 1n;
    for (let k = 0; k <= degree; k++) {
      list.push(power << BigInt(dyadic.exponent < 0 ? -dyadic.exponent * (degree - k) : dyadic.exponent * k));
      power *= dyadic.mantissa;
    }
    return list;
  });
  const degree = degreeOf(polynomial);
  const collect = (terms: readonly ExactTerm[]): bigint[] => {
    const result = new Array<bigint>(degree + 1).fill(0n);
    for (const { power, exponents, coefficient } of terms) {
      let value = coefficient;
      for (let i = 0; i < exponents.length; i++) value *= powers[i][exponents[i]];
      result[power] += value;
    }
    return result;
  };
  return { broken: collect(polynomial.broken), returned: collect(polynomial.returned), exponent };
}
