import type { Poles } from './direct-poles';

/** Frequencies per scan that do not belong to a pole. */
const GRID = 90;

export interface Margins {
  gainUp: number;
  gainDown: number;
  phase: number;
  modulus: number;
  delay: number;
}

/**
 * Margins of a stable loop by scanning its frequency response, 1 + L = closing · Π(jω − λ)/Π(jω − μ) with the poles λ
 * of the closed and μ of the broken loop: a logarithmic grid and points about every pole, then refinement.
 */
export class DirectMargins {
  private re = 0;
  private im = 0;
  private readonly ratio: number;
  private omegas: Float64Array = new Float64Array(0);

  constructor(
    private readonly closed: Poles,
    private readonly broken: Poles,
  ) {
    this.ratio = closed.closing / broken.closing;
  }

  /** 1 + L(jω) as [re, im]. */
  returnDifference(omega: number): [number, number] {
    this.evaluate(omega);
    return [this.re, this.im];
  }

  private evaluate(omega: number): void {
    const { closed, broken } = this;
    let re = this.ratio;
    let im = 0;
    const n = closed.re.length;
    for (let i = 0; i < n; i++) {
      const x = -closed.re[i];
      const y = omega - closed.im[i];
      const u = -broken.re[i];
      const v = omega - broken.im[i];
      const size = u * u + v * v;
      const p = (x * u + y * v) / size;
      const q = (y * u - x * v) / size;
      const next = re * p - im * q;
      im = re * q + im * p;
      re = next;
    }
    this.re = re;
    this.im = im;
  }

  measure(): Margins {
    const omegas = this.frequencies();
    const [kept, res, ims] = [omegas, omegas, omegas].map(({ length }) => new Float64Array(length));
    let count = 0;
    for (const omega of omegas) {
      this.evaluate(omega);
      // At a pole of L on the axis itself there is no value.
      if (!Number.isFinite(this.re) || !Number.isFinite(this.im)) continue;
      kept[count] = omega;
      res[count] = this.re;
      ims[count] = this.im;
      count++;
    }
    this.omegas = kept.subarray(0, count);
    const result: Margins = {
      gainUp: Infinity,
      gainDown: 0,
      phase: Math.PI,
      modulus: Infinity,
      delay: Infinity,
    };
    this.gain(result, res.subarray(0, count), ims.subarray(0, count));
    this.phase(result, res.subarray(0, count), ims.subarray(0, count));
    this.modulus(result, res.subarray(0, count), ims.subarray(0, count));
    return result;
  }

  private frequencies(): Float64Array {
    let least = Infinity;
    let most = 0;
    for (const { re, im } of [this.closed, this.broken]) {
      for (let i = 0; i < re.length; i++) most = Math.max(most, Math.hypot(re[i], im[i]));
    }
    const all: number[] = [];
    for (const poles of [this.closed, this.broken]) {
      for (let i = 0; i < poles.re.length; i++) {
        const size = Math.hypot(poles.re[i], poles.im[i]);
        // A multiple pole at 0 comes out as several small ones.
        if (size < 1e-7 * most) continue;
        least = Math.min(least, size);
        if (poles.im[i] < 0) continue;
        const width = Math.max(Math.abs(poles.re[i]), 1e-9 * size);
        if (width > 0.5 * size) continue;
        for (const step of [-4, -2, -1, -0.5, -0.2, 0, 0.2, 0.5, 1, 2, 4]) {
          const omega = poles.im[i] + step * width;
          if (omega > 0) all.push(omega);
        }
      }
    }
    if (least === Infinity) least = most = 1;
    const from = Math.log(least * 1e-3);
    const to = Math.log(most * 1e3);
    for (let k = 0; k < GRID; k++) all.push(Math.exp(from + ((to - from) * k) / (GRID - 1)));
    return Float64Array.from(all).sort();
  }

