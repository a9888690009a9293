import { Fraction, ONE, ZERO } from '../../../expressions/testing/fraction';
import type { ExactTerm, LoopPolynomial } from '../loop-polynomial';

/** d + κ n at rational values of s, κ and the variables, exact. */
export function loopAt(
  polynomial: LoopPolynomial,
  s: Fraction,
  kappa: Fraction,
  point: readonly Fraction[],
): Fraction {
  const sum = (terms: readonly ExactTerm[]): Fraction =>
    terms.reduce((total, { power, exponents, coefficient }) => {
      const product = exponents.reduce(
        (value, exponent, i) => value.multiply(point[i].power(exponent)),
        s.power(power),
      );
      return total.add(product.multiply(new Fraction(coefficient)));
    }, ZERO);
  return sum(polynomial.broken)
    .add(kappa.multiply(sum(polynomial.returned)))
    .multiply(Fraction.ofDyadic({ mantissa: 1n, exponent: polynomial.exponent }));
}

/** The determinant of a square matrix by Gauss elimination over the rational numbers. */
export function exactDeterminant(matrix: readonly (readonly Fraction[])[]): Fraction {
  const rows = matrix.map((row) => [...row]);
  let determinant = ONE;
  for (let column = 0; column < rows.length; column++) {
    const pivot = rows.findIndex((row, i) => i >= column && !row[column].isZero);
    if (pivot < 0) return ZERO;
    if (pivot !== column) {
      [rows[pivot], rows[column]] = [rows[column], rows[pivot]];
      determinant = determinant.negate();
    }
    const lead = rows[column][column];
    determinant = determinant.multiply(lead);
    for (const row of rows.slice(column + 1)) {
      const factor = row[column].divide(lead);
      if (factor.isZero) continue;
      for (let j = column; j < rows.length; j++) row[j] = row[j].subtract(factor.multiply(rows[column][j]));
    }
  }
  return determinant;
}
