/** Distance from 1 to the next double. */
const EPSILON = 2.220446049250313e-16;

/** Below this a subdiagonal entry is zero whatever its neighbours are (near the smallest normal double). */
const NEGLIGIBLE = 1e-300;

/**
 * Eigenvalues of an upper Hessenberg window by Francis' implicitly double-shifted QR iteration.
 * Only the part of the matrix that still matters is transformed. Deflation uses the conservative
 * test of Ahues & Tisseur, which keeps small eigenvalues of graded matrices; where both shifts are
 * real the one nearer to the last diagonal entry is used twice; every tenth step without deflation
 * takes an exceptional shift, alternately from the bottom and from the top.
 *
 * Francis 1961, Computer J. 4; Golub & Van Loan, *Matrix Computations*, §7.5; Ahues & Tisseur 1997,
 * LAPACK Working Note 122.
 *
 * @param h row-major n×n, upper Hessenberg within [low, high], zeros below; destroyed
 * @param re receives the real parts at the positions low … high
 * @param im receives the imaginary parts there; of a pair the positive one comes first
 * @param iterationLimit steps allowed for each eigenvalue
 * @returns number of eigenvalues that did not separate; 0 on success
 */
export function doubleShiftQr(
  h: Float64Array,
  n: number,
  low: number,
  high: number,
  re: Float64Array,
  im: Float64Array,
  iterationLimit: number,
): number {
  let end = high;
  let iterations = 0;
  while (end >= low) {
    const start = deflationStart(h, n, low, end);
    const corner = end * n + end;
    if (start === end) {
      re[end] = h[corner];
      im[end] = 0;
      end--;
      iterations = 0;
      continue;
    }
    if (start === end - 1) {
      solvePair(h[corner - n - 1], h[corner - n], h[corner - 1], h[corner], re, im, start);
      end -= 2;
      iterations = 0;
      continue;
    }
    if (iterations === iterationLimit) {
      return end - low + 1;
    }
    iterations++;
    sweep(h, n, start, end, iterations);
  }
  return 0;
}

/** Row at which the trailing unreduced block starts; the subdiagonal entry to its left is cleared. */
function deflationStart(h: Float64Array, n: number, low: number, end: number): number {
  for (let k = end; k > low; k--) {
    const at = k * n + k;
    const below = Math.abs(h[at - 1]);
    if (below <= NEGLIGIBLE) {
      h[at - 1] = 0;
      return k;
    }
    const last = h[at];
    const previous = h[at - n - 1];
    let size = Math.abs(last) + Math.abs(previous);
    if (size === 0) {
      if (k - 2 >= low) {
        size += Math.abs(h[at - n - 2]);
      }
      if (k + 1 <= end) {
        size += Math.abs(h[at + n]);
      }
    }
    if (below <= EPSILON * size) {
      const above = Math.abs(h[at - n]);
      const larger = Math.max(below, above);
      const smaller = Math.min(below, above);
      const difference = Math.abs(previous - last);
      const largerDiagonal = Math.max(Math.abs(last), difference);
      const smallerDiagonal = Math.min(Math.abs(last), difference);
      const sum = largerDiagonal + larger;
      const bound = EPSILON * (smallerDiagonal * (largerDiagonal / sum));
      if (smaller * (larger / sum) <= Math.max(NEGLIGIBLE, bound)) {
        h[at - 1] = 0;
        return k;
      }
    }
  }
  return low;
}

/** Eigenvalues of [a b; c d], without overflow in the discriminant and exactly conjugate if complex. */
function solvePair(
  a: number,
  b: number,
  c: number,
  d: number,
  re: Float64Array,
  im: Float64Array,
  at: number,
): void {
  const half = 0.5 * (a - d);
  const larger = Math.max(Math.abs(b), Math.abs(c));
  const smaller = Math.min(Math.abs(b), Math.abs(c)) * (b < 0 === c < 0 ? 1 : -1);
  const size = Math.max(Math.abs(half), larger);
  const scaled = size === 0 ? 0 : (half / size) * half + (larger / size) * smaller;
  const root = Math.sqrt(size) * Math.sqrt(Math.abs(scaled));
  if (scaled >= 0) {
    const far = half + (half >= 0 ? root : -root);
    re[at] = d + far;
    re[at + 1] = far === 0 ? d : d - (larger / far) * smaller;
    im[at] = 0;
    im[at + 1] = 0;
  } else {
    re[at] = d + half;
    re[at + 1] = re[at];
    im[at] = root;
    im[at + 1] = -root;
  }
}

