import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { EigenvalueSolver } from './eigenvalues';
import { EigenvalueIterationError, NonFiniteMatrixError } from './errors';
import { eigenvalueResidualRatio } from './residual';
import { sortPoles } from './sort-poles';

interface Spectrum {
  re: Float64Array;
  im: Float64Array;
}

function spectrum(rows: number[][], iterationLimit?: number): Spectrum {
  const n = rows.length;
  const re = new Float64Array(n);
  const im = new Float64Array(n);
  new EigenvalueSolver(n, iterationLimit).compute(Float64Array.from(rows.flat()), n, re, im);
  sortPoles(re, im, n);
  return { re, im };
}

function residual(rows: number[][], found: Spectrum): number {
  return eigenvalueResidualRatio(Float64Array.from(rows.flat()), rows.length, found.re, found.im);
}

function expectReal(rows: number[][], expected: number[], relative: number): void {
  const found = spectrum(rows);
  const size = Math.max(...expected.map(Math.abs));
  expect(Math.max(...found.im.map(Math.abs))).toBeLessThanOrEqual(relative * size);
  for (let k = 0; k < expected.length; k++) {
    expect(Math.abs(found.re[k] - expected[k])).toBeLessThanOrEqual(relative * size);
  }
}

function filled(n: number, entry: (i: number, j: number) => number): number[][] {
  return Array.from({ length: n }, (_, i) => Array.from({ length: n }, (_, j) => entry(i, j)));
}

/** Descending coefficients of the monic polynomial with these roots, then its companion matrix. */
function companionOf(roots: number[]): number[][] {
  let p = [1];
  for (const root of roots) {
    p = [...p, 0].map((c, k) => c - (k > 0 ? root * p[k - 1] : 0));
  }
  return filled(roots.length, (i, j) => (i === 0 ? -p[j + 1] : i === j + 1 ? 1 : 0));
}

/** Dense rows: a reducible matrix has no scaling that balancing could find again. */
const square = (lowest: number, highest: number) =>
  fc.integer({ min: lowest, max: highest }).chain((n) =>
    fc.array(
      fc.array(
        fc.integer({ min: -4000, max: 4000 }).map((k) => (k === 0 ? 1 : k) / 400),
        { minLength: n, maxLength: n },
      ),
      { minLength: n, maxLength: n },
    ),
  );

describe('eigenvalues of small and trivial matrices', () => {
  it('accepts order 0', () => {
    const none = new Float64Array(0);
    new EigenvalueSolver(4).compute(none, 0, none, none);
    expect(none.length).toBe(0);
  });

  it('returns a single entry as it is', () => {
    expect(spectrum([[-3.25]])).toEqual({ re: Float64Array.of(-3.25), im: Float64Array.of(0) });
  });

  it('gives exact zeros for the zero matrix', () => {
    const { re, im } = spectrum(filled(5, () => 0));
    expect([...re, ...im].every((x) => x === 0)).toBe(true);
  });

  it.each([
    [
      [
        [0, 1],
        [-1, 0],
      ],
      [0, 0],
      [1, -1],
    ],
    [
      [
        [3, -2],
        [4, -1],
      ],
      [1, 1],
      [2, -2],
    ],
    [
      [
        [1, 2],
        [3, 2],
      ],
      [4, -1],
      [0, 0],
    ],
    [
      [
        [5, 7],
        [0, -2],
      ],
      [5, -2],
      [0, 0],
    ],
    [
      [
        [2, 1],
        [0, 2],
      ],
      [2, 2],
      [0, 0],
    ],
    [
      [
        [0, 1],
        [0, 0],
      ],
      [0, 0],
      [0, 0],
    ],
  ])('2×2 %j', (rows, re, im) => {
    const found = spectrum(rows);
    expect([...found.re].map((x, k) => Math.abs(x - re[k])).every((e) => e < 1e-15)).toBe(true);
    expect([...found.im].map((x, k) => Math.abs(x - im[k])).every((e) => e < 1e-15)).toBe(true);
  });

  it('reads triangular matrices off the diagonal without rounding', () => {
    const rows = filled(7, (i, j) => (j < i ? 0 : j === i ? 1 / (i + 3) : 1e3 * (i + j)));
    const expected = Array.from({ length: 7 }, (_, i) => 1 / (i + 3));
    expect([...spectrum(rows).re]).toEqual(expected);
  });

  it('keeps eigenvalues near both ends of the exponent range', () => {
    for (const size of [1e300, 1e-300]) {
      const { re, im } = spectrum([
        [0, size, 0],
        [-size, 0, 0],
        [size, size, -size],
      ]);
      expect(re[2]).toBe(-size);
      expect(Math.abs(im[0] / size - 1)).toBeLessThan(1e-15);
      expect(im[1]).toBe(-im[0]);
    }
  });
});

