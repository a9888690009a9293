import { nextDown, nextUp, tan, toDyadic } from '../../expressions';
import type { Measure } from '../../contracts';

/** A polynomial in z = ω (boundary parameter) with complex integer coefficients, ascending powers. */
export interface ComplexCoefficients {
  readonly re: bigint[];
  readonly im: bigint[];
}

/**
 * What must not vanish on the box for one requirement, as a map from (broken, returned), the coefficients of
 * d + κ n in ascending powers of s, to polynomials in the real boundary parameter ω ≥ 0.
 *
 * | requirement | polynomial(s) |
 * | stability, decay rate σ | a(−σ + jω) |
 * | damping ratio ζ | a(ω(−x + j)), x = ζ/√(1 − ζ²) rounded up |
 * | gain margin g | d + κ n at κ = 1/g (rounded down) and κ = g |
 * | phase margin φ | a + jτ(2d − a) at τ = ± tan(φ/2) rounded up |
 * | modulus margin β | the pair a, d: abs(a) > β abs(d) |
 *
 * κ and τ enter with degree one, so their two end values (the sheets) carry the whole range by convexity.
 * All arithmetic is exact; results are scaled by 2^exponent, the same for every sheet and every coefficient.
 */
export interface BoundaryForm {
  readonly measure: Measure;
  readonly limit: number;
  /** Formal degree in s. */
  readonly degree: number;
  readonly exponent: number;
  /** Number of end values of κ or τ, 1 where there are none. */
  readonly sheets: number;
  /** Where the way between the two sheets may be cut, see `TensorShape`. */
  readonly cuts?: readonly number[];
  /** β for the modulus margin: the test is abs(first) > β abs(second); undefined: 0 must be excluded. */
  readonly discRadius: number | undefined;
  /** α = π/2 + asin ζ of the argument count; the angle one pole inside contributes. */
  readonly cosine: number;
  readonly sheetsAt: (broken: readonly bigint[], returned: readonly bigint[]) => ComplexCoefficients[];
}

/** Seven cuts make eight pieces of the range from −1 to 1. */
const EIGHTHS = [-0.75, -0.5, -0.25, 0, 0.25, 0.5, 0.75];

/** x with −x + j on the strict side of the ray of damping ratio ζ: ζ/√(1 − ζ²), rounded up by a few units. */
export function dampingSlope(ratio: number): number {
  if (ratio === 0) return 0;
  // Four correctly rounded operations err by less than 5 units; (1 − ζ)(1 + ζ) has no cancellation in ζ².
  let slope = ratio / Math.sqrt((1 - ratio) * (1 + ratio));
  for (let i = 0; i < 5; i++) slope = nextUp(slope);
  return slope;
}

/** tan(φ/2) rounded up. */
export function halfTurnTangent(angle: number): number {
  let tangent = tan(angle / 2);
  for (let i = 0; i < 4; i++) tangent = nextUp(tangent);
  return tangent;
}

export function boundaryForm(measure: Measure, limit: number, degree: number): BoundaryForm {
  const form = { measure, limit, degree, exponent: 0, sheets: 1, discRadius: undefined, cosine: 0 };
  switch (measure) {
    case 'stability':
      return { ...form, sheetsAt: (d, n) => [onAxis(sum(d, n))] };
    case 'decayRate': {
      const { mantissa, exponent } = toDyadic(limit);
      const down = Math.min(exponent, 0);
      return {
        ...form,
        exponent: down * degree,
        sheetsAt: (d, n) => [onAxis(shifted(sum(d, n), mantissa, exponent, degree))],
      };
    }
    case 'dampingRatio': {
      const { mantissa, exponent } = toDyadic(dampingSlope(limit));
      const down = Math.min(exponent, 0);
      const ray = rayPowers(-(mantissa << BigInt(exponent - down)), 1n << BigInt(-down), degree);
      return {
        ...form,
        exponent: down * degree,
        cosine: limit,
        sheetsAt: (d, n) => [onRay(sum(d, n), ray, -down, degree)],
      };
    }
    case 'gainMargin':
      return gainForm(form, limit === 1 ? 1 : nextDown(1 / limit), limit);
    case 'phaseMargin': {
      const { mantissa, exponent } = toDyadic(halfTurnTangent(limit));
      const down = Math.min(exponent, 0);
      const tangent = mantissa << BigInt(exponent - down);
      const turned = (d: readonly bigint[], n: readonly bigint[], factor: bigint): ComplexCoefficients =>
        times(
          d.map((value, k) => (value + n[k]) << BigInt(-down)),
          d.map((value, k) => (value - n[k]) * factor),
        );
      return {
        ...form,
        exponent: down,
        sheets: 2,
        // Equal angles θ on τ = tan(θ/2).
        cuts: EIGHTHS.map((part) => 0.5 + 0.5 * (tan((part * limit) / 2) / tan(limit / 2))),
        sheetsAt: (d, n) => [turned(d, n, tangent), turned(d, n, -tangent)],
      };
    }
    case 'modulusMargin':
      return { ...form, discRadius: limit, sheetsAt: (d, n) => [onAxis(sum(d, n)), onAxis([...d])] };
  }
}

