import { type ActiveWindow, balance } from './balance';
import { factorLu, solveLu } from './lu';

const EPSILON = 2.220446049250313e-16;

/**
 * How well a list of numbers stands for the eigenvalues of A, as one ratio in units of rounding,
 * in the manner of LAPACK's tests: values up to a few tens are as good as doubles allow.
 *
 * The largest of
 *   ‖A v − λ v‖ / (n ε ‖A‖ ‖v‖) for every λ, v from two steps of inverse iteration (a small ratio
 *   says that λ is an exact eigenvalue of a matrix as near as that), and
 *   |Σλ − tr A| / (n ε ‖A‖) and |Σλ² − tr A²| / (n ε ‖A‖²), without which one eigenvalue given twice
 *   in place of another would pass.
 * Norms are Frobenius norms of the balanced matrix, so that small eigenvalues of a badly scaled
 * matrix are judged by their own size.
 *
 * Anderson et al. 1999, *LAPACK Users' Guide*, and Golub & Van Loan, *Matrix Computations*, §7.6.
 *
 * @param a row-major n×n, finite; left as it is
 * @param re n real parts
 * @param im n imaginary parts, closed under conjugation
 */
export function eigenvalueResidualRatio(
  a: Float64Array,
  n: number,
  re: Float64Array,
  im: Float64Array,
): number {
  const matrix = a.slice(0, n * n);
  const window: ActiveWindow = { low: 0, high: -1 };
  balance(matrix, n, window);
  let norm = 0;
  for (let k = 0; k < n * n; k++) {
    norm += matrix[k] * matrix[k];
  }
  norm = Math.sqrt(norm);
  if (norm === 0) {
    let largest = 0;
    for (let k = 0; k < n; k++) {
      largest = Math.max(largest, Math.abs(re[k]), Math.abs(im[k]));
    }
    return largest === 0 ? 0 : Infinity;
  }
  const unit = n * EPSILON * norm;
  let worst = sumMismatch(matrix, n, re, im, norm) / unit;
  for (let k = 0; k < n; k++) {
    if (im[k] >= 0) {
      worst = Math.max(worst, smallestResidual(matrix, n, re[k], im[k], norm) / unit);
    }
  }
  return worst;
}

function sumMismatch(
  matrix: Float64Array,
  n: number,
  re: Float64Array,
  im: Float64Array,
  norm: number,
): number {
  let first = 0;
  let second = 0;
  let imaginary = 0;
  for (let i = 0; i < n; i++) {
    first += matrix[i * n + i] - re[i];
    imaginary += im[i];
    second -= (re[i] / norm) * re[i] - (im[i] / norm) * im[i];
    for (let j = 0; j < n; j++) {
      second += (matrix[i * n + j] / norm) * matrix[j * n + i];
    }
  }
  return Math.max(Math.abs(first), Math.abs(imaginary), Math.abs(second));
}

/** min ‖(A − λI)v‖ over the unit vectors that inverse iteration meets, in the real form of order 2n. */
function smallestResidual(matrix: Float64Array, n: number, re: number, im: number, norm: number): number {
  const order = im === 0 ? n : 2 * n;
  const factors = new Float64Array(order * order);
  const pivots = new Int32Array(order);
  let shift = re;
  fillShifted(factors, matrix, n, order, shift, im);
  // An exactly singular matrix cannot be inverted; a shift by rounding leaves the vector as good.
  for (let step = 1; factorLu(factors, order, pivots) === 0; step *= 2) {
    shift = re + step * EPSILON * norm;
    fillShifted(factors, matrix, n, order, shift, im);
  }
  const v = new Float64Array(order);
  for (let i = 0; i < order; i++) {
    // Any fixed vector without symmetry will do to start.
    v[i] = 1 + ((i * 7919) % 101) / 101;
  }
  let best = Infinity;
  for (let step = 0; step < 3; step++) {
    solveLu(factors, order, pivots, v, 1);
    let largest = 0;
    for (let i = 0; i < order; i++) {
      largest = Math.max(largest, Math.abs(v[i]));
    }
    for (let i = 0; i < order; i++) {
      v[i] /= largest;
    }
    best = Math.min(best, residual(matrix, n, order, re, im, v));
  }
  return best;
}

function fillShifted(
  out: Float64Array,
  matrix: Float64Array,
  n: number,
  order: number,
  re: number,
  im: number,
): void {
  out.fill(0);
  for (let block = 0; block < order; block += n) {
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        out[(block + i) * order + block + j] = matrix[i * n + j] - (i === j ? re : 0);
      }
      if (order > n) {
        out[(block + i) * order + (n - block) + i] = block === 0 ? im : -im;
      }
    }
  }
}

function residual(
  matrix: Float64Array,
  n: number,
  order: number,
  re: number,
  im: number,
  v: Float64Array,
): number {
  let size = 0;
  let error = 0;
  for (let block = 0; block < order; block += n) {
    const other = order > n ? n - block : 0;
    const turn = order > n ? (block === 0 ? im : -im) : 0;
    for (let i = 0; i < n; i++) {
      let sum = turn * v[other + i] - re * v[block + i];
      for (let j = 0; j < n; j++) {
        sum += matrix[i * n + j] * v[block + j];
      }
      error += sum * sum;
      size += v[block + i] * v[block + i];
    }
  }
  return Math.sqrt(error / size);
}