  /** All zeros of a value of 1 + L over the grid, pairs between neighbouring points included; visits each. */
  private crossings(
    res: Float64Array,
    ims: Float64Array,
    value: (re: number, im: number) => number,
    visit: (omega: number) => void,
  ): void {
    const { omegas } = this;
    const at = (omega: number): number => {
      this.evaluate(omega);
      return value(this.re, this.im);
    };
    const between = (low: number, high: number): void => {
      const omega = bisect(at, low, high);
      this.evaluate(omega);
      visit(omega);
    };
    const values = res.map((re, k) => value(re, ims[k]));
    for (let k = 0; k + 1 < values.length; k++) {
      if (values[k] > 0 !== values[k + 1] > 0) between(omegas[k], omegas[k + 1]);
      if (k === 0) continue;
      const sign = values[k] > 0 ? 1 : -1;
      const isDip = sign * values[k] <= sign * values[k - 1] && sign * values[k] <= sign * values[k + 1];
      const isAlone = values[k - 1] > 0 === values[k] > 0 && values[k + 1] > 0 === values[k] > 0;
      if (!isDip || !isAlone) continue;
      const dip = least((omega) => sign * at(omega), omegas[k - 1], omegas[k + 1]);
      if (sign * at(dip) > 0) continue;
      between(omegas[k - 1], dip);
      between(dip, omegas[k + 1]);
    }
  }

  private gain(result: Margins, res: Float64Array, ims: Float64Array): void {
    const offer = (real: number): void => {
      if (!(real < 0)) return;
      const factor = -1 / real;
      if (factor >= 1) result.gainUp = Math.min(result.gainUp, factor);
      if (factor <= 1) result.gainDown = Math.max(result.gainDown, factor);
    };
    offer(this.ratio - 1);
    this.evaluate(0);
    if (Number.isFinite(this.re)) offer(this.re - 1);
    this.crossings(
      res,
      ims,
      (_, im) => im,
      () => {
        // A change of sign through a pole of L on the axis is no crossing.
        if (Math.abs(this.im) < 1e-3 * (1 + Math.abs(this.re))) offer(this.re - 1);
      },
    );
  }

  private phase(result: Margins, res: Float64Array, ims: Float64Array): void {
    this.crossings(
      res,
      ims,
      (re, im) => (re - 1) * (re - 1) + im * im - 1,
      (omega) => {
        const turn = Math.atan2(-this.im, 1 - this.re);
        result.phase = Math.min(result.phase, Math.abs(turn));
        const lag = turn >= 0 ? turn : turn + 2 * Math.PI;
        result.delay = Math.min(result.delay, lag / omega);
      },
    );
  }

  private modulus(result: Margins, res: Float64Array, ims: Float64Array): void {
    this.evaluate(0);
    const still = Math.hypot(this.re, this.im);
    const sizes = res.map((re, k) => Math.hypot(re, ims[k]));
    const low = sizes.reduce((a, b) => Math.min(a, b), Infinity);
    result.modulus = Math.min(Math.abs(this.ratio), low, Number.isFinite(still) ? still : Infinity);
    const at = (omega: number): number => {
      this.evaluate(omega);
      return Math.hypot(this.re, this.im);
    };
    for (let k = 0; k < sizes.length; k++) {
      const before = Math.max(0, k - 1);
      const after = Math.min(sizes.length - 1, k + 1);
      if (sizes[k] > sizes[before] || sizes[k] > sizes[after] || sizes[k] > 2 * low) continue;
      result.modulus = Math.min(result.modulus, at(least(at, this.omegas[before], this.omegas[after])));
    }
  }
}

/** A zero between two points of different sign. */
function bisect(value: (x: number) => number, low: number, high: number): number {
  const positive = value(low) > 0;
  let a = low;
  let b = high;
  for (let i = 0; i < 60 && b - a > 1e-15 * b; i++) {
    const middle = 0.5 * (a + b);
    if (value(middle) > 0 === positive) a = middle;
    else b = middle;
  }
  return 0.5 * (a + b);
}

/** Where a value with one minimum is least, by golden section (Kiefer 1953). */
function least(value: (x: number) => number, low: number, high: number): number {
  const section = 0.6180339887498949;
  let a = low;
  let b = high;
  let x = b - section * (b - a);
  let y = a + section * (b - a);
  let fx = value(x);
  let fy = value(y);
  for (let i = 0; i < 40 && b - a > 1e-9 * b; i++) {
    if (fx < fy) {
      b = y;
      y = x;
      fy = fx;
      x = b - section * (b - a);
      fx = value(x);
    } else {
      a = x;
      x = y;
      fx = fy;
      y = a + section * (b - a);
      fy = value(y);
    }
  }
  return fx < fy ? x : y;
}
