import { atan, bitLength, fromDyadic } from '../../expressions';
import type { ComplexCoefficients } from './boundary-form';

/** Rotations a + jb that are tried so that no end of the curve is purely imaginary. */
const ROTATIONS: readonly (readonly [bigint, bigint])[] = [
  [1n, 0n],
  [2n, 1n],
  [1n, 2n],
  [3n, 2n],
];

/**
 * Change of argument of p(ω) = R(ω) + jI(ω) for ω from 0 to ∞, from a Sturm chain in exact integers: with the Cauchy
 * index of I/R (its jumps from −∞ to +∞ less those from +∞ to −∞), Δ = −π · index + [atan(I/R)] between the ends.
 * Slower by orders than the count with rounding radii, but it decides however near a root lies to the boundary.
 * Source: Gantmacher, The Theory of Matrices (1959), vol. 2, chapter XV, sections 2 and 3.
 *
 * @param degree true degree; the coefficients of ω⁰ and of ω^degree are not both zero in R and I
 * @returns undefined where R and I have a common factor: a root may lie on the boundary itself
 */
export function exactArgumentChange({ re, im }: ComplexCoefficients, degree: number): number | undefined {
  for (const [a, b] of ROTATIONS) {
    const real = trim(re.map((value, k) => a * value - b * im[k]));
    const imaginary = trim(im.map((value, k) => a * value + b * re[k]));
    if (real.length !== degree + 1 || real[0] === 0n) continue;
    const index = cauchyIndex(real, imaginary);
    if (index === undefined) return undefined;
    const atZero = atan(ratio(imaginary[0] ?? 0n, real[0]));
    const atInfinity = atan(ratio(imaginary[degree] ?? 0n, real[degree]));
    return -Math.PI * index + atInfinity - atZero;
  }
  return undefined;
}

/** Sign changes of the chain R, I, … at 0 less those at ∞. */
function cauchyIndex(real: bigint[], imaginary: bigint[]): number | undefined {
  const chain = [real];
  for (let next = imaginary; next.length > 0;) {
    chain.push(next);
    next = negatedRemainder(chain[chain.length - 2], next);
  }
  const last = chain[chain.length - 1];
  if (last.length > 1) return undefined;
  return changes(chain.map((f) => f[0])) - changes(chain.map((f) => f[f.length - 1]));
}

function changes(values: readonly bigint[]): number {
  let count = 0;
  let before = 0n;
  for (const value of values) {
    if (value === 0n) continue;
    if (before !== 0n && value > 0n !== before > 0n) count++;
    before = value;
  }
  return count;
}

/** −(f mod g) times a positive integer, divided by its content. */
function negatedRemainder(f: readonly bigint[], g: readonly bigint[]): bigint[] {
  let rest = [...f];
  const lead = g[g.length - 1];
  const positive = lead > 0n;
  while (rest.length >= g.length) {
    const shift = rest.length - g.length;
    const top = rest[rest.length - 1];
    // rest · |lead| − sign · top · x^shift · g: a positive multiple of rest modulo g.
    const factor = positive ? top : -top;
    const scale = positive ? lead : -lead;
    rest = trim(
      rest.map((value, k) => value * scale - (k >= shift ? factor * g[k - shift] : 0n)).slice(0, -1),
    );
  }
  return primitive(rest.map((value) => -value));
}

function trim(coefficients: bigint[]): bigint[] {
  let length = coefficients.length;
  while (length > 0 && coefficients[length - 1] === 0n) length--;
  return coefficients.slice(0, length);
}

function primitive(coefficients: bigint[]): bigint[] {
  let divisor = 0n;
  for (const value of coefficients) divisor = greatestCommonDivisor(divisor, value < 0n ? -value : value);
  return divisor > 1n ? coefficients.map((value) => value / divisor) : coefficients;
}

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let x = a;
  let y = b;
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

/** a/b as a double, whatever the size of both. */
function ratio(a: bigint, b: bigint): number {
  const shift = -bitLength(b);
  return fromDyadic(a, shift) / fromDyadic(b, shift);
}
