import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { EigenvalueSolver } from '../../shared/engine/linalg';

const ORDERS = [4, 5, 6, 8, 10, 12, 14];
const MATRICES = 64;
const ROUNDS = 15;

interface Timing {
  order: number;
  /** Median time per matrix of our solver, µs, the copy of the matrix included. */
  microseconds: number;
  /** Median over the rounds of (ml-matrix's time / ours), each pair measured back to back. */
  ratio: number;
}

/**
 * Times the eigenvalue kernel at orders 4 to 14 on seeded full matrices, in pairs with
 * EigenvalueDecomposition of ml-matrix (which works out the vectors as well; it has no other mode).
 */
export function benchEigenvalues(print: (line: string) => void): Timing[] {
  print('eigenvalues of full matrices: order, µs each, ml-matrix / ours');
  return ORDERS.map((order) => {
    const timing = timeOrder(order);
    print(
      `  ${String(order).padStart(2)}  ${timing.microseconds.toFixed(2).padStart(7)}  ${timing.ratio.toFixed(1).padStart(6)}`,
    );
    return timing;
  });
}

function timeOrder(order: number): Timing {
  const matrices = randomMatrices(order);
  const theirs = matrices.map((a) => Matrix.from1DArray(order, order, a));
  const solver = new EigenvalueSolver(order);
  const work = new Float64Array(order * order);
  const re = new Float64Array(order);
  const im = new Float64Array(order);
  // About equal work per round at every order, long against the clock's resolution.
  const repeats = Math.max(1, Math.round(40_000 / (MATRICES * order * order)));
  let checksum = 0;
  const ours = () => {
    for (let r = 0; r < repeats; r++) {
      for (const a of matrices) {
        work.set(a);
        solver.compute(work, order, re, im);
        checksum += re[0];
      }
    }
  };
  const reference = () => {
    for (let r = 0; r < repeats; r++) {
      for (const a of theirs) {
        checksum += new EigenvalueDecomposition(a, { assumeSymmetric: false }).realEigenvalues[0];
      }
    }
  };
  for (let warm = 0; warm < 5; warm++) {
    ours();
    reference();
  }
  const times: number[] = [];
  const ratios: number[] = [];
  for (let round = 0; round < ROUNDS; round++) {
    const start = performance.now();
    ours();
    const middle = performance.now();
    reference();
    const end = performance.now();
    times.push(((middle - start) * 1000) / (repeats * MATRICES));
    ratios.push((end - middle) / (middle - start));
  }
  if (!Number.isFinite(checksum)) {
    throw new Error('an eigenvalue came out not finite');
  }
  return { order, microseconds: median(times), ratio: median(ratios) };
}

function randomMatrices(order: number): Float64Array[] {
  let state = 1234567 + order;
  return Array.from({ length: MATRICES }, () =>
    Float64Array.from({ length: order * order }, () => {
      state = (Math.imul(state, 1664525) + 1013904223) >>> 0;
      return state / 2147483648 - 1;
    }),
  );
}

function median(values: number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[sorted.length >> 1];
}