describe('eigenvalues of matrices with known spectra', () => {
  it.each([2, 5, 8, 13])('Clement matrix of order %i: n−1, n−3, …, 1−n', (n) => {
    // Clement 1959, SIAM Review 1, 50–52.
    const rows = filled(n, (i, j) => (j === i + 1 ? j : j === i - 1 ? n - i : 0));
    expectReal(
      rows,
      Array.from({ length: n }, (_, k) => n - 1 - 2 * k),
      1e-12,
    );
  });

  it('Frank matrix of order 12', () => {
    // Golub & Wilkinson 1976, SIAM Review 18, 578–619 (from memory; they are reciprocal in pairs).
    const expected = [
      32.2288915, 20.1989886, 12.3110774, 6.96153309, 3.51185595, 1.55398871, 0.643505319, 0.284749721,
      0.14364652, 0.0812276592, 0.0495074292, 0.0310280606,
    ];
    const rows = filled(12, (i, j) => (j >= i - 1 ? 12 - Math.max(i, j) : 0));
    expectReal(rows, expected, 3e-9);
    expect(residual(rows, spectrum(rows))).toBeLessThan(20);
  });

  it('Grcar matrix of order 16: closed under conjugation, backward stable', () => {
    // Grcar 1989, Sandia report SAND89-8691.
    const rows = filled(16, (i, j) => (j === i - 1 ? -1 : j >= i && j <= i + 3 ? 1 : 0));
    const found = spectrum(rows);
    expect(residual(rows, found)).toBeLessThan(20);
    expect(Math.min(...found.re)).toBeGreaterThan(0);
    expect(Math.max(...found.im)).toBeGreaterThan(2);
  });

  it.each([[[-1, -2, -3, -4, -5, -6]], [[10, 1, 0.1, -0.1, -1, -10]], [[1e4, 1, -1e-4]]])(
    'companion matrix with roots %j',
    (roots) => {
      expectReal(
        companionOf(roots),
        [...roots].sort((a, b) => b - a),
        1e-11,
      );
    },
  );

  it.each([3, 4, 6, 8, 9])('cyclic shift of order %i: the roots of unity', (n) => {
    const found = spectrum(filled(n, (i, j) => ((i + 1) % n === j ? 1 : 0)));
    for (let k = 0; k < n; k++) {
      const angle = (2 * Math.PI * k) / n;
      const nearest = [...found.re].map((x, i) =>
        Math.hypot(x - Math.cos(angle), found.im[i] - Math.sin(angle)),
      );
      expect(Math.min(...nearest)).toBeLessThan(1e-14);
    }
  });

  it('keeps small and large eigenvalues of states 1e8 apart to their own size', () => {
    // Block oscillators of 1e4 rad/s and 1e−4 rad/s, coupled one way only in the exact spectrum.
    const inner = [
      [0, 1, 0, 0],
      [-1e8, -2e3, 0, 0],
      [3, 1, 0, 1],
      [1, 2, -1e-8, -2e-5],
    ];
    const d = [1, 1e-8, 1e8, 1e4];
    const rows = inner.map((row, i) => row.map((x, j) => (x * d[i]) / d[j]));
    const found = spectrum(rows);
    const slow = Math.sqrt(1e-8 - 1e-10);
    const fast = Math.sqrt(1e8 - 1e6);
    expect(Math.abs(found.re[0] / -1e-5 - 1)).toBeLessThan(1e-11);
    expect(Math.abs(found.im[0] / slow - 1)).toBeLessThan(1e-11);
    expect(Math.abs(found.re[2] / -1e3 - 1)).toBeLessThan(1e-13);
    expect(Math.abs(found.im[2] / fast - 1)).toBeLessThan(1e-13);
  });

  it('splits a defective triple eigenvalue by no more than the cube root of rounding', () => {
    // S J S⁻¹ with J the Jordan block of 2 and S = [1 0 0; 1 1 0; 2 1 1], so (λ − 2)³ exactly.
    const rows = [
      [1, 1, 0],
      [-2, 2, 1],
      [-3, 1, 3],
    ];
    const found = spectrum(rows);
    for (let k = 0; k < 3; k++) {
      expect(Math.hypot(found.re[k] - 2, found.im[k])).toBeLessThan(5e-5);
    }
    expect(residual(rows, found)).toBeLessThan(20);
  });
});

