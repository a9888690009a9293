import { bitLength, fromDyadic, powerOfTwo, toDyadic } from '../../expressions';
import { BernsteinKernel } from './bernstein-kernel';
import type { BoundaryForm, ComplexCoefficients } from './boundary-form';
import { degreeOf, evaluateExactly, variableDegrees } from './exact-point';
import type { ExactTerm, LoopPolynomial } from './loop-polynomial';
import { UNIT_ROUNDOFF } from './rounding';

/** A box in SI units: one closed range per variable. */
export interface Range {
  readonly low: number;
  readonly high: number;
}

/**
 * One requirement's boundary polynomials in the power basis, scaled by powers of two in every variable, in ω and in
 * value, ready to be put into Bernstein form on any box.
 */
export class BoundaryPolynomials {
  readonly kernel: BernsteinKernel;
  /** ω_s of the chart ω = ω_s t/(1 − t). */
  readonly frequencyScale: number;
  private readonly power: Float64Array;
  private readonly magnitude: Float64Array;
  private readonly scratch: Float64Array;
  private readonly scales: number[];

  /**
   * @param nominal a point at which ω_s is taken from the moduli of the poles
   * @param widest the largest absolute value each variable will ever take, for the scaling alone
   */
  constructor(
    readonly form: BoundaryForm,
    polynomial: LoopPolynomial,
    nominal: ArrayLike<number>,
    widest: readonly number[],
  ) {
    const degrees = variableDegrees(polynomial);
    const sheets = form.discRadius === undefined ? form.sheets : 1;
    const { degree, cuts, discRadius } = form;
    this.kernel = new BernsteinKernel({ degrees, degree, sheets, cuts, discRadius });
    const slope = chartSlope(polynomial, nominal);
    this.frequencyScale = powerOfTwo(Math.max(-1000, Math.min(1000, slope)));
    const scaleExponents = widest.map((value) => (value === 0 ? 0 : binaryExponent(value)));
    this.scales = scaleExponents.map((exponent) => powerOfTwo(-exponent));
    const parts = this.kernel.polynomials * this.kernel.size;
    this.power = new Float64Array(2 * parts);
    this.magnitude = new Float64Array(parts);
    this.scratch = new Float64Array(parts);
    this.fill(polynomial, slope, scaleExponents);
  }

  private fill(polynomial: LoopPolynomial, slope: number, scaleExponents: readonly number[]): void {
    const { form, kernel } = this;
    const groups = groupByExponents(polynomial, form.degree);
    const rows = [...groups.values()].map((group) => ({
      exponents: group.exponents,
      shift: group.exponents.reduce((sum, exponent, i) => sum + exponent * scaleExponents[i], 0),
      sheets: form.sheetsAt(group.broken, group.returned),
    }));
    let top = -Infinity;
    for (const { shift, sheets } of rows) top = Math.max(top, largestExponent(sheets, shift, slope));
    for (const { exponents, shift, sheets } of rows) {
      const row = this.rowOffset(exponents);
      sheets.forEach((sheet, index) => {
        // A disc's two polynomials are stored one behind the other, sheets within one polynomial.
        const start =
          form.discRadius === undefined
            ? row + (index * kernel.size) / form.sheets
            : row + index * 2 * kernel.size;
        sheet.re.forEach((value, k) => {
          const exponent = shift + slope * k - top;
          this.power[start + k] = fromDyadic(value, exponent);
          this.power[start + kernel.size + k] = fromDyadic(sheet.im[k], exponent);
        });
      });
    }
    for (let polynomialIndex = 0; polynomialIndex < kernel.polynomials; polynomialIndex++) {
      for (let i = 0; i < kernel.size; i++) {
        const at = polynomialIndex * 2 * kernel.size + i;
        this.magnitude[polynomialIndex * kernel.size + i] =
          Math.abs(this.power[at]) + Math.abs(this.power[at + kernel.size]);
      }
    }
  }

  private rowOffset(exponents: readonly number[]): number {
    let offset = 0;
    this.kernel.shape.degrees.forEach((degree, i) => (offset = offset * (degree + 1) + exponents[i]));
    return offset * this.kernel.columns;
  }

  /**
   * Writes the Bernstein form on a box. With W the conversion of one variable,
   * b = (W_1 ⊗ … ⊗ W_m) c, and the error of the whole chain of rounded sums is at most
   * γ · (abs W_1 ⊗ … ⊗ abs W_m) abs(c), γ counting the operations (Higham 2002, section 3.1).
   */
  load(box: Float64Array, ranges: readonly Range[]): void {
    const { kernel, scratch } = this;
    const { size, columns, shape } = kernel;
    box.set(this.power);
    scratch.set(this.magnitude);
    let operations = 4;
    ranges.forEach(({ low, high }, variable) => {
      const degree = shape.degrees[variable];
      if (degree === 0) return;
      const scale = this.scales[variable];
      const conversion = bernsteinConversion(degree, low * scale, high * scale);
      const stride = strideOf(shape.degrees, variable, columns);
      applyAlong(box, kernel.polynomials * 2 * size, stride, degree, conversion.weights);
      applyAlong(scratch, kernel.polynomials * size, stride, degree, conversion.bounds);
      operations += 4 * degree + 8;
    });
    const factor = operations * UNIT_ROUNDOFF * (1 + 1e-6);
    let binomial = 1;
    for (let k = 0; k < columns; k++) {
      for (let polynomial = 0; polynomial < kernel.polynomials; polynomial++) {
        let largest = 0;
        for (let i = polynomial * size + k; i < (polynomial + 1) * size; i += columns) {
          if (scratch[i] > largest) largest = scratch[i];
        }
        box[kernel.radiusOffset(polynomial) + k] = (factor * largest) / binomial + 1e-290;
      }
      for (let i = k; i < kernel.polynomials * 2 * size; i += columns) box[i] /= binomial;
      binomial = (binomial * (shape.degree - k)) / (k + 1);
    }
  }
}

