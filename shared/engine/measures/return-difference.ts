/**
 * The return difference of a loop broken at one point,
 *
 *   1 + L(s) = a(s)/d(s) = c₀ Π(s − λᵢ) / Π(s − μᵢ),
 *
 * λ the closed-loop poles, μ the poles with the loop broken, c₀ the ratio of leading coefficients.
 * Poles are joined two by two to real factors (c + (ν − ω)(ν + ω)) − jSω at s = jω, written so that a
 * lightly damped pole loses no digits near its own frequency; numerator and denominator factors
 * alternate, so that no partial product overflows. Loading and evaluating allocate nothing.
 *
 * Bode 1945, *Network Analysis and Feedback Amplifier Design*, ch. IV (return difference).
 */
export class ReturnDifference {
  /** Real part of 1 + L(jω) after `evaluate`. */
  re = 1;
  /** Imaginary part of 1 + L(jω) after `evaluate`. */
  im = 0;
  /** c₀, ratio of the leading coefficients of a and d. */
  leadingRatio = 1;
  closedCount = 0;
  openCount = 0;

  readonly closedRe: Float64Array;
  readonly closedIm: Float64Array;
  readonly openRe: Float64Array;
  readonly openIm: Float64Array;
  private readonly closedFactors: QuadraticFactors;
  private readonly openFactors: QuadraticFactors;

  /** @param maximumOrder largest number of poles on either side */
  constructor(readonly maximumOrder: number) {
    this.closedRe = new Float64Array(maximumOrder);
    this.closedIm = new Float64Array(maximumOrder);
    this.openRe = new Float64Array(maximumOrder);
    this.openIm = new Float64Array(maximumOrder);
    this.closedFactors = new QuadraticFactors(maximumOrder);
    this.openFactors = new QuadraticFactors(maximumOrder);
  }

  /**
   * Takes a copy of a loop's poles, both lists closed under conjugation.
   *
   * @param closedRe real parts of λ, 1/s
   * @param closedIm imaginary parts of λ, rad/s
   * @param openRe real parts of μ, 1/s
   * @param openIm imaginary parts of μ, rad/s
   * @param leadingRatio c₀, not zero
   * @throws RangeError more poles than `maximumOrder`
   */
  load(
    closedRe: Float64Array,
    closedIm: Float64Array,
    closedCount: number,
    openRe: Float64Array,
    openIm: Float64Array,
    openCount: number,
    leadingRatio: number,
  ): void {
    if (closedCount > this.maximumOrder || openCount > this.maximumOrder) {
      throw new RangeError(`more than ${this.maximumOrder} poles`);
    }
    for (let k = 0; k < closedCount; k++) {
      this.closedRe[k] = closedRe[k];
      this.closedIm[k] = closedIm[k];
    }
    for (let k = 0; k < openCount; k++) {
      this.openRe[k] = openRe[k];
      this.openIm[k] = openIm[k];
    }
    this.closedCount = closedCount;
    this.openCount = openCount;
    this.leadingRatio = leadingRatio;
    this.closedFactors.load(this.closedRe, this.closedIm, closedCount);
    this.openFactors.load(this.openRe, this.openIm, openCount);
  }

  /** 1 + L at infinite frequency: c₀, or 0 or Infinity where the degrees differ. */
  get atInfinity(): number {
    if (this.closedCount === this.openCount) {
      return this.leadingRatio;
    }
    return this.closedCount < this.openCount ? 0 : Infinity;
  }

  /**
   * Puts 1 + L(jω) into `re` and `im`; not finite exactly on a pole of L.
   *
   * @param omega ω ≥ 0, rad/s
   */
  evaluate(omega: number): void {
    const closed = this.closedFactors;
    const open = this.openFactors;
    let x = this.leadingRatio;
    let y = 0;
    const both = closed.count < open.count ? closed.count : open.count;
    for (let k = 0; k < both; k++) {
      const nx = closed.constant[k] + (closed.centre[k] - omega) * (closed.centre[k] + omega);
      const ny = -closed.sum[k] * omega;
      const dx = open.constant[k] + (open.centre[k] - omega) * (open.centre[k] + omega);
      const dy = -open.sum[k] * omega;
      const inverse = 1 / (dx * dx + dy * dy);
      const qx = (nx * dx + ny * dy) * inverse;
      const qy = (ny * dx - nx * dy) * inverse;
      const next = x * qx - y * qy;
      y = x * qy + y * qx;
      x = next;
    }
    for (let k = both; k < closed.count; k++) {
      const nx = closed.constant[k] + (closed.centre[k] - omega) * (closed.centre[k] + omega);
      const ny = -closed.sum[k] * omega;
      const next = x * nx - y * ny;
      y = x * ny + y * nx;
      x = next;
    }
    for (let k = both; k < open.count; k++) {
      const dx = open.constant[k] + (open.centre[k] - omega) * (open.centre[k] + omega);
      const dy = -open.sum[k] * omega;
      const inverse = 1 / (dx * dx + dy * dy);
      const next = (x * dx + y * dy) * inverse;
      y = (y * dx - x * dy) * inverse;
      x = next;
    }
    if (closed.hasSingle) {
      const next = -x * closed.single - y * omega;
      y = x * omega - y * closed.single;
      x = next;
    }
    if (open.hasSingle) {
      const inverse = 1 / (open.single * open.single + omega * omega);
      const next = (y * omega - x * open.single) * inverse;
      y = (-x * omega - y * open.single) * inverse;
      x = next;
    }
    this.re = x;
    this.im = y;
  }

  /** d/dω of log |1 + L(jω)|², whose sign changes mark the extrema of |1 + L|. */
  logSlope(omega: number): number {
    return this.closedFactors.logSlope(omega) - this.openFactors.logSlope(omega);
  }
}

/** Real factors of a polynomial on the imaginary axis, two roots in each, one left over at most. */
class QuadraticFactors {
  readonly constant: Float64Array;
  readonly centre: Float64Array;
  readonly sum: Float64Array;
  count = 0;
  hasSingle = false;
  single = 0;

  constructor(maximumOrder: number) {
    const room = (maximumOrder >> 1) + 1;
    this.constant = new Float64Array(room);
    this.centre = new Float64Array(room);
    this.sum = new Float64Array(room);
  }

  load(re: Float64Array, im: Float64Array, n: number): void {
    let count = 0;
    let waiting = false;
    let real = 0;
    for (let k = 0; k < n; k++) {
      if (im[k] > 0) {
        this.constant[count] = re[k] * re[k];
        this.centre[count] = im[k];
        this.sum[count] = 2 * re[k];
        count++;
      } else if (im[k] === 0) {
        if (waiting) {
          this.constant[count] = real * re[k];
          this.centre[count] = 0;
          this.sum[count] = real + re[k];
          count++;
          waiting = false;
        } else {
          real = re[k];
          waiting = true;
        }
      }
    }
    this.count = count;
    this.hasSingle = waiting;
    this.single = real;
  }

  logSlope(omega: number): number {
    let slope = 0;
    for (let k = 0; k < this.count; k++) {
      const x = this.constant[k] + (this.centre[k] - omega) * (this.centre[k] + omega);
      const s = this.sum[k];
      const y = s * omega;
      slope += (2 * omega * (s * s - 2 * x)) / (x * x + y * y);
    }
    if (this.hasSingle) {
      slope += (2 * omega) / (this.single * this.single + omega * omega);
    }
    return slope;
  }
}
