import { describe, expect, it } from 'vitest';
import { FrequencyGrid } from './frequency-grid';
import { ReturnDifference } from './return-difference';

function gridOf(closed: [number, number][], open: [number, number][]): number[] {
  const loop = new ReturnDifference(12);
  const grid = new FrequencyGrid(12);
  const part = (poles: [number, number][], k: 0 | 1) => Float64Array.from(poles.map((p) => p[k]));
  loop.load(part(closed, 0), part(closed, 1), closed.length, part(open, 0), part(open, 1), open.length, 1);
  grid.build(loop);
  return [...grid.omega.slice(0, grid.count)];
}

describe('frequency grid', () => {
  const grid = gridOf(
    [
      [-1, 40],
      [-1, -40],
      [-0.02, 0],
    ],
    [
      [-1e-4, 3],
      [-1e-4, -3],
      [0, 0],
    ],
  );

  it('rises strictly, with bounded steps between the poles', () => {
    for (let k = 1; k < grid.length; k++) {
      expect(grid[k]).toBeGreaterThan(grid[k - 1]);
      expect(grid[k] / grid[k - 1]).toBeLessThan(1.7);
    }
  });

  it('holds each frequency, and the sides of each resonance to the width of its pole', () => {
    for (const omega of [0.02, 3, 3 + 5e-5, 3 - 1e-4, 3 + 4e-4, 40, 38, 44, Math.sqrt(1601)]) {
      const nearest = Math.min(...grid.map((x) => Math.abs(x / omega - 1)));
      expect(nearest).toBeLessThan(1e-9);
    }
  });

  it('reaches three decades beyond the poles on both sides', () => {
    expect(grid[0]).toBeLessThanOrEqual(0.01e-3 * 1.0001);
    expect(grid[grid.length - 1]).toBeGreaterThanOrEqual(40e3);
  });

  it('exists without poles, and with 24 poles spread over 30 decades', () => {
    expect(gridOf([], []).length).toBeGreaterThan(3);
    const spread = (shift: number) =>
      Array.from({ length: 12 }, (_, k): [number, number] => [-(10 ** (2.5 * k - 15 + shift)), 0]);
    const wide = gridOf(spread(0), spread(1));
    expect(wide.every((x, k) => k === 0 || x > wide[k - 1])).toBe(true);
    expect(wide[wide.length - 1] / wide[0]).toBeGreaterThan(1e30);
  });
});
