/** The rows and columns that still hold unknown eigenvalues after balancing, both ends included. */
export interface ActiveWindow {
  low: number;
  high: number;
}

/** A row or column this small beside the diagonal stays as it is: scaling could only make it vanish. */
const NEGLIGIBLE = 1e-290;

/**
 * Balances a real n×n matrix in place by similarity: permutations first move eigenvalues that can
 * be read off the diagonal out of a window [low, high]; then rows and columns inside the window are
 * scaled by powers of two, hence without rounding, until their 1-norms differ by less than about a
 * factor of two. Eigenvalues outside the window are the diagonal entries there.
 *
 * Parlett & Reinsch 1969, Numer. Math. 13, 293–304; Golub & Van Loan, *Matrix Computations*, §7.5.7.
 * An entry is scaled only where the sum of both norms falls by at least 5 %, their published test.
 *
 * @param a row-major n×n, entries finite and below about 1e150 in modulus
 * @param window receives the window; low > high when all eigenvalues are isolated
 */
export function balance(a: Float64Array, n: number, window: ActiveWindow): void {
  isolate(a, n, window);
  scale(a, n, window.low, window.high);
}

function isolate(a: Float64Array, n: number, window: ActiveWindow): void {
  let low = 0;
  let high = n - 1;
  // A row with zeros beside its diagonal entry goes to the bottom of the window.
  for (let i = high; i >= low;) {
    let alone = true;
    const row = i * n;
    for (let j = low; j <= high; j++) {
      if (a[row + j] !== 0 && j !== i) {
        alone = false;
        break;
      }
    }
    if (alone) {
      exchange(a, n, i, high);
      high--;
      i = high;
    } else {
      i--;
    }
  }
  // A column with zeros beside its diagonal entry goes to the top.
  for (let j = low; j <= high;) {
    let alone = true;
    for (let i = low; i <= high; i++) {
      if (a[i * n + j] !== 0 && i !== j) {
        alone = false;
        break;
      }
    }
    if (alone) {
      exchange(a, n, j, low);
      low++;
      j = low;
    } else {
      j++;
    }
  }
  window.low = low;
  window.high = high;
}

function exchange(a: Float64Array, n: number, i: number, j: number): void {
  if (i === j) {
    return;
  }
  for (let k = 0; k < n; k++) {
    const held = a[i * n + k];
    a[i * n + k] = a[j * n + k];
    a[j * n + k] = held;
  }
  for (let k = 0; k < n * n; k += n) {
    const held = a[k + i];
    a[k + i] = a[k + j];
    a[k + j] = held;
  }
}

function scale(a: Float64Array, n: number, low: number, high: number): void {
  let changed = low < high;
  while (changed) {
    changed = false;
    for (let i = low; i <= high; i++) {
      const row = i * n;
      let columnNorm = 0;
      let rowNorm = 0;
      // With the diagonal left out, matrices that are well as they are get scaled for the worse.
      for (let k = low; k <= high; k++) {
        columnNorm += Math.abs(a[k * n + i]);
        rowNorm += Math.abs(a[row + k]);
      }
      if (columnNorm <= NEGLIGIBLE || rowNorm <= NEGLIGIBLE) {
        continue;
      }
      const sum = columnNorm + rowNorm;
      const half = rowNorm * 0.5;
      const twice = rowNorm * 2;
      let factor = 1;
      while (columnNorm < half) {
        factor *= 2;
        columnNorm *= 4;
      }
      while (columnNorm >= twice) {
        factor *= 0.5;
        columnNorm *= 0.25;
      }
      if (factor !== 1 && columnNorm + rowNorm < 0.95 * sum * factor) {
        changed = true;
        const inverse = 1 / factor;
        for (let k = low; k <= high; k++) {
          a[row + k] *= inverse;
        }
        for (let k = low; k <= high; k++) {
          a[k * n + i] *= factor;
        }
      }
    }
  }
}
