import { type Dyadic, bitLength, fromDyadic, toDyadic } from '../dyadic';

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let [x, y] = [a < 0n ? -a : a, b < 0n ? -b : b];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** Exact rational numbers, for checking against. */
export class Fraction {
  readonly numerator: bigint;
  readonly denominator: bigint;

  constructor(numerator: bigint, denominator = 1n) {
    if (denominator === 0n) throw new RangeError('division by zero');
    const divisor = greatestCommonDivisor(numerator, denominator) * (denominator < 0n ? -1n : 1n);
    this.numerator = numerator / divisor;
    this.denominator = denominator / divisor;
  }

  /** The exact value of a finite double. */
  static of(value: number): Fraction {
    return Fraction.ofDyadic(toDyadic(value));
  }

  static ofDyadic({ mantissa, exponent }: Dyadic): Fraction {
    return exponent >= 0
      ? new Fraction(mantissa << BigInt(exponent))
      : new Fraction(mantissa, 1n << BigInt(-exponent));
  }

  add(other: Fraction): Fraction {
    return new Fraction(
      this.numerator * other.denominator + other.numerator * this.denominator,
      this.denominator * other.denominator,
    );
  }

  negate(): Fraction {
    return new Fraction(-this.numerator, this.denominator);
  }

  subtract(other: Fraction): Fraction {
    return this.add(other.negate());
  }

  multiply(other: Fraction): Fraction {
    return new Fraction(this.numerator * other.numerator, this.denominator * other.denominator);
  }

  divide(other: Fraction): Fraction {
    return new Fraction(this.numerator * other.denominator, this.denominator * other.numerator);
  }

  power(exponent: number): Fraction {
    let result = ONE;
    for (let i = 0; i < Math.abs(exponent); i++) result = result.multiply(this);
    return exponent < 0 ? ONE.divide(result) : result;
  }

  abs(): Fraction {
    return this.numerator < 0n ? this.negate() : this;
  }

  /** −1, 0 or 1 as this is below, equal to or above the other. */
  compare(other: Fraction): number {
    const difference = this.numerator * other.denominator - other.numerator * this.denominator;
    return difference < 0n ? -1 : difference > 0n ? 1 : 0;
  }

  get isZero(): boolean {
    return this.numerator === 0n;
  }

  /** The nearest double or its neighbour. */
  toNumber(): number {
    const shift = Math.max(0, bitLength(this.denominator) - bitLength(this.numerator) + 80);
    return fromDyadic((this.numerator << BigInt(shift)) / this.denominator, -shift);
  }

  toString(): string {
    return `${this.numerator}/${this.denominator}`;
  }
}

export const ZERO = new Fraction(0n);
export const ONE = new Fraction(1n);
