import { describe, expect, it } from 'vitest';
import { bracketedZero } from './bracketed-zero';

describe('bracketed zero', () => {
  it.each<[string, (x: number) => number, number, number, number]>([
    ['a parabola', (x) => x * x - 2, 0, 2, Math.SQRT2],
    ['a triple root', (x) => (x - 0.3) * (x - 0.3) * (x - 0.3), -1, 4, 0.3],
    ['a step', (x) => (x < 0.7 ? -1 : 1), 0, 3, 0.7],
    ['a narrow resonance', (x) => (x - 1) / (1e-12 + (x - 1) * (x - 1)), 0.2, 5, 1],
    ['very unequal ends', (x) => 1 - 1e-8 / (x * x), 1e-9, 1e6, 1e-4],
    ['a falling function', (x) => 1 / x - 4, 0.01, 9, 0.25],
  ])('finds the sign change of %s', (_, f, low, high, expected) => {
    const x = bracketedZero(f, low, high, f(low), f(high));
    expect(Math.abs(x - expected)).toBeLessThan(expected === 0.3 ? 1e-6 : 4e-16 * expected);
  });

  it('needs few evaluations for smooth functions', () => {
    let calls = 0;
    const f = (x: number) => {
      calls++;
      return x * x * x - 2 * x - 5;
    };
    const x = bracketedZero(f, 2, 3, -1, 16);
    expect(x).toBeCloseTo(2.0945514815423265, 14);
    expect(calls).toBeLessThan(14);
  });
});
