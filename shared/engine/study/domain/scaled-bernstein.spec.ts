import { describe, expect, it } from 'vitest';
import { ScaledBernstein } from './scaled-bernstein';

/** 3 x² y − 2 x + 0.5 in (x, y), coefficients times 2. */
const POLYNOMIAL = {
  variables: 2,
  exponent: -1,
  broken: [
    { power: 0, exponents: [2, 1], coefficient: 6n },
    { power: 0, exponents: [1, 0], coefficient: -4n },
    { power: 0, exponents: [0, 0], coefficient: 1n },
  ],
  returned: [],
  divisors: [],
};

const value = (x: number, y: number) => 3 * x * x * y - 2 * x + 0.5;

describe('ScaledBernstein', () => {
  const form = new ScaledBernstein(POLYNOMIAL);

  it('has the degrees of the polynomial', () => {
    expect(form.degrees).toEqual([2, 1]);
    expect(form.size).toBe(6);
  });

  it.each([
    { low: [-1, 2], high: [3, 5] },
    { low: [-0.25, 0.5], high: [0.75, 0.625] },
    { low: [1024, -8], high: [4096, 16] },
  ])('on %j has the polynomial’s values at the corners and its mean at the centre', (box) => {
    const coefficients = form.coefficients(box).map(Number);
    const scale = coefficients[0] / value(box.low[0], box.low[1]);
    expect(scale).toBeGreaterThan(0);
    coefficients.forEach((coefficient, index) => {
      const corner = form.corner(index, box, [NaN, NaN]);
      if (corner !== undefined) expect(coefficient).toBe(scale * value(corner[0], corner[1]));
    });
    expect(coefficients.map((_, index) => form.corner(index, box, [0, 0]) === undefined)).toEqual([
      false,
      false,
      true,
      true,
      false,
      false,
    ]);
    // At t = ½ every t^j (1 − t)^(D − j) is 2^−D.
    const sum = coefficients.reduce((total, coefficient) => total + coefficient, 0);
    expect(sum / 8).toBe(scale * value((box.low[0] + box.high[0]) / 2, (box.low[1] + box.high[1]) / 2));
  });
});
