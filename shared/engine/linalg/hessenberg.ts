/**
 * Reduces the window [low, high] of a real matrix to upper Hessenberg form in place by stabilised
 * elementary similarity (Gaussian elimination with row interchanges), about half the work of
 * Householder's reduction. Entries below the subdiagonal are set to zero; entries outside the window
 * are left alone, since eigenvalues do not depend on them once the window has been isolated.
 *
 * Martin & Wilkinson 1968, Numer. Math. 12, 349–368; Golub & Van Loan, *Matrix Computations*, §7.4.
 *
 * @param a row-major n×n
 */
export function reduceToHessenberg(a: Float64Array, n: number, low: number, high: number): void {
  for (let m = low + 1; m < high; m++) {
    const column = m - 1;
    let pivotRow = m;
    let largest = Math.abs(a[m * n + column]);
    for (let i = m + 1; i <= high; i++) {
      const size = Math.abs(a[i * n + column]);
      if (size > largest) {
        largest = size;
        pivotRow = i;
      }
    }
    if (largest === 0) {
      continue;
    }
    const rowM = m * n;
    if (pivotRow !== m) {
      const rowP = pivotRow * n;
      for (let j = column; j <= high; j++) {
        const held = a[rowP + j];
        a[rowP + j] = a[rowM + j];
        a[rowM + j] = held;
      }
      for (let k = low * n; k <= high * n; k += n) {
        const held = a[k + pivotRow];
        a[k + pivotRow] = a[k + m];
        a[k + m] = held;
      }
    }
    const pivot = a[rowM + column];
    for (let i = m + 1; i <= high; i++) {
      const rowI = i * n;
      const entry = a[rowI + column];
      if (entry === 0) {
        continue;
      }
      const factor = entry / pivot;
      a[rowI + column] = 0;
      for (let j = m; j <= high; j++) {
        a[rowI + j] -= factor * a[rowM + j];
      }
      for (let k = low * n; k <= high * n; k += n) {
        a[k + m] += factor * a[k + i];
      }
    }
  }
}