function strideOf(degrees: readonly number[], variable: number, columns: number): number {
  let stride = columns;
  for (let i = degrees.length - 1; i > variable; i--) stride *= degrees[i] + 1;
  return stride;
}

/** e with abs(value) ≤ 2^e. */
function binaryExponent(value: number): number {
  const { mantissa, exponent } = toDyadic(value);
  return Math.max(-900, Math.min(900, bitLength(mantissa) + exponent));
}

interface ExponentGroup {
  readonly exponents: readonly number[];
  readonly broken: bigint[];
  readonly returned: bigint[];
}

/** Coefficients in s for every power product of the variables. */
function groupByExponents(polynomial: LoopPolynomial, degree: number): Map<string, ExponentGroup> {
  const groups = new Map<string, ExponentGroup>();
  const add = (terms: readonly ExactTerm[], part: 'broken' | 'returned'): void => {
    for (const { exponents, power, coefficient } of terms) {
      const key = exponents.join(' ');
      let group = groups.get(key);
      if (group === undefined) {
        const zeros = (): bigint[] => new Array<bigint>(degree + 1).fill(0n);
        groups.set(key, (group = { exponents, broken: zeros(), returned: zeros() }));
      }
      group[part][power] = coefficient;
    }
  };
  add(polynomial.broken, 'broken');
  add(polynomial.returned, 'returned');
  return groups;
}

function largestExponent(sheets: readonly ComplexCoefficients[], shift: number, slope: number): number {
  let top = -Infinity;
  for (const { re, im } of sheets) {
    re.forEach((value, k) => {
      const bits = Math.max(bitLength(value), bitLength(im[k]));
      if (bits > 0) top = Math.max(top, bits + shift + slope * k);
    });
  }
  return top;
}

/** The power of two nearest to the geometric mean of the poles' moduli at a point, zeros at the origin apart. */
function chartSlope(polynomial: LoopPolynomial, nominal: ArrayLike<number>): number {
  const { broken, returned } = evaluateExactly(polynomial, nominal);
  const closed = broken.map((value, k) => value + returned[k]);
  const high = degreeOf(polynomial);
  let low = 0;
  while (low < high && closed[low] === 0n) low++;
  if (low === high || closed[high] === 0n) return 0;
  return Math.floor((bitLength(closed[low]) - bitLength(closed[high])) / (high - low) + 0.5);
}

/**
 * Conversion of a power polynomial of one variable on [low, high] to Bernstein form by the blossom (Ramshaw 1989):
 * b_i = Σ_k c_k e_k(high × i, low × (D − i)) / binom(D, k), row-major (D + 1)×(D + 1).
 * `bounds` is the same with absolute values, from which the rounding error follows also where terms cancel.
 */
function bernsteinConversion(
  degree: number,
  low: number,
  high: number,
): { weights: Float64Array; bounds: Float64Array } {
  const order = degree + 1;
  const weights = new Float64Array(order * order);
  const bounds = new Float64Array(order * order);
  for (let i = 0; i <= degree; i++) {
    const value = elementarySymmetric(degree, i, low, high);
    const bound = elementarySymmetric(degree, i, Math.abs(low), Math.abs(high));
    let binomial = 1;
    for (let k = 0; k <= degree; k++) {
      weights[i * order + k] = value[k] / binomial;
      bounds[i * order + k] = bound[k] / binomial;
      binomial = (binomial * (degree - k)) / (k + 1);
    }
  }
  return { weights, bounds };
}

/** e_k of `count` times high and degree − count times low, k = 0 … degree: coefficients of (1 + high z)^i (1 + low z)^(D−i). */
function elementarySymmetric(degree: number, count: number, low: number, high: number): Float64Array {
  const result = new Float64Array(degree + 1);
  result[0] = 1;
  for (let factor = 0; factor < degree; factor++) {
    const value = factor < count ? high : low;
    for (let k = factor + 1; k >= 1; k--) result[k] += value * result[k - 1];
  }
  return result;
}

/** Multiplies every fibre along one index of a tensor by a small square matrix, in place. */
function applyAlong(
  data: Float64Array,
  length: number,
  stride: number,
  degree: number,
  matrix: Float64Array,
): void {
  const order = degree + 1;
  const fibre = new Float64Array(order);
  for (let block = 0; block < length; block += stride * order) {
    for (let j = block; j < block + stride; j++) {
      for (let k = 0; k < order; k++) fibre[k] = data[j + k * stride];
      for (let i = 0; i < order; i++) {
        let sum = 0;
        for (let k = 0; k < order; k++) sum += matrix[i * order + k] * fibre[k];
        data[j + i * stride] = sum;
      }
    }
  }
}
