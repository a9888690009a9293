import { describe, expect, it } from 'vitest';
import { ReturnDifference } from './return-difference';

type Pole = [number, number];

function load(loop: ReturnDifference, closed: Pole[], open: Pole[], lead: number): void {
  const part = (poles: Pole[], k: 0 | 1) => Float64Array.from(poles.map((p) => p[k]));
  loop.load(part(closed, 0), part(closed, 1), closed.length, part(open, 0), part(open, 1), open.length, lead);
}

function direct(closed: Pole[], open: Pole[], lead: number, omega: number): Pole {
  let x = lead;
  let y = 0;
  for (const [re, im] of closed) {
    [x, y] = [-x * re - y * (omega - im), x * (omega - im) - y * re];
  }
  for (const [re, im] of open) {
    const size = re * re + (omega - im) ** 2;
    [x, y] = [(-x * re + y * (omega - im)) / size, (-y * re - x * (omega - im)) / size];
  }
  return [x, y];
}

const CASES: [string, Pole[], Pole[], number][] = [
  [
    'pairs on both sides',
    [
      [-1, 3],
      [-1, -3],
    ],
    [
      [-0.1, 4],
      [-0.1, -4],
    ],
    1,
  ],
  [
    'a real pole left over on each side',
    [
      [-2, 0],
      [-1, 5],
      [-1, -5],
    ],
    [
      [1, 0],
      [-3, 0],
      [-7, 0],
    ],
    2.5,
  ],
  [
    'an integrator',
    [
      [-2, 0],
      [-3, 0],
    ],
    [
      [0, 0],
      [-4, 0],
    ],
    1,
  ],
  [
    'fewer closed-loop poles',
    [[-2, 0]],
    [
      [-1, 2],
      [-1, -2],
      [-6, 0],
    ],
    -0.5,
  ],
  [
    'more closed-loop poles',
    [
      [-2, 0],
      [-1, 1],
      [-1, -1],
      [-5, 0],
    ],
    [[-3, 0]],
    0.01,
  ],
  ['none at all', [], [], 1.75],
];

describe('return difference', () => {
  const loop = new ReturnDifference(24);

  it.each(CASES)('equals the product of its factors with %s', (_, closed, open, lead) => {
    load(loop, closed, open, lead);
    for (const omega of [1e-3, 0.7, 3, 4, 5, 100]) {
      loop.evaluate(omega);
      const [x, y] = direct(closed, open, lead, omega);
      const size = Math.hypot(x, y);
      expect(Math.abs(loop.re - x)).toBeLessThan(1e-14 * size);
      expect(Math.abs(loop.im - y)).toBeLessThan(1e-14 * size);
    }
  });

  it.each(CASES)('has the slope of its logarithm with %s', (_, closed, open, lead) => {
    load(loop, closed, open, lead);
    for (const omega of [0.7, 3.1, 4.2, 20]) {
      const step = 1e-5;
      const [a, b] = direct(closed, open, lead, omega + step);
      const [c, d] = direct(closed, open, lead, omega - step);
      const difference = (Math.log(a * a + b * b) - Math.log(c * c + d * d)) / (2 * step);
      expect(loop.logSlope(omega)).toBeCloseTo(difference, 6);
    }
  });

  it('knows its value at infinity from the degrees', () => {
    load(loop, [[-1, 0]], [[-2, 0]], 1.5);
    expect(loop.atInfinity).toBe(1.5);
    load(loop, [], [[-2, 0]], 1.5);
    expect(loop.atInfinity).toBe(0);
    load(loop, [[-1, 0]], [], 1.5);
    expect(loop.atInfinity).toBe(Infinity);
  });

  it('keeps its digits beside a pole of damping ratio 1e−9', () => {
    load(
      loop,
      [
        [-1e-9, 1],
        [-1e-9, -1],
      ],
      [
        [-2e-9, 1],
        [-2e-9, -1],
      ],
      1,
    );
    loop.evaluate(1);
    expect(Math.hypot(loop.re, loop.im)).toBeCloseTo(0.5, 9);
  });

  it('does not overflow with 24 poles of 1e15 rad/s, nor with real against complex ones', () => {
    const pairs = Array.from({ length: 24 }, (_, k): Pole => [-1e15, k % 2 === 0 ? 1e15 : -1e15]);
    const reals = Array.from({ length: 24 }, (): Pole => [-Math.SQRT2 * 1e15, 0]);
    load(loop, pairs, reals, 1);
    loop.evaluate(1e3);
    expect(Math.hypot(loop.re, loop.im)).toBeCloseTo(1, 12);
    loop.evaluate(1e20);
    expect(Math.hypot(loop.re, loop.im)).toBeCloseTo(1, 4);
  });

  it('refuses more poles than it has room for', () => {
    const many = Array.from({ length: 25 }, (): Pole => [-1, 0]);
    expect(() => load(loop, many, [], 1)).toThrow(RangeError);
  });
});
