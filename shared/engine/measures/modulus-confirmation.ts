import { PolynomialRootSolver } from '../linalg';
import type { ModulusMargin } from './modulus-margin';
import { modulus } from './modulus';
import type { ReturnDifference } from './return-difference';

/** The level is put this far below the value, so that its own minimum is no root any more. */
const BELOW = 1e-6;
/** A root with a larger angle to the real axis is no crossing of the level that rounding has hidden. */
const NEARLY_REAL = 0.05;
const ROUND_LIMIT = 12;

/**
 * The level test for modulus margins: |1 + L(jω)| ≥ β everywhere if and only if |a(jω)|² − β²|d(jω)|²,
 * a polynomial in x = ω², has no positive real root where its sign changes. Reusable without allocation.
 *
 * Boyd, Balakrishnan & Kabamba 1989, Math. Control Signals Systems 2, 207–219; Bruinsma & Steinbuch
 * 1990, Systems & Control Letters 14, 287–293 (their step: continue from the level that was crossed).
 */
export class ModulusConfirmation {
  private readonly solver: PolynomialRootSolver;
  private readonly closed: Float64Array;
  private readonly open: Float64Array;
  private readonly difference: Float64Array;
  private readonly re: Float64Array;
  private readonly im: Float64Array;

  /** @param maximumOrder largest number of poles on either side */
  constructor(maximumOrder: number) {
    this.solver = new PolynomialRootSolver(maximumOrder);
    this.closed = new Float64Array(maximumOrder + 1);
    this.open = new Float64Array(maximumOrder + 1);
    this.difference = new Float64Array(maximumOrder + 1);
    this.re = new Float64Array(maximumOrder);
    this.im = new Float64Array(maximumOrder);
  }

  /**
   * Tests a modulus margin; where the level just below it is crossed, moves it to the lower minimum
   * found there, sets `corrected`, and tests again.
   *
   * @returns whether the value stood as it was
   */
  confirm(loop: ReturnDifference, margin: ModulusMargin): boolean {
    const unit = typicalFrequency(loop);
    squaredModulus(loop.closedRe, loop.closedIm, loop.closedCount, unit, this.closed);
    squaredModulus(loop.openRe, loop.openIm, loop.openCount, unit, this.open);
    const lead = loop.leadingRatio * leadingUnit(loop, unit);
    let stood = true;
    for (let round = 0; round < ROUND_LIMIT && margin.value > 0; round++) {
      const level = margin.value * (1 - BELOW);
      if (!this.crossed(loop, margin, level, lead, unit)) {
        break;
      }
      stood = false;
      margin.corrected = true;
    }
    return stood;
  }

  private crossed(
    loop: ReturnDifference,
    margin: ModulusMargin,
    level: number,
    lead: number,
    unit: number,
  ): boolean {
    const { closed, open, difference, re, im } = this;
    const degree = Math.max(loop.closedCount, loop.openCount);
    let largest = 0;
    for (let k = 0; k <= degree; k++) {
      const a = k <= loop.closedCount ? lead * lead * closed[k] : 0;
      const d = k <= loop.openCount ? level * level * open[k] : 0;
      difference[k] = a - d;
      largest = Math.max(largest, Math.abs(difference[k]));
    }
    if (largest === 0 || largest - largest !== 0) {
      return false;
    }
    const count = this.solver.solve(difference, degree, re, im);
    let found = false;
    for (let k = 0; k < count; k++) {
      if (re[k] > 0 && im[k] >= 0 && im[k] <= NEARLY_REAL * re[k]) {
        const omega = unit * Math.sqrt(re[k]);
        found = descend(loop, margin, omega, level) || found;
      }
    }
    return found;
  }
}

/** Walks downhill from ω with growing steps until |1 + L| rises again, then refines; whether below the level. */
function descend(loop: ReturnDifference, margin: ModulusMargin, omega: number, level: number): boolean {
  const downhill = loop.logSlope(omega) > 0 ? -1 : 1;
  let low = omega;
  let middle = omega;
  let here = valueAt(loop, omega);
  let step = 1e-9 * omega;
  for (let k = 0; k < 60; k++) {
    const next = middle + downhill * step;
    if (!(next > 0)) {
      break;
    }
    const value = valueAt(loop, next);
    if (!(value < here)) {
      if (Math.min(here, value) < level * (1 + BELOW)) {
        margin.refine(Math.min(low, next), middle, Math.max(low, next));
      }
      break;
    }
    low = middle;
    middle = next;
    here = value;
    step *= 2;
  }
  return margin.value < level;
}

function valueAt(loop: ReturnDifference, omega: number): number {
  loop.evaluate(omega);
  return modulus(loop.re, loop.im);
}

/** Geometric mean of the open-loop poles' moduli that are not zero: the unit in which coefficients stay moderate. */
function typicalFrequency(loop: ReturnDifference): number {
  let product = 1;
  let exponent = 0;
  let count = 0;
  for (let k = 0; k < loop.openCount; k++) {
    const size = modulus(loop.openRe[k], loop.openIm[k]);
    if (size > 0) {
      product *= size;
      count++;
      while (product >= 2) {
        product *= 0.5;
        exponent++;
      }
      while (product < 1) {
        product *= 2;
        exponent--;
      }
    }
  }
  let unit = 1;
  for (let left = count > 0 ? Math.trunc(exponent / count) : 0; left !== 0; left -= Math.sign(left)) {
    unit *= left > 0 ? 2 : 0.5;
  }
  return unit;
}

/** unit^(n − m): what c₀ takes on when frequencies are counted in units. */
function leadingUnit(loop: ReturnDifference, unit: number): number {
  let factor = 1;
  for (let k = loop.openCount; k < loop.closedCount; k++) {
    factor *= unit;
  }
  for (let k = loop.closedCount; k < loop.openCount; k++) {
    factor /= unit;
  }
  return factor;
}

/** Ascending coefficients in x of Π |j√x − pᵢ/unit|². */
function squaredModulus(
  re: Float64Array,
  im: Float64Array,
  n: number,
  unit: number,
  out: Float64Array,
): void {
  out.fill(0);
  out[0] = 1;
  let degree = 0;
  for (let k = 0; k < n; k++) {
    const x = re[k] / unit;
    const y = im[k] / unit;
    if (y < 0) {
      continue;
    }
    if (y === 0) {
      // x² + z, once.
      for (let j = ++degree; j >= 0; j--) {
        out[j] = x * x * out[j] + (j > 0 ? out[j - 1] : 0);
      }
    } else {
      // z² + 2(σ² − ν²) z + (σ² + ν²)².
      const size = x * x + y * y;
      const middle = 2 * (x - y) * (x + y);
      degree += 2;
      for (let j = degree; j >= 0; j--) {
        out[j] = size * size * out[j] + (j > 0 ? middle * out[j - 1] : 0) + (j > 1 ? out[j - 2] : 0);
      }
    }
  }
}
