import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { factorLu, solveLu } from './lu';

describe('LU factorisation', () => {
  it('gives the determinant by the sign of the permutation and the diagonal', () => {
    const a = Float64Array.of(0, 2, 1, 1, 1, 0, 3, 0, 1);
    const sign = factorLu(a, 3, new Int32Array(3));
    expect(sign * a[0] * a[4] * a[8]).toBeCloseTo(-5, 14);
  });

  it('returns 0 for a singular matrix and for one with NaN', () => {
    expect(factorLu(Float64Array.of(1, 2, 2, 4), 2, new Int32Array(2))).toBe(0);
    expect(factorLu(Float64Array.of(NaN, 2, NaN, 4), 2, new Int32Array(2))).toBe(0);
    expect(factorLu(new Float64Array(9), 3, new Int32Array(3))).toBe(0);
  });

  it('accepts order 0', () => {
    expect(factorLu(new Float64Array(0), 0, new Int32Array(0))).toBe(1);
  });

  it('solves for several right-hand sides with a backward error of rounding size', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 9 }),
        fc.integer({ min: 1, max: 4 }),
        fc.array(fc.double({ min: -1, max: 1, noNaN: true }), { minLength: 120, maxLength: 120 }),
        (n, columns, numbers) => {
          const a = Float64Array.from(numbers.slice(0, n * n));
          const b = Float64Array.from(numbers.slice(81, 81 + n * columns));
          const factors = a.slice();
          const x = b.slice();
          const pivots = new Int32Array(n);
          fc.pre(factorLu(factors, n, pivots) !== 0);
          solveLu(factors, n, pivots, x, columns);
          fc.pre(x.every(Number.isFinite));
          for (let c = 0; c < columns; c++) {
            for (let i = 0; i < n; i++) {
              let difference = -b[i * columns + c];
              let size = 1e-300;
              for (let j = 0; j < n; j++) {
                difference += a[i * n + j] * x[j * columns + c];
                size = Math.max(size, Math.abs(x[j * columns + c]));
              }
              expect(Math.abs(difference)).toBeLessThan(1e-13 * (size + 1));
            }
          }
        },
      ),
      { seed: 20240605, numRuns: 300 },
    );
  });
});
