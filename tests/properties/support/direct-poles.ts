import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import type { StateSpace } from './direct-loop';
import { solveInPlace } from './linear-solve';

export interface Poles {
  readonly re: number[];
  readonly im: number[];
  /** det(I − D) over the loops that were closed. */
  readonly closing: number;
}

/** A with u_j = v_j for every law but one (−1: all closed); undefined where the algebraic loop has no solution. */
export function closedMatrix(
  { a, b, c, d, states }: StateSpace,
  broken: number,
): { matrix: Float64Array[]; closing: number } | undefined {
  const closed = d.map((_, j) => j).filter((j) => j !== broken);
  const matrix = a.map((row) => row.slice());
  const left = closed.map((i) => Float64Array.from(closed, (j) => (i === j ? 1 : 0) - d[i][j]));
  const closing = determinant(left);
  const right = closed.map((i) => c[i].slice());
  if (!solveInPlace(left, right)) return undefined;
  for (let i = 0; i < states; i++) {
    closed.forEach((j, at) => {
      const gain = b[i][j];
      if (gain !== 0) for (let k = 0; k < states; k++) matrix[i][k] += gain * right[at][k];
    });
  }
  return { matrix, closing };
}

function determinant(matrix: Float64Array[]): number {
  if (matrix.length === 0) return 1;
  if (matrix.length === 1) return matrix[0][0];
  return matrix[0][0] * matrix[1][1] - matrix[0][1] * matrix[1][0];
}

/** Scales rows and columns by powers of two until they have about equal sums (Osborne 1960): same eigenvalues. */
function balance(matrix: Float64Array[]): void {
  const n = matrix.length;
  for (let sweep = 0, changed = true; changed && sweep < 20; sweep++) {
    changed = false;
    for (let i = 0; i < n; i++) {
      let row = 0;
      let column = 0;
      for (let j = 0; j < n; j++) {
        if (j === i) continue;
        row += Math.abs(matrix[i][j]);
        column += Math.abs(matrix[j][i]);
      }
      if (row === 0 || column === 0) continue;
      const factor = 2 ** Math.round(0.5 * Math.log2(row / column));
      if (factor === 1 || column * factor + row / factor >= 0.95 * (row + column)) continue;
      changed = true;
      for (let j = 0; j < n; j++) {
        matrix[i][j] /= factor;
        matrix[j][i] *= factor;
      }
    }
  }
}

/** Eigenvalues by ml-matrix, of the balanced matrix; undefined where an entry is not finite (it would not end). */
export function directPoles(loop: StateSpace, broken: number): Poles | undefined {
  const closed = closedMatrix(loop, broken);
  if (closed === undefined) return undefined;
  const { matrix, closing } = closed;
  for (const row of matrix) for (const entry of row) if (!Number.isFinite(entry)) return undefined;
  balance(matrix);
  const values = new EigenvalueDecomposition(new Matrix(matrix), { assumeSymmetric: false });
  return { re: values.realEigenvalues, im: values.imaginaryEigenvalues, closing };
}
