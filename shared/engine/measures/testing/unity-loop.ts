import { atan2, exp, log } from '../../../expressions/elementary';
import { PolynomialRootSolver } from '../../linalg';
import type { LoopMeasures } from '../loop-measures';
import { modulus } from '../modulus';

const solver = new PolynomialRootSolver(40);

/** Coefficients in descending powers, as transfer functions are written. */
export type Polynomial = readonly number[];

export function product(...factors: Polynomial[]): number[] {
  return factors.reduce<number[]>(
    (p, q) => {
      const out = new Array<number>(p.length + q.length - 1).fill(0);
      p.forEach((x, i) => q.forEach((y, j) => (out[i + j] += x * y)));
      return out;
    },
    [1],
  );
}

function sum(p: Polynomial, q: Polynomial): number[] {
  const out = new Array<number>(Math.max(p.length, q.length)).fill(0);
  p.forEach((x, i) => (out[out.length - p.length + i] += x));
  q.forEach((x, i) => (out[out.length - q.length + i] += x));
  return out;
}

function roots(p: Polynomial): { re: Float64Array; im: Float64Array; count: number } {
  const re = new Float64Array(p.length);
  const im = new Float64Array(p.length);
  const count = solver.solve(Float64Array.from(p).reverse(), p.length - 1, re, im);
  return { re, im, count };
}

/** Loads L(s) = numerator/denominator under unity feedback. */
export function loadLoop(measures: LoopMeasures, numerator: Polynomial, denominator: Polynomial): void {
  const a = sum(denominator, numerator);
  const closed = roots(a);
  const open = roots(denominator);
  const lead = a.find((x) => x !== 0) ?? 0;
  measures.load(closed.re, closed.im, closed.count, open.re, open.im, open.count, lead / denominator[0]);
}

/** L(jω), by Horner's rule. */
export function response(numerator: Polynomial, denominator: Polynomial, omega: number): [number, number] {
  const [nx, ny] = horner(numerator, omega);
  const [dx, dy] = horner(denominator, omega);
  const size = dx * dx + dy * dy;
  return [(nx * dx + ny * dy) / size, (ny * dx - nx * dy) / size];
}

function horner(p: Polynomial, omega: number): [number, number] {
  let x = 0;
  let y = 0;
  for (const c of p) {
    const next = -y * omega + c;
    y = x * omega;
    x = next;
  }
  return [x, y];
}

/** What a dense logarithmic scan of the Nyquist curve shows, without any refinement but linear. */
export interface ScannedMargins {
  up: number;
  down: number;
  phase: number;
  delay: number;
  modulus: number;
}

export function scan(
  numerator: Polynomial,
  denominator: Polynomial,
  from: number,
  to: number,
  points: number,
): ScannedMargins {
  const out: ScannedMargins = { up: Infinity, down: 0, phase: Math.PI, delay: Infinity, modulus: Infinity };
  const [atZero] = response(numerator, denominator, 0);
  if (atZero < -1) {
    out.down = -1 / atZero;
  } else if (atZero < 0) {
    out.up = -1 / atZero;
  }
  const step = exp(log(to / from) / points);
  let omega = from;
  let before: [number, number] | undefined;
  let sizeBefore = 0;
  for (let k = 0; k <= points; k++, omega *= step) {
    const here = response(numerator, denominator, omega);
    const [x, y] = here;
    const size = modulus(x, y);
    out.modulus = Math.min(out.modulus, modulus(1 + x, y));
    if (before) {
      if (before[1] < 0 !== y < 0 && Math.max(size, sizeBefore) < 1e6) {
        const t = before[1] / (before[1] - y);
        const real = before[0] + t * (x - before[0]);
        if (real < 0) {
          if (real > -1) {
            out.up = Math.min(out.up, -1 / real);
          } else {
            out.down = Math.max(out.down, -1 / real);
          }
        }
      }
      if (sizeBefore < 1 !== size < 1) {
        const t = (1 - sizeBefore) / (size - sizeBefore);
        const angle = atan2(-before[1] - t * (y - before[1]), -before[0] - t * (x - before[0]));
        out.phase = Math.min(out.phase, Math.abs(angle));
        out.delay = Math.min(out.delay, (angle < 0 ? angle + 2 * Math.PI : angle) / omega);
      }
    }
    before = here;
    sizeBefore = size;
  }
  return out;
}