/** The form of `d + κ n` at one value of κ, for counting the poles there. */
export function gainForm(form: Omit<BoundaryForm, 'sheetsAt'>, low: number, high: number): BoundaryForm {
  const ends = [toDyadic(low), toDyadic(high)];
  const down = Math.min(0, ...ends.map(({ exponent }) => exponent));
  return {
    ...form,
    exponent: down,
    sheets: 2,
    cuts: gainCuts(low, high),
    sheetsAt: (d, n) =>
      ends.map(({ mantissa, exponent }) => {
        const factor = mantissa << BigInt(exponent - down);
        return onAxis(d.map((value, k) => (value << BigInt(-down)) + n[k] * factor));
      }),
  };
}

/** Equal ratios of κ, from the middle outwards. */
function gainCuts(low: number, high: number): number[] {
  if (!(low < high)) return [];
  const between = (a: number, b: number): number => Math.sqrt(a) * Math.sqrt(b);
  const middle = between(low, high);
  const [lower, upper] = [between(low, middle), between(middle, high)];
  const factors = [
    between(low, lower),
    lower,
    between(lower, middle),
    middle,
    between(middle, upper),
    upper,
    between(upper, high),
  ];
  return factors.map((factor) => (factor - low) / (high - low));
}

function sum(a: readonly bigint[], b: readonly bigint[]): bigint[] {
  return a.map((value, k) => value + b[k]);
}

/** Coefficients of a(jω): a_k j^k. */
function onAxis(a: readonly bigint[]): ComplexCoefficients {
  return times(a, []);
}

/** Coefficients of (a + j b)(jω). */
function times(a: readonly bigint[], b: readonly bigint[]): ComplexCoefficients {
  const re: bigint[] = [];
  const im: bigint[] = [];
  a.forEach((value, k) => {
    const other = b[k] ?? 0n;
    const quarter = k % 4;
    re.push(quarter === 0 ? value : quarter === 1 ? -other : quarter === 2 ? -value : other);
    im.push(quarter === 0 ? other : quarter === 1 ? value : quarter === 2 ? -other : -value);
  });
  return { re, im };
}

/** Coefficients of a(z − σ) · 2^(−min(e, 0)·n) with σ = mantissa · 2^e. */
function shifted(a: readonly bigint[], mantissa: bigint, exponent: number, degree: number): bigint[] {
  return a.map((_, j) => {
    let result = 0n;
    let binomial = 1n;
    let power = 1n;
    for (let k = j; k < a.length; k++) {
      const shift = exponent < 0 ? -exponent * (degree - k + j) : exponent * (k - j);
      result += (a[k] * binomial * power) << BigInt(shift);
      binomial = (binomial * BigInt(k + 1)) / BigInt(k + 1 - j);
      power *= -mantissa;
    }
    return result;
  });
}

/** (re + j im)^k for k = 0 … degree. */
function rayPowers(re: bigint, im: bigint, degree: number): ComplexCoefficients {
  const powers: ComplexCoefficients = { re: [1n], im: [0n] };
  for (let k = 1; k <= degree; k++) {
    const x = powers.re[k - 1];
    const y = powers.im[k - 1];
    powers.re.push(x * re - y * im);
    powers.im.push(x * im + y * re);
  }
  return powers;
}

/** Coefficients of a(ω · direction), where the direction's powers carry 2^(bits·k): all are brought to 2^(bits·n). */
function onRay(
  a: readonly bigint[],
  powers: ComplexCoefficients,
  bits: number,
  degree: number,
): ComplexCoefficients {
  const scaled = a.map((value, k) => value << BigInt(bits * (degree - k)));
  return {
    re: scaled.map((value, k) => value * powers.re[k]),
    im: scaled.map((value, k) => value * powers.im[k]),
  };
}
