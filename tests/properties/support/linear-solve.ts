/** Solves A X = B by elimination with row pivoting; A (n rows) and B are overwritten, X ends in B. False if singular. */
export function solveInPlace(a: Float64Array[], b: Float64Array[]): boolean {
  const n = a.length;
  for (let column = 0; column < n; column++) {
    let pivot = column;
    for (let i = column + 1; i < n; i++) {
      if (Math.abs(a[i][column]) > Math.abs(a[pivot][column])) pivot = i;
    }
    const size = a[pivot][column];
    if (size === 0 || !Number.isFinite(size)) return false;
    [a[column], a[pivot]] = [a[pivot], a[column]];
    [b[column], b[pivot]] = [b[pivot], b[column]];
    for (let i = column + 1; i < n; i++) {
      const factor = a[i][column] / size;
      if (factor === 0) continue;
      for (let j = column; j < n; j++) a[i][j] -= factor * a[column][j];
      for (let j = 0; j < b[i].length; j++) b[i][j] -= factor * b[column][j];
    }
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let j = 0; j < b[i].length; j++) {
      let sum = b[i][j];
      for (let k = i + 1; k < n; k++) sum -= a[i][k] * b[k][j];
      b[i][j] = sum / a[i][i];
    }
  }
  return true;
}
