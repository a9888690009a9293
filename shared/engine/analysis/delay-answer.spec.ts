import { describe, expect, it } from 'vitest';
import { phaseShortfall } from './delay-answer';

const degrees = (radians: number): number => (radians * 180) / Math.PI;

describe('phase that a Padé form lacks', () => {
  // arg of [n/n] Padé forms of exp(−jx) in closed form: order 1: 2 atan(x/2); order 2: 2 atan(6x/(12 − x²)).
  it.each([
    [1, 1, degrees(1 - 2 * Math.atan(1 / 2))],
    [2, 2, degrees(2 - 2 * Math.atan2(12, 8))],
    [3, 2, degrees(3 - 2 * Math.atan2(18, 3))],
    [5, 2, degrees(5 - 2 * Math.atan2(30, -13))],
  ])('at ωT = %d, order %d', (x, order, expected) => {
    expect(degrees(phaseShortfall(x, order))).toBeCloseTo(expected, 9);
  });

  it('is 4.2° at ωT = 1 for order 1 and 10.8° at ωT = 3 for order 2', () => {
    expect(degrees(phaseShortfall(1, 1))).toBeCloseTo(4.2, 1);
    expect(degrees(phaseShortfall(3, 2))).toBeCloseTo(10.8, 1);
  });

  it('tends to the whole delay less n half turns', () => {
    expect(phaseShortfall(400, 2)).toBeCloseTo(400 - 2 * Math.PI, 1);
    expect(phaseShortfall(0, 3)).toBe(0);
  });
});
