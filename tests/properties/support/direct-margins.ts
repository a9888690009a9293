import type { Poles } from './direct-poles';

/** Frequencies per scan that do not belong to a pole. */
const GRID = 120;

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
    this.placeGrid();
    const { omegas } = this;
    const count = omegas.length;
    const res = new Float64Array(count);
    const ims = new Float64Array(count);
    for (let k = 0; k < count; k++) {
      this.evaluate(omegas[k]);
      res[k] = this.re;
      ims[k] = this.im;
    }
    const result: Margins = { gainUp: Infinity, gainDown: 0, phase: Math.PI, modulus: Infinity, delay: Infinity };
    this.gain(result, res, ims);
    this.phase(result, res, ims);
    this.modulus(result, res, ims);
    return result;
  }

  private placeGrid(): void {
    let least = Infinity;
    let most = 0;
    const all: number[] = [];
    for (const poles of [this.closed, this.broken]) {
      for (let i = 0; i < poles.re.length; i++) {
        const size = Math.hypot(poles.re[i], poles.im[i]);
        if (size < 1e-9) continue;
        least = Math.min(least, size);
        most = Math.max(most, size);
        if (poles.im[i] < 0) continue;
        const width = Math.max(Math.abs(poles.re[i]), 1e-9 * size);
        if (width > 0.5 * size) continue;
        for (const step of [-4, -2, -1, -0.5, -0.2, 0, 0.2, 0.5, 1, 2, 4]) {
          const omega = poles.im[i] + step * width;
          if (omega > 0) all.push(omega);
        }
      }
    }
    if (most === 0) least = most = 1;
    const from = Math.log(least * 1e-3);
    const to = Math.log(most * 1e3);
    for (let k = 0; k < GRID; k++) all.push(Math.exp(from + ((to - from) * k) / (GRID - 1)));
    this.omegas = Float64Array.from(all).sort();
  }

  private bisect(low: number, high: number, value: () => number): number {
    this.evaluate(low);
    const positive = value() > 0;
    let a = low;
    let b = high;
    for (let i = 0; i < 60 && b - a > 1e-15 * b; i++) {
      const middle = 0.5 * (a + b);
      this.evaluate(middle);
      if (value() > 0 === positive) a = middle;
      else b = middle;
    }
    const omega = 0.5 * (a + b);
    this.evaluate(omega);
    return omega;
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
    for (let k = 0; k + 1 < res.length; k++) {
      if (ims[k] > 0 === ims[k + 1] > 0) continue;
      this.bisect(this.omegas[k], this.omegas[k + 1], () => this.im);
      // A change of sign through a pole of L on the axis is no crossing.
      if (Math.abs(this.im) < 1e-3 * (1 + Math.abs(this.re))) offer(this.re - 1);
    }
  }

  private phase(result: Margins, res: Float64Array, ims: Float64Array): void {
    const excess = (re: number, im: number): number => (re - 1) * (re - 1) + im * im - 1;
    for (let k = 0; k + 1 < res.length; k++) {
      if (excess(res[k], ims[k]) > 0 === excess(res[k + 1], ims[k + 1]) > 0) continue;
      const omega = this.bisect(this.omegas[k], this.omegas[k + 1], () => excess(this.re, this.im));
      const turn = Math.atan2(-this.im, 1 - this.re);
      result.phase = Math.min(result.phase, Math.abs(turn));
      const lag = turn >= 0 ? turn : turn + 2 * Math.PI;
      result.delay = Math.min(result.delay, lag / omega);
    }
  }

  private modulus(result: Margins, res: Float64Array, ims: Float64Array): void {
    const size = (k: number): number => Math.hypot(res[k], ims[k]);
    this.evaluate(0);
    const still = Math.hypot(this.re, this.im);
    result.modulus = Math.min(Math.abs(this.ratio), Number.isFinite(still) ? still : Infinity);
    let least = Infinity;
    for (let k = 0; k < res.length; k++) least = Math.min(least, size(k));
    for (let k = 0; k < res.length; k++) {
      const here = size(k);
      result.modulus = Math.min(result.modulus, here);
      const before = k > 0 ? size(k - 1) : Infinity;
      const after = k + 1 < res.length ? size(k + 1) : Infinity;
      if (here > before || here > after || here > 2 * least) continue;
      result.modulus = Math.min(result.modulus, this.golden(Math.max(0, k - 1), Math.min(res.length - 1, k + 1)));
    }
  }

  private golden(from: number, to: number): number {
    const at = (omega: number): number => {
      this.evaluate(omega);
      return Math.hypot(this.re, this.im);
    };
    const section = 0.6180339887498949;
    let a = this.omegas[from];
    let b = this.omegas[to];
    let x = b - section * (b - a);
    let y = a + section * (b - a);
    let fx = at(x);
    let fy = at(y);
    for (let i = 0; i < 40 && b - a > 1e-9 * b; i++) {
      if (fx < fy) {
        b = y;
        y = x;
        fy = fx;
        x = b - section * (b - a);
        fx = at(x);
      } else {
        a = x;
        x = y;
        fx = fy;
        y = a + section * (b - a);
        fy = at(y);
      }
    }
    return Math.min(fx, fy);
  }
}