describe('eigenvalues under similarity', () => {
  it('survive a permutation', () => {
    fc.assert(
      fc.property(square(1, 9), fc.infiniteStream(fc.nat()), (rows, numbers) => {
        const n = rows.length;
        const order = Array.from({ length: n }, (_, k) => k);
        for (let k = n - 1; k > 0; k--) {
          const j = (numbers.next().value as number) % (k + 1);
          [order[k], order[j]] = [order[j], order[k]];
        }
        const permuted = filled(n, (i, j) => rows[order[i]][order[j]]);
        expect(residual(rows, spectrum(permuted))).toBeLessThan(60);
        expect(residual(rows, spectrum(rows))).toBeLessThan(60);
      }),
      { seed: 20240601, numRuns: 300 },
    );
  });

  it('survive a diagonal scaling by powers of two', () => {
    fc.assert(
      fc.property(
        square(2, 9),
        fc.array(fc.integer({ min: -30, max: 30 }), { minLength: 9, maxLength: 9 }),
        (rows, exponents) => {
          const scaled = filled(rows.length, (i, j) => rows[i][j] * 2 ** (exponents[i] - exponents[j]));
          expect(residual(rows, spectrum(scaled))).toBeLessThan(60);
        },
      ),
      { seed: 20240602, numRuns: 300 },
    );
  });

  it('of symmetric matrices agree to rounding before and after both', () => {
    fc.assert(
      fc.property(square(2, 8), (rows) => {
        const n = rows.length;
        const symmetric = filled(n, (i, j) => rows[Math.min(i, j)][Math.max(i, j)]);
        const changed = filled(n, (i, j) => symmetric[n - 1 - i][n - 1 - j] * 2 ** (5 * (i - j)));
        const first = spectrum(symmetric);
        const second = spectrum(changed);
        const size = Math.max(1e-300, ...symmetric.flat().map(Math.abs)) * n;
        for (let k = 0; k < n; k++) {
          expect(Math.abs(first.re[k] - second.re[k])).toBeLessThan(1e-12 * size);
        }
      }),
      { seed: 20240603, numRuns: 200 },
    );
  });

  it('come in exactly conjugate pairs, the upper one first', () => {
    fc.assert(
      fc.property(square(2, 9), (rows) => {
        const n = rows.length;
        const re = new Float64Array(n);
        const im = new Float64Array(n);
        new EigenvalueSolver(n).compute(Float64Array.from(rows.flat()), n, re, im);
        for (let k = 0; k < n; k++) {
          if (im[k] !== 0) {
            expect(im[k]).toBeGreaterThan(0);
            expect([re[k + 1], im[k + 1]]).toEqual([re[k], -im[k]]);
            k++;
          }
        }
      }),
      { seed: 20240604, numRuns: 200 },
    );
  });
});

describe('faults', () => {
  it.each([NaN, Infinity, -Infinity])('refuses an entry %d at once, naming its place', (bad) => {
    const rows = filled(4, (i, j) => (i === 2 && j === 1 ? bad : i + j));
    expect(() => spectrum(rows)).toThrow(NonFiniteMatrixError);
    expect(() => spectrum(rows)).toThrow('(2, 1)');
  });

  it('reports the iteration limit', () => {
    const rows = filled(8, (i, j) => ((i * 7 + j * 3) % 11) - 5 + (i === j ? 1 : 0));
    expect(() => spectrum(rows, 1)).toThrow(EigenvalueIterationError);
    expect(residual(rows, spectrum(rows))).toBeLessThan(20);
  });

  it('refuses an order above its own', () => {
    const solver = new EigenvalueSolver(2);
    const room = new Float64Array(9);
    expect(() => solver.compute(room, 3, room, room)).toThrow(RangeError);
  });
});

describe('residual ratio', () => {
  it('notices a wrong eigenvalue, and one given twice in place of another', () => {
    const rows = [
      [1, 2, 0],
      [0, 3, 4],
      [0, 0, 5],
    ];
    const im = new Float64Array(3);
    expect(residual(rows, { re: Float64Array.of(5, 3, 1), im })).toBeLessThan(1);
    expect(residual(rows, { re: Float64Array.of(5, 3, 1 + 1e-9), im })).toBeGreaterThan(1e4);
    expect(residual(rows, { re: Float64Array.of(5, 3, 3), im })).toBeGreaterThan(1e10);
  });
});

describe('sortPoles', () => {
  it('orders by real part, then by imaginary part, both descending', () => {
    const re = Float64Array.of(-2, -1, -2, 0, -1);
    const im = Float64Array.of(-3, 0, 3, 0, 5);
    sortPoles(re, im, 5);
    expect([...re]).toEqual([0, -1, -1, -2, -2]);
    expect([...im]).toEqual([0, 5, 0, 3, -3]);
  });
});
