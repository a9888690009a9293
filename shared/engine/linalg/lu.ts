/**
 * Factors a real n×n matrix in place into P A = L U with partial pivoting. L has a unit diagonal and
 * stands below it, U on and above it.
 *
 * Golub & Van Loan, *Matrix Computations*, §3.4.
 *
 * @param a row-major n×n, overwritten by the factors
 * @param pivots receives for each step the row exchanged with it, n entries
 * @returns 0 when a pivot is exactly zero (or not a number): the factors are then unusable;
 *   otherwise the sign of the permutation, so that det A = sign · Π U_ii
 */
export function factorLu(a: Float64Array, n: number, pivots: Int32Array): number {
  let sign = 1;
  for (let k = 0; k < n; k++) {
    const rowK = k * n;
    let pivotRow = k;
    let largest = Math.abs(a[rowK + k]);
    for (let i = k + 1; i < n; i++) {
      const size = Math.abs(a[i * n + k]);
      if (size > largest) {
        largest = size;
        pivotRow = i;
      }
    }
    if (!(largest > 0)) {
      return 0;
    }
    pivots[k] = pivotRow;
    if (pivotRow !== k) {
      sign = -sign;
      const rowP = pivotRow * n;
      for (let j = 0; j < n; j++) {
        const held = a[rowK + j];
        a[rowK + j] = a[rowP + j];
        a[rowP + j] = held;
      }
    }
    const pivot = a[rowK + k];
    for (let i = k + 1; i < n; i++) {
      const rowI = i * n;
      if (a[rowI + k] === 0) {
        continue;
      }
      const factor = a[rowI + k] / pivot;
      a[rowI + k] = factor;
      for (let j = k + 1; j < n; j++) {
        a[rowI + j] -= factor * a[rowK + j];
      }
    }
  }
  return sign;
}

/**
 * Solves A X = B with the factors of `factorLu`.
 *
 * @param a factors, row-major n×n
 * @param pivots the exchanges of `factorLu`
 * @param b row-major n×columns, overwritten by X
 */
export function solveLu(
  a: Float64Array,
  n: number,
  pivots: Int32Array,
  b: Float64Array,
  columns: number,
): void {
  for (let k = 0; k < n; k++) {
    const p = pivots[k];
    if (p !== k) {
      for (let j = 0; j < columns; j++) {
        const held = b[k * columns + j];
        b[k * columns + j] = b[p * columns + j];
        b[p * columns + j] = held;
      }
    }
  }
  for (let i = 1; i < n; i++) {
    for (let k = 0; k < i; k++) {
      const factor = a[i * n + k];
      if (factor !== 0) {
        for (let j = 0; j < columns; j++) {
          b[i * columns + j] -= factor * b[k * columns + j];
        }
      }
    }
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) {
      const factor = a[i * n + k];
      if (factor !== 0) {
        for (let j = 0; j < columns; j++) {
          b[i * columns + j] -= factor * b[k * columns + j];
        }
      }
    }
    const pivot = a[i * n + i];
    for (let j = 0; j < columns; j++) {
      b[i * columns + j] /= pivot;
    }
  }
}
