import { toDyadic } from '../../../expressions';
import { variableDegrees } from '../../polynomial/exact-point';
import type { LoopPolynomial } from '../../polynomial/loop-polynomial';
import type { BandBox } from './band-box';

/**
 * A polynomial in the parameters, put exactly into scaled Bernstein form on boxes: coefficients of
 * Π t_i^j_i (1 − t_i)^(D_i − j_i), up to one positive factor. They are the Bernstein coefficients times binomials, so
 * their signs bound the polynomial's sign in the same way (Lorentz 1953, Bernstein Polynomials).
 * Exact: a root that is touched at an end of a band is told from one that is crossed.
 */
export class ScaledBernstein {
  readonly degrees: readonly number[];
  /** Number of coefficients. */
  readonly size: number;
  private readonly power: readonly bigint[];

  /** @param polynomial one without s: all terms of power 0 in `broken` */
  constructor(polynomial: LoopPolynomial) {
    this.degrees = variableDegrees(polynomial);
    this.size = coefficientCount(polynomial);
    const power = new Array<bigint>(this.size).fill(0n);
    for (const { exponents, coefficient } of polynomial.broken) {
      let at = 0;
      this.degrees.forEach((degree, i) => (at = at * (degree + 1) + exponents[i]));
      power[at] += coefficient;
    }
    this.power = power;
  }

  /** The coefficients on a box, the last variable running fastest. */
  coefficients(box: BandBox): bigint[] {
    const result = [...this.power];
    let stride = this.size;
    this.degrees.forEach((degree, i) => {
      stride /= degree + 1;
      if (degree > 0) convertAlong(result, stride, degree, conversion(degree, box.low[i], box.high[i]));
    });
    return result;
  }

  /** For a coefficient at a corner of the box, that corner; undefined for another. */
  corner(index: number, box: BandBox, elsewhere: readonly number[]): number[] | undefined {
    const point = [...elsewhere];
    let rest = index;
    for (let i = this.degrees.length - 1; i >= 0; i--) {
      const degree = this.degrees[i];
      const digit = rest % (degree + 1);
      rest = Math.floor(rest / (degree + 1));
      if (degree === 0) continue;
      if (digit !== 0 && digit !== degree) return undefined;
      point[i] = digit === 0 ? box.low[i] : box.high[i];
    }
    return point;
  }
}

/** Number of coefficients of the Bernstein form: Π (D_i + 1). */
export function coefficientCount(polynomial: LoopPolynomial): number {
  return variableDegrees(polynomial).reduce((size, degree) => size * (degree + 1), 1);
}

/**
 * weights[k][j]: the part of t^j (1 − t)^(D − j) in p^k = (low (1 − t) + high t)^k · 1^(D − k), scaled by one power of
 * two that makes both ends integers.
 */
function conversion(degree: number, low: number, high: number): bigint[][] {
  const from = toDyadic(low);
  const to = toDyadic(high);
  const exponent = Math.min(from.exponent, to.exponent);
  const a = from.mantissa << BigInt(from.exponent - exponent);
  const b = to.mantissa << BigInt(to.exponent - exponent);
  return Array.from({ length: degree + 1 }, (_, k) => {
    let weights = [1n << BigInt(exponent < 0 ? -exponent * (degree - k) : exponent * k)];
    for (let factor = 0; factor < degree; factor++) {
      weights = factor < k ? timesLinear(weights, a, b) : timesLinear(weights, 1n, 1n);
    }
    return weights;
  });
}

/** Coefficients of Σ c_j t^j (1 − t)^(n − j) times (a (1 − t) + b t). */
function timesLinear(coefficients: readonly bigint[], a: bigint, b: bigint): bigint[] {
  const result = new Array<bigint>(coefficients.length + 1).fill(0n);
  coefficients.forEach((coefficient, j) => {
    result[j] += coefficient * a;
    result[j + 1] += coefficient * b;
  });
  return result;
}

function convertAlong(data: bigint[], stride: number, degree: number, weights: readonly bigint[][]): void {
  const order = degree + 1;
  for (let block = 0; block < data.length; block += stride * order) {
    for (let at = block; at < block + stride; at++) {
      const fibre = new Array<bigint>(order).fill(0n);
      for (let k = 0; k <= degree; k++) {
        const value = data[at + k * stride];
        if (value === 0n) continue;
        for (let j = 0; j <= degree; j++) fibre[j] += value * weights[k][j];
      }
      for (let j = 0; j <= degree; j++) data[at + j * stride] = fibre[j];
    }
  }
}
