import { type ExactPolynomial, exponentOf, fromDyadic } from '../../expressions';
import { BoundaryPolynomials } from '../polynomial/bernstein-form';
import { boundaryForm } from '../polynomial/boundary-form';
import { evaluateExactly } from '../polynomial/exact-point';
import type { LoopPolynomial } from '../polynomial/loop-polynomial';
import type { LoopProbe } from './loop-probe';
import type { CertainFailure, ProvableRequirement } from './searched-requirement';

/**
 * That a divisor of the loop's entries does not vanish: where it does the loop is not defined, although the cleared
 * polynomial may know nothing of it. It counts as a part of stability.
 */
export class DivisorProblem implements ProvableRequirement {
  readonly measure = 'stability';
  readonly limit = 0;
  readonly polynomials: BoundaryPolynomials;
  private readonly polynomial: LoopPolynomial;
  private readonly nominalSign: number;

  constructor(
    divisor: ExactPolynomial,
    readonly probe: LoopProbe,
    nominal: ArrayLike<number>,
    widest: readonly number[],
  ) {
    const { variables, bits } = divisor.packing;
    const broken = [...divisor.terms].map(([key, coefficient]) => ({
      power: 0,
      exponents: Array.from({ length: variables }, (_, i) => exponentOf(key, i, bits)),
      coefficient,
    }));
    this.polynomial = { variables, exponent: divisor.exponent, broken, returned: [], divisors: [] };
    this.polynomials = new BoundaryPolynomials(
      boundaryForm('stability', 0, 0),
      this.polynomial,
      nominal,
      widest,
    );
    this.nominalSign = this.divisorAt(nominal) < 0 ? -1 : 1;
  }

  private divisorAt(point: ArrayLike<number>): number {
    const { broken, exponent } = evaluateExactly(this.polynomial, point);
    return fromDyadic(broken[0], exponent);
  }

  /** The divisor with the sign it has at the nominal point. */
  value(point: ArrayLike<number>): number {
    return this.nominalSign * this.divisorAt(point);
  }

  isInside(point: ArrayLike<number>): boolean {
    return this.divisorAt(point) !== 0;
  }

  /** Beyond a zero the loop is defined again: only the zero itself is a failure. */
  failsCertainly(point: ArrayLike<number>): CertainFailure | undefined {
    return this.divisorAt(point) === 0 ? { throughInfinity: true } : undefined;
  }
}
