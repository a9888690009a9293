import { nextDown, toDyadic } from '../../expressions';
import type { Measure } from '../../contracts';
import { BoundaryPolynomials } from '../polynomial/bernstein-form';
import { type BoundaryForm, boundaryForm, gainForm } from '../polynomial/boundary-form';
import { degreeOf, evaluateExactly, type ExactPoint } from '../polynomial/exact-point';
import type { LoopPolynomial } from '../polynomial/loop-polynomial';
import { countOutside, countOutsideBothHalves } from '../polynomial/pole-count';
import type { LoopProbe } from './loop-probe';
import { requirementValue } from './requirement-value';
import type { CertainFailure, ProvableRequirement } from './searched-requirement';

/** Relative steps beyond a measured margin at which a failure is certified, from clear to faint. */
const STEPS_BEYOND = [1e-4, 1e-6, 1e-8];

/**
 * One requirement of one loop, ready to be searched: its boundary polynomials for exclusion, its value at points in
 * double precision for steering, and exact counts of poles for certificates.
 */
export class RequirementProblem implements ProvableRequirement {
  readonly polynomials: BoundaryPolynomials;
  private readonly form: BoundaryForm;
  private readonly nominalSign: bigint;

  constructor(
    readonly measure: Measure,
    readonly limit: number,
    readonly probe: LoopProbe,
    private readonly polynomial: LoopPolynomial,
    nominal: ArrayLike<number>,
    widest: readonly number[],
  ) {
    const degree = degreeOf(polynomial);
    this.form = boundaryForm(measure, limit, degree);
    this.polynomials = new BoundaryPolynomials(this.form, polynomial, nominal, widest);
    this.nominalSign = signOf(leadingCoefficient(evaluateExactly(polynomial, nominal)));
  }

  /** See `requirementValue`. */
  value(point: ArrayLike<number>): number {
    this.probe.visit(point);
    return requirementValue(this.probe, this.measure, this.limit);
  }

  /** True when an exact count shows every pole inside at this point (for a margin: the closed loop stable). */
  isInside(point: ArrayLike<number>): boolean {
    const exact = evaluateExactly(this.polynomial, point);
    return leadingCoefficient(exact) !== 0n && this.countPoles(exact) === 0;
  }

  /** A certificate that the requirement fails at a point, by an exact count; undefined where there is none. */
  failsCertainly(point: ArrayLike<number>): CertainFailure | undefined {
    const exact = evaluateExactly(this.polynomial, point);
    const leading = leadingCoefficient(exact);
    if (leading === 0n) return { throughInfinity: true };
    // A pole exactly at the origin: no count is needed, and none could tell it from one beside it.
    if (exact.broken[0] + exact.returned[0] === 0n) return { throughInfinity: false };
    const outside = this.countPoles(exact);
    if (outside !== undefined && outside > 0) {
      return { throughInfinity: signOf(leading) !== this.nominalSign && this.nominalSign !== 0n };
    }
    if (outside === 0 && this.marginFails(exact, point)) return { throughInfinity: false };
    return undefined;
  }

  private countPoles({ broken, returned }: ExactPoint): number | undefined {
    const { measure, limit, degree, cosine } = this.form;
    const form =
      measure === 'dampingRatio' || measure === 'decayRate'
        ? this.form
        : boundaryForm('stability', limit, degree);
    return countOutside(form.sheetsAt(broken, returned)[0], cosine);
  }

  private marginFails(exact: ExactPoint, point: ArrayLike<number>): boolean {
    switch (this.measure) {
      case 'gainMargin':
        return this.gainFails(exact, point);
      case 'phaseMargin':
        return this.phaseFails(exact, point);
      case 'modulusMargin':
        return this.modulusFails(exact, point);
      default:
        return false;
    }
  }

  private gainFails({ broken, returned }: ExactPoint, point: ArrayLike<number>): boolean {
    const low = this.limit === 1 ? 1 : nextDown(1 / this.limit);
    const outsideAt = (factor: number): boolean =>
      (countOutside(gainForm(this.form, factor, factor).sheetsAt(broken, returned)[0]) ?? 0) > 0;
    if (outsideAt(this.limit) || outsideAt(low)) return true;
    this.probe.visit(point);
    const margin = this.probe.withMargins()?.gainMargin();
    if (margin === undefined) return false;
    return STEPS_BEYOND.some((step) => {
      const up = margin.up * (1 + step);
      const down = margin.down * (1 - step);
      return (up < this.limit && outsideAt(up)) || (down > low && outsideAt(down));
    });
  }

  private phaseFails({ broken, returned }: ExactPoint, point: ArrayLike<number>): boolean {
    const outsideAt = (angle: number): boolean => {
      const [upper, lower] = boundaryForm('phaseMargin', angle, this.form.degree).sheetsAt(broken, returned);
      return (countOutsideBothHalves(upper, lower) ?? 0) > 0;
    };
    if (outsideAt(this.limit)) return true;
    this.probe.visit(point);
    const margin = this.probe.withMargins()?.phaseMargin();
    if (margin === undefined) return false;
    return STEPS_BEYOND.some((step) => {
      const angle = margin.value * (1 + step);
      return angle < this.limit && outsideAt(angle);
    });
  }

  private modulusFails(exact: ExactPoint, point: ArrayLike<number>): boolean {
    this.probe.visit(point);
    const margin = this.probe.withMargins()?.modulusMargin();
    if (margin === undefined) return false;
    return Number.isFinite(margin.frequency) && entersDisc(exact, this.limit, margin.frequency);
  }
}

function leadingCoefficient({ broken, returned }: ExactPoint): bigint {
  const last = broken.length - 1;
  return broken[last] + returned[last];
}

function signOf(value: bigint): bigint {
  return value > 0n ? 1n : value < 0n ? -1n : 0n;
}

/** Exactly: abs(a(jω))² < β² abs(d(jω))². */
function entersDisc({ broken, returned }: ExactPoint, beta: number, omega: number): boolean {
  const closed = broken.map((value, k) => value + returned[k]);
  const frequency = toDyadic(omega);
  const radius = toDyadic(beta);
  const left = squaredModulus(closed, frequency.mantissa, frequency.exponent);
  const right =
    squaredModulus(broken, frequency.mantissa, frequency.exponent) * radius.mantissa * radius.mantissa;
  // Both moduli carry the same scale; β² adds 2·exponent.
  const shift = 2 * radius.exponent;
  return shift >= 0 ? left < right << BigInt(shift) : left << BigInt(-shift) < right;
}

/** abs(p(jω))² times a power of two that depends on the degree and ω alone, ω = mantissa · 2^exponent. */
function squaredModulus(coefficients: readonly bigint[], mantissa: bigint, exponent: number): bigint {
  const degree = coefficients.length - 1;
  let re = 0n;
  let im = 0n;
  let power = 1n;
  coefficients.forEach((coefficient, k) => {
    const shift = exponent < 0 ? -exponent * (degree - k) : exponent * k;
    const value = (coefficient * power) << BigInt(shift);
    const quarter = k % 4;
    if (quarter === 0) re += value;
    else if (quarter === 1) im += value;
    else if (quarter === 2) re -= value;
    else im -= value;
    power *= mantissa;
  });
  return re * re + im * im;
}