/** One double QR step on the unreduced block [start, end], which has at least three rows. */
function sweep(h: Float64Array, n: number, start: number, end: number, iterations: number): void {
  const corner = end * n + end;
  let x = h[corner];
  let y = h[corner - n - 1];
  let w = h[corner - 1] * h[corner - n];
  if (iterations % 20 === 10) {
    const size = Math.abs(h[corner - 1]) + Math.abs(h[corner - n - 2]);
    x += 0.75 * size;
    y = x;
    w = -0.4375 * size * size;
  } else if (iterations % 20 === 0) {
    const top = start * n + start;
    const size = Math.abs(h[top + n]) + Math.abs(h[top + 2 * n + 1]);
    x = 0.75 * size + h[top];
    y = x;
    w = -0.4375 * size * size;
  } else {
    const half = 0.5 * (y - x);
    const discriminant = half * half + w;
    if (discriminant > 0) {
      const root = Math.sqrt(discriminant);
      const far = half + (half >= 0 ? root : -root);
      x -= w / far;
      y = x;
      w = 0;
    }
  }

  // First column of (H − shift)(H − shift'), started as low as two small subdiagonals in a row allow.
  let m = end - 2;
  let p = 0;
  let q = 0;
  let r = 0;
  for (; ; m--) {
    const at = m * n + m;
    const diagonal = h[at];
    const toX = x - diagonal;
    const toY = y - diagonal;
    p = (toX * toY - w) / h[at + n] + h[at + 1];
    q = h[at + n + 1] - diagonal - toX - toY;
    r = h[at + 2 * n + 1];
    const size = Math.abs(p) + Math.abs(q) + Math.abs(r);
    p /= size;
    q /= size;
    r /= size;
    if (m === start) {
      break;
    }
    const before = h[at - n - 1];
    const small = Math.abs(h[at - 1]) * (Math.abs(q) + Math.abs(r));
    const large = Math.abs(p) * (Math.abs(before) + Math.abs(diagonal) + Math.abs(h[at + n + 1]));
    if (small <= EPSILON * large) {
      break;
    }
  }

  for (let k = m; k < end - 1; k++) {
    const row0 = k * n;
    const row1 = row0 + n;
    const row2 = row1 + n;
    let size = 1;
    if (k !== m) {
      p = h[row0 + k - 1];
      q = h[row1 + k - 1];
      r = h[row2 + k - 1];
      size = Math.abs(p) + Math.abs(q) + Math.abs(r);
      if (size === 0) {
        continue;
      }
      const inverse = 1 / size;
      p *= inverse;
      q *= inverse;
      r *= inverse;
    }
    const norm = Math.sqrt(p * p + q * q + r * r);
    const s = p < 0 ? -norm : norm;
    if (k !== m) {
      h[row0 + k - 1] = -s * size;
      h[row1 + k - 1] = 0;
      h[row2 + k - 1] = 0;
    } else if (m !== start) {
      h[row0 + k - 1] = -h[row0 + k - 1];
    }
    p += s;
    const u0 = p / s;
    const u1 = q / s;
    const u2 = r / s;
    const v1 = q / p;
    const v2 = r / p;
    for (let j = k; j <= end; j++) {
      const sum = h[row0 + j] + v1 * h[row1 + j] + v2 * h[row2 + j];
      h[row0 + j] -= sum * u0;
      h[row1 + j] -= sum * u1;
      h[row2 + j] -= sum * u2;
    }
    const bottom = (k + 3 < end ? k + 3 : end) * n + k;
    for (let i = start * n + k; i <= bottom; i += n) {
      const sum = u0 * h[i] + u1 * h[i + 1] + u2 * h[i + 2];
      h[i] -= sum;
      h[i + 1] -= sum * v1;
      h[i + 2] -= sum * v2;
    }
  }
  finishSweep(h, n, start, end);
}

/** The last reflection of a sweep acts on two rows and two columns only. */
function finishSweep(h: Float64Array, n: number, start: number, end: number): void {
  const k = end - 1;
  const row0 = k * n;
  const row1 = row0 + n;
  let p = h[row0 + k - 1];
  let q = h[row1 + k - 1];
  const size = Math.abs(p) + Math.abs(q);
  if (size === 0) {
    return;
  }
  p /= size;
  q /= size;
  const norm = Math.sqrt(p * p + q * q);
  const s = p < 0 ? -norm : norm;
  h[row0 + k - 1] = -s * size;
  h[row1 + k - 1] = 0;
  p += s;
  const u0 = p / s;
  const u1 = q / s;
  const v1 = q / p;
  for (let j = k; j <= end; j++) {
    const sum = h[row0 + j] + v1 * h[row1 + j];
    h[row0 + j] -= sum * u0;
    h[row1 + j] -= sum * u1;
  }
  const bottom = end * n + k;
  for (let i = start * n + k; i <= bottom; i += n) {
    const sum = u0 * h[i] + u1 * h[i + 1];
    h[i] -= sum;
    h[i + 1] -= sum * v1;
  }
}
