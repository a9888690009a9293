import { ExactPolynomial, type ExponentPacking } from './exact-polynomial';

/** A divisor that several entries may share, with its multiplicity. */
export interface DenominatorFactor {
  readonly factor: ExactPolynomial;
  readonly multiplicity: number;
}

/** Denominators by the fingerprint of their factors. */
export type Denominator = ReadonlyMap<string, DenominatorFactor>;

const NONE: Denominator = new Map();

/**
 * numerator / Π factor^multiplicity over polynomials with exact coefficients. Factors are kept apart, not multiplied
 * out, so that a matrix row is cleared by the least common multiple of its denominators.
 * A division by zero is left to the domain check: a zero divisor throws RangeError here.
 */
export class RationalFunction {
  constructor(
    readonly numerator: ExactPolynomial,
    readonly denominator: Denominator = NONE,
  ) {}

  static constant(packing: ExponentPacking, value: number): RationalFunction {
    return new RationalFunction(ExactPolynomial.constant(packing, value));
  }

  add(other: RationalFunction): RationalFunction {
    if (this.numerator.isZero) return other;
    if (other.numerator.isZero) return this;
    const common = leastCommonMultiple(this.denominator, other.denominator);
    return new RationalFunction(this.over(common).add(other.over(common)), common);
  }

  negate(): RationalFunction {
    return new RationalFunction(this.numerator.negate(), this.denominator);
  }

  multiply(other: RationalFunction): RationalFunction {
    const numerator = this.numerator.multiply(other.numerator);
    if (numerator.isZero) return new RationalFunction(numerator);
    const factors = new Map(this.denominator);
    for (const [key, { factor, multiplicity }] of other.denominator) {
      factors.set(key, { factor, multiplicity: multiplicity + (factors.get(key)?.multiplicity ?? 0) });
    }
    return new RationalFunction(numerator, factors);
  }

  reciprocal(): RationalFunction {
    if (this.numerator.isZero) throw new RangeError('division by zero');
    const { constant, primitive } = this.numerator.primitive();
    let numerator = ExactPolynomial.constant(primitive.packing, {
      mantissa: constant.mantissa,
      exponent: -constant.exponent,
    });
    for (const { factor, multiplicity } of this.denominator.values()) {
      for (let i = 0; i < multiplicity; i++) numerator = numerator.multiply(factor);
    }
    const value = primitive.constantValue;
    // A divisor ±2^e is exact in the numerator already.
    if (value !== undefined && value.mantissa === 1n) return new RationalFunction(numerator);
    return new RationalFunction(
      numerator,
      new Map([[primitive.fingerprint, { factor: primitive, multiplicity: 1 }]]),
    );
  }

  power(exponent: number): RationalFunction {
    let result = RationalFunction.constant(this.numerator.packing, 1);
    const base = exponent < 0 ? this.reciprocal() : this;
    for (let i = 0; i < Math.abs(exponent); i++) result = result.multiply(base);
    return result;
  }

  /** The numerator over a common denominator that holds this one's factors at least as often. */
  over(common: Denominator): ExactPolynomial {
    let numerator = this.numerator;
    for (const [key, { factor, multiplicity }] of common) {
      const missing = multiplicity - (this.denominator.get(key)?.multiplicity ?? 0);
      for (let i = 0; i < missing; i++) numerator = numerator.multiply(factor);
    }
    return numerator;
  }
}

export function leastCommonMultiple(a: Denominator, b: Denominator): Denominator {
  if (b.size === 0) return a;
  const result = new Map(a);
  for (const [key, entry] of b) {
    const own = result.get(key);
    if (own === undefined || own.multiplicity < entry.multiplicity) result.set(key, entry);
  }
  return result;
}
