import { type Dyadic, toDyadic, trailingZeros } from './dyadic';

/** An expansion would pass a stated limit; the message names it. */
export class ExpansionLimitError extends Error {
  override readonly name = 'ExpansionLimitError';
}

/** Most terms of one polynomial in the parameters, and of one product of two. */
export const MAXIMUM_POLYNOMIAL_TERMS = 20_000;

/** Longest coefficient, in bits: repeated squaring of constants would double it without end. */
export const MAXIMUM_COEFFICIENT_BITS = 50_000;

/**
 * How exponent vectors are packed into one number: `bits` binary digits per variable, variable 0 lowest.
 * Keys stay below 2^52, so adding two keys adds the exponents and is exact.
 */
export interface ExponentPacking {
  readonly variables: number;
  readonly bits: number;
  readonly largest: number;
}

export function exponentPacking(variables: number): ExponentPacking {
  const bits = Math.min(6, Math.floor(52 / Math.max(variables, 1)));
  if (bits < 2)
    throw new ExpansionLimitError(`${variables} toleranced parameters are too many; at most 26 are read`);
  return { variables, bits, largest: powerOfTwoInteger(bits) - 1 };
}

function powerOfTwoInteger(exponent: number): number {
  let result = 1;
  for (let i = 0; i < exponent; i++) result *= 2;
  return result;
}

/** Exponent of one variable in a packed key. */
export function exponentOf(key: number, variable: number, bits: number): number {
  const base = powerOfTwoInteger(bits);
  return Math.floor(key / powerOfTwoInteger(bits * variable)) % base;
}

/**
 * A polynomial in the toleranced parameters with exact coefficients: Σ terms[key] · 2^exponent · p^key.
 * Every double is m · 2^e, so sums, differences and products of polynomials over doubles are exact.
 * Zero coefficients are never stored: the degrees read off the terms are the true ones.
 */
export class ExactPolynomial {
  private degreeCache: number[] | undefined;

  private constructor(
    readonly packing: ExponentPacking,
    readonly exponent: number,
    readonly terms: ReadonlyMap<number, bigint>,
  ) {}

  static constant(packing: ExponentPacking, value: number | Dyadic): ExactPolynomial {
    const { mantissa, exponent } = typeof value === 'number' ? toDyadic(value) : value;
    return new ExactPolynomial(packing, exponent, mantissa === 0n ? new Map() : new Map([[0, mantissa]]));
  }

  static variable(packing: ExponentPacking, variable: number): ExactPolynomial {
    return new ExactPolynomial(packing, 0, new Map([[powerOfTwoInteger(packing.bits * variable), 1n]]));
  }

  static fromTerms(packing: ExponentPacking, exponent: number, terms: Map<number, bigint>): ExactPolynomial {
    for (const [key, coefficient] of terms) if (coefficient === 0n) terms.delete(key);
    if (terms.size > MAXIMUM_POLYNOMIAL_TERMS) {
      throw new ExpansionLimitError(`an expression expands to more than ${MAXIMUM_POLYNOMIAL_TERMS} terms`);
    }
    return new ExactPolynomial(packing, exponent, terms);
  }

  get isZero(): boolean {
    return this.terms.size === 0;
  }

  /** The value when the polynomial does not depend on any variable. */
  get constantValue(): Dyadic | undefined {
    if (this.terms.size === 0) return { mantissa: 0n, exponent: 0 };
    const mantissa = this.terms.size === 1 ? this.terms.get(0) : undefined;
    return mantissa === undefined ? undefined : { mantissa, exponent: this.exponent };
  }

  /** True degree in each variable. */
  get degrees(): readonly number[] {
    this.degreeCache ??= Array.from({ length: this.packing.variables }, (_, variable) => {
      let degree = 0;
      for (const key of this.terms.keys())
        degree = Math.max(degree, exponentOf(key, variable, this.packing.bits));
      return degree;
    });
    return this.degreeCache;
  }

  add(other: ExactPolynomial): ExactPolynomial {
    if (this.isZero) return other;
    if (other.isZero) return this;
    const exponent = Math.min(this.exponent, other.exponent);
    const ownShift = BigInt(this.exponent - exponent);
    const otherShift = BigInt(other.exponent - exponent);
    const terms = new Map<number, bigint>();
    for (const [key, coefficient] of this.terms) terms.set(key, coefficient << ownShift);
    for (const [key, coefficient] of other.terms) {
      terms.set(key, (terms.get(key) ?? 0n) + (coefficient << otherShift));
    }
    return ExactPolynomial.fromTerms(this.packing, exponent, terms);
  }

  negate(): ExactPolynomial {
    const terms = new Map<number, bigint>();
    for (const [key, coefficient] of this.terms) terms.set(key, -coefficient);
    return new ExactPolynomial(this.packing, this.exponent, terms);
  }

  multiply(other: ExactPolynomial): ExactPolynomial {
    this.checkProduct(other);
    const terms = new Map<number, bigint>();
    for (const [key, coefficient] of this.terms) {
      for (const [otherKey, otherCoefficient] of other.terms) {
        const sum = key + otherKey;
        terms.set(sum, (terms.get(sum) ?? 0n) + coefficient * otherCoefficient);
      }
    }
    for (const coefficient of terms.values()) {
      if (BigInt.asIntN(MAXIMUM_COEFFICIENT_BITS, coefficient) !== coefficient) {
        throw new ExpansionLimitError(
          `an expression needs more than ${MAXIMUM_COEFFICIENT_BITS} binary digits to be exact; shorten its chain of products`,
        );
      }
    }
    return ExactPolynomial.fromTerms(this.packing, this.exponent + other.exponent, terms);
  }

  private checkProduct(other: ExactPolynomial): void {
    if (this.terms.size * other.terms.size > MAXIMUM_POLYNOMIAL_TERMS * 50) {
      throw new ExpansionLimitError(`an expression expands to more than ${MAXIMUM_POLYNOMIAL_TERMS} terms`);
    }
    this.degrees.forEach((degree, variable) => {
      if (degree + other.degrees[variable] > this.packing.largest) {
        throw new ExpansionLimitError(
          `a toleranced parameter enters with a power above ${this.packing.largest}, the largest that is expanded`,
        );
      }
    });
  }

  /**
   * Splits off a constant: this = constant · primitive, where the primitive's coefficients have no common power of
   * two and its leading term is positive. Two polynomials that differ by such a constant have equal primitives.
   */
  primitive(): { readonly constant: Dyadic; readonly primitive: ExactPolynomial } {
    let zeros = Infinity;
    let leadingKey = -1;
    for (const [key, coefficient] of this.terms) {
      zeros = Math.min(zeros, trailingZeros(coefficient));
      leadingKey = Math.max(leadingKey, key);
    }
    const sign = (this.terms.get(leadingKey) ?? 1n) < 0n ? -1n : 1n;
    const terms = new Map<number, bigint>();
    for (const [key, coefficient] of this.terms) terms.set(key, (coefficient >> BigInt(zeros)) * sign);
    return {
      constant: { mantissa: sign, exponent: this.exponent + zeros },
      primitive: new ExactPolynomial(this.packing, 0, terms),
    };
  }

  /** A text that is equal for equal polynomials only. */
  get fingerprint(): string {
    const entries = [...this.terms].sort((a, b) => a[0] - b[0]);
    return `${this.exponent}:${entries.map(([key, coefficient]) => `${key}=${coefficient.toString(16)}`).join(',')}`;
  }
}
