import { describe, expect, it } from 'vitest';
import { complex, divide, modulus, polynomialAt } from './testing/complex';
import { padeCoefficients } from './pade';

/** Q(−x)/Q(x) at x = jω. */
function onAxis(order: number, omega: number) {
  const coefficients = padeCoefficients(order);
  const s = complex(0, omega);
  const mirrored = coefficients.map((value, k) => (k % 2 === 1 ? -value : value));
  return divide(polynomialAt(mirrored, s), polynomialAt(coefficients, s));
}

describe('Padé form of a delay', () => {
  it.each([
    [0, [1]],
    [1, [2, 1]],
    [2, [12, 6, 1]],
    [3, [120, 60, 12, 1]],
    [4, [1680, 840, 180, 20, 1]],
  ])('order %i has the denominator %j', (order, expected) => {
    expect(padeCoefficients(order)).toEqual(expected);
  });

  it('has whole coefficients', () => {
    for (let order = 1; order <= 9; order++) {
      const coefficients = padeCoefficients(order);
      expect(coefficients.every(Number.isSafeInteger)).toBe(true);
      expect(coefficients[order]).toBe(1);
      // q_k/q_(k+1) = (2n − k)(k + 1)/(n − k)
      for (let k = 0; k < order; k++) {
        expect(coefficients[k] * (order - k)).toBe(coefficients[k + 1] * (2 * order - k) * (k + 1));
      }
    }
  });

  it.each([1, 2, 3, 4])('of order %i is all-pass', (order) => {
    for (const omega of [1e-3, 0.1, 1, 2.5, 10, 1e3])
      expect(modulus(onAxis(order, omega))).toBeCloseTo(1, 12);
  });

  it.each([1, 2, 3])('of order %i agrees with exp(−x) to the power 2n', (order) => {
    const error = (omega: number): number => {
      const { re, im } = onAxis(order, omega);
      return Math.hypot(re - Math.cos(omega), im + Math.sin(omega));
    };
    expect(error(0.2) / error(0.1)).toBeGreaterThan(2 ** (2 * order + 1) * 0.97);
    expect(error(0.2) / error(0.1)).toBeLessThan(2 ** (2 * order + 1) * 1.03);
  });

  it('turns less than the delay itself', () => {
    const shortfall = (order: number, omega: number): number => {
      const { re, im } = onAxis(order, omega);
      const lead = Math.atan2(
        im * Math.cos(omega) + re * Math.sin(omega),
        re * Math.cos(omega) - im * Math.sin(omega),
      );
      return (lead * 180) / Math.PI;
    };
    expect(shortfall(1, 1)).toBeCloseTo((1 - 2 * Math.atan(0.5)) * (180 / Math.PI), 9);
    for (const order of [1, 2, 3])
      for (const omega of [0.5, 1, 2, 3]) expect(shortfall(order, omega)).toBeGreaterThan(0);
  });
});
