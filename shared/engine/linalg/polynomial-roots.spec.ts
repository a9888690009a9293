import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { NonFinitePolynomialError, ZeroPolynomialError } from './errors';
import { PolynomialRootSolver } from './polynomial-roots';
import { evaluatePolynomial } from './polynomial-value';

const solver = new PolynomialRootSolver(24);

function roots(ascending: number[]): { re: number[]; im: number[] } {
  const re = new Float64Array(24);
  const im = new Float64Array(24);
  const count = solver.solve(Float64Array.from(ascending), ascending.length - 1, re, im);
  return { re: [...re.slice(0, count)], im: [...im.slice(0, count)] };
}

function fromRoots(values: number[]): number[] {
  let p = [1];
  for (const root of values) {
    p = [0, ...p].map((c, k) => c - (k < p.length ? root * p[k] : 0));
  }
  return p;
}

describe('polynomial roots', () => {
  it('solves low degrees', () => {
    expect(roots([7])).toEqual({ re: [], im: [] });
    expect(roots([6, 2])).toEqual({ re: [-3], im: [0] });
    expect(roots([2, -3, 1])).toEqual({ re: [2, 1], im: [0, 0] });
    expect(roots([5, 2, 1])).toEqual({ re: [-1, -1], im: [2, -2] });
  });

  it('gives exact zeros for zero trailing coefficients and skips zero leading ones', () => {
    expect(roots([0, 0, -1, 1, 0, 0])).toEqual({ re: [1, 0, 0], im: [0, 0, 0] });
    expect(roots([0, 0, 3])).toEqual({ re: [0, 0], im: [0, 0] });
  });

  it('finds integer roots to the accuracy their conditioning leaves', () => {
    // Condition numbers of the roots 1 … 8 reach about 1e5 (Wilkinson 1963, Rounding Errors).
    const { re, im } = roots(fromRoots([1, 2, 3, 4, 5, 6, 7, 8]));
    expect(im.every((y) => y === 0)).toBe(true);
    re.forEach((x, k) => expect(Math.abs(x / (8 - k) - 1)).toBeLessThan(1e-9));
  });

  it('keeps the relative accuracy of roots of very different size', () => {
    const expected = [1e9, 1e3, 1, -1e-6, -1e12].sort((a, b) => b - a);
    const { re } = roots(fromRoots(expected));
    re.forEach((x, k) => expect(Math.abs(x / expected[k] - 1)).toBeLessThan(1e-14));
    const tiny = roots([1, 1, 1e-300]);
    expect(tiny.re[0]).toBeCloseTo(-1, 14);
    expect(tiny.re[1] / -1e300).toBeCloseTo(1, 14);
  });

  it('tells two close real roots from a pair', () => {
    // (z − 1)(z − 1 − 1e−6): coefficients rounded, so the roots move by about 1e−10.
    const { re, im } = roots(fromRoots([1, 1 + 1e-6, -2, 5]));
    expect(im).toEqual([0, 0, 0, 0]);
    expect(Math.abs(re[1] - 1 - 1e-6)).toBeLessThan(2e-9);
    expect(Math.abs(re[2] - 1)).toBeLessThan(2e-9);
  });

  it('puts every root within rounding of zero, coefficient by coefficient', () => {
    const coefficient = fc
      .tuple(fc.integer({ min: 1, max: 5000 }), fc.boolean(), fc.integer({ min: -25, max: 25 }))
      .map(([mantissa, negative, exponent]) => (negative ? -mantissa : mantissa) * 2 ** exponent);
    const value = { ratioRe: 0, ratioIm: 0, relativeSize: 0 };
    fc.assert(
      fc.property(fc.array(coefficient, { minLength: 2, maxLength: 17 }), (ascending) => {
        const { re, im } = roots(ascending);
        expect(re.length).toBe(ascending.length - 1);
        const b = Float64Array.from(ascending);
        for (let k = 0; k < re.length; k++) {
          evaluatePolynomial(b, ascending.length - 1, re[k], im[k], value);
          expect(value.relativeSize).toBeLessThan(1e-14);
        }
        expect(im.reduce((sum, y) => sum + y, 0)).toBe(0);
      }),
      { seed: 20240606, numRuns: 500 },
    );
  });

  it('refuses the zero polynomial and coefficients that are not finite', () => {
    expect(() => roots([0, 0, 0])).toThrow(ZeroPolynomialError);
    expect(() => roots([1, NaN, 1])).toThrow(NonFinitePolynomialError);
    expect(() => roots([1, 2, Infinity])).toThrow('power 2');
    expect(() => solver.solve(new Float64Array(40), 30, new Float64Array(40), new Float64Array(40))).toThrow(
      RangeError,
    );
  });
});
