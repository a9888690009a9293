import { type Fraction, ONE, ZERO } from '../../../expressions/testing/fraction';

/** Exact complex rational numbers, for checking against. */
export class ComplexFraction {
  constructor(
    readonly re: Fraction,
    readonly im: Fraction = ZERO,
  ) {}

  add(other: ComplexFraction): ComplexFraction {
    return new ComplexFraction(this.re.add(other.re), this.im.add(other.im));
  }

  negate(): ComplexFraction {
    return new ComplexFraction(this.re.negate(), this.im.negate());
  }

  subtract(other: ComplexFraction): ComplexFraction {
    return this.add(other.negate());
  }

  multiply(other: ComplexFraction): ComplexFraction {
    return new ComplexFraction(
      this.re.multiply(other.re).subtract(this.im.multiply(other.im)),
      this.re.multiply(other.im).add(this.im.multiply(other.re)),
    );
  }

  scale(factor: Fraction): ComplexFraction {
    return new ComplexFraction(this.re.multiply(factor), this.im.multiply(factor));
  }

  /** abs(this)². */
  get squaredModulus(): Fraction {
    return this.re.multiply(this.re).add(this.im.multiply(this.im));
  }

  get isZero(): boolean {
    return this.re.isZero && this.im.isZero;
  }
}

export const COMPLEX_ZERO = new ComplexFraction(ZERO);
export const IMAGINARY_UNIT = new ComplexFraction(ZERO, ONE);

/** Σ coefficients[k] z^k by Horner's rule. */
export function complexPolynomialAt(
  coefficients: readonly ComplexFraction[],
  z: ComplexFraction,
): ComplexFraction {
  return coefficients.reduceRight((sum, coefficient) => sum.multiply(z).add(coefficient), COMPLEX_ZERO);
}
