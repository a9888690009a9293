import { asin, atan2, bitLength, fromDyadic } from '../../expressions';
import { BernsteinKernel } from './bernstein-kernel';
import type { ComplexCoefficients } from './boundary-form';
import { exactArgumentChange } from './exact-argument';
import { UNIT_ROUNDOFF } from './rounding';

/** Deepest halving of the chart: beyond it a root lies within rounding of the boundary. */
const MAXIMUM_DEPTH = 60;

/**
 * Number of roots outside the region whose boundary is the ray of damping ratio ζ and its mirror image (ζ = 0: the
 * imaginary axis), for a real polynomial given by its coefficients along the ray, ascending powers of ω.
 *
 * Leonhard–Cremer–Mikhailov count: outside = (n α − Δ)/π with α = π/2 + asin ζ and Δ the change of argument along
 * ω = ω_s t/(1 − t), t from 0 to 1. t is halved until every piece passes the exclusion test with its rounding
 * radius, so that the angle between a piece's ends is unambiguous; where that never happens because a root lies too
 * near the boundary, a Sturm chain in exact integers decides.
 * Sources: Cremer, ZAMM 25/27 (1947) 161–163; Leonhard, Arch. Elektrotech. 38 (1944) 17–28; Mikhailov 1938.
 *
 * @returns undefined where a root may lie exactly on the boundary, or the polynomial is zero
 */
export function countOutside(coefficients: ComplexCoefficients, dampingRatio = 0): number | undefined {
  const turned = argumentChange(coefficients);
  if (turned === undefined) return undefined;
  const alpha = Math.PI / 2 + asin(dampingRatio);
  return wholeNumber((turned.degree * alpha - turned.change) / Math.PI);
}

/**
 * The same for a complex polynomial p and the imaginary axis: both halves of the axis are walked, the second one by
 * the conjugate polynomial. outside = (n π − Δ⁺ − Δ⁻)/(2π).
 */
export function countOutsideBothHalves(
  upper: ComplexCoefficients,
  lower: ComplexCoefficients,
): number | undefined {
  const above = argumentChange(upper);
  const below = argumentChange(lower);
  if (above === undefined || below === undefined) return undefined;
  return wholeNumber((above.degree * Math.PI - above.change - below.change) / (2 * Math.PI));
}

function wholeNumber(value: number): number | undefined {
  const rounded = Math.floor(value + 0.5);
  return Math.abs(value - rounded) < 1e-3 && rounded >= 0 ? rounded : undefined;
}

interface Turn {
  readonly degree: number;
  readonly change: number;
}

function argumentChange(coefficients: ComplexCoefficients): Turn | undefined {
  let degree = coefficients.re.length - 1;
  while (degree >= 0 && coefficients.re[degree] === 0n && coefficients.im[degree] === 0n) degree--;
  if (degree < 0 || (coefficients.re[0] === 0n && coefficients.im[0] === 0n)) return undefined;
  if (degree === 0) return { degree, change: 0 };
  const kernel = new BernsteinKernel({ degrees: [], degree, sheets: 1, discRadius: undefined });
  const change =
    walk(kernel, bernsteinCurve(coefficients, kernel), MAXIMUM_DEPTH) ??
    exactArgumentChange(coefficients, degree);
  return change === undefined ? undefined : { degree, change };
}

/** The curve as a box of the kernel, without variables: each coefficient known to within its radius. */
function bernsteinCurve({ re, im }: ComplexCoefficients, kernel: BernsteinKernel): Float64Array {
  const degree = kernel.shape.degree;
  const bits = (k: number): number => Math.max(bitLength(re[k]), bitLength(im[k]));
  // ω_s = 2^slope near the geometric mean of the roots' moduli.
  const slope = Math.floor((bits(0) - bits(degree)) / degree + 0.5);
  let top = -Infinity;
  for (let k = 0; k <= degree; k++) top = Math.max(top, bits(k) + slope * k);
  const curve = new Float64Array(kernel.length);
  let binomial = 1;
  for (let k = 0; k <= degree; k++) {
    const x = fromDyadic(re[k], slope * k - top) / binomial;
    const y = fromDyadic(im[k], slope * k - top) / binomial;
    curve[k] = x;
    curve[kernel.size + k] = y;
    curve[kernel.radiusOffset(0) + k] = 2 * UNIT_ROUNDOFF * (Math.abs(x) + Math.abs(y)) + 1e-290;
    binomial = (binomial * (degree - k)) / (k + 1);
  }
  return curve;
}

/** Change of argument over one piece of the chart; undefined where halving never separates it from 0. */
function walk(kernel: BernsteinKernel, curve: Float64Array, depth: number): number | undefined {
  const { size } = kernel;
  if (kernel.excludes(curve)) {
    const last = size - 1;
    const cross = curve[0] * curve[size + last] - curve[size] * curve[last];
    const dot = curve[0] * curve[last] + curve[size] * curve[size + last];
    return atan2(cross, dot);
  }
  if (depth === 0) return undefined;
  const right = new Float64Array(curve.length);
  kernel.split(curve, right, 0);
  const left = walk(kernel, curve, depth - 1);
  if (left === undefined) return undefined;
  const rest = walk(kernel, right, depth - 1);
  return rest === undefined ? undefined : left + rest;
}
