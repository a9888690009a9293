import { describe, expect, it } from 'vitest';
import { contourLines } from './contour-lines';
import type { MapGrid } from './map-grid';

function grid(values: (number | null)[][]): MapGrid {
  return { x: values[0].map((_, i) => i), y: values.map((_, i) => i), values };
}

function pieces(lines: number[]): number[][] {
  return Array.from({ length: lines.length / 4 }, (_, i) => lines.slice(4 * i, 4 * i + 4));
}

describe('contourLines', () => {
  it('crosses between the nodes, in proportion', () => {
    expect(
      pieces(
        contourLines(
          grid([
            [0, 4],
            [0, 4],
          ]),
          1,
        ),
      ),
    ).toEqual([[0.25, 0, 0.25, 1]]);
  });

  it('lies on the plane it is a section of', () => {
    const value = (x: number, y: number) => 0.3 * x - 0.7 * y + 2;
    const values = Array.from({ length: 9 }, (_, y) => Array.from({ length: 12 }, (_, x) => value(x, y)));
    const lines = contourLines(grid(values), 1.234);
    expect(lines.length).toBeGreaterThan(20);
    for (let i = 0; i < lines.length; i += 2) expect(value(lines[i], lines[i + 1])).toBeCloseTo(1.234, 12);
  });

  it('has no line beside a node without a value, and none along the border', () => {
    const values: (number | null)[][] = Array.from({ length: 5 }, () => [3, 3, 3, 3, 3]);
    values[2][2] = null;
    expect(contourLines(grid(values), 1)).toEqual([]);
  });

  it('ends where the unknown begins', () => {
    const lines = contourLines(
      grid([
        [0, 2, 2],
        [0, 2, 2],
        [null, 2, 2],
      ]),
      1,
    );
    expect(pieces(lines)).toEqual([[0.5, 0, 0.5, 1]]);
  });

  it('splits a saddle by its mean: the corners of the mean’s side stay joined', () => {
    const joinedHigh = pieces(
      contourLines(
        grid([
          [4, 0],
          [0, 4],
        ]),
        1,
      ),
    );
    // Each piece cuts off one of the low corners, (1, 0) and (0, 1).
    expect(joinedHigh).toEqual([
      [0.75, 0, 1, 0.25],
      [0.25, 1, 0, 0.75],
    ]);
    const joinedLow = pieces(
      contourLines(
        grid([
          [4, 0],
          [0, 4],
        ]),
        3,
      ),
    );
    expect(joinedLow).toEqual([
      [0, 0.25, 0.25, 0],
      [1, 0.75, 0.75, 1],
    ]);
  });

  it('makes closed rings around a summit', () => {
    const values = Array.from({ length: 11 }, (_, y) =>
      Array.from({ length: 11 }, (_, x) => 30 - (x - 5) ** 2 - (y - 5) ** 2),
    );
    const ends = new Map<string, number>();
    const lines = contourLines(grid(values), 20.5);
    for (let i = 0; i < lines.length; i += 2) {
      const key = `${lines[i].toFixed(9)} ${lines[i + 1].toFixed(9)}`;
      ends.set(key, (ends.get(key) ?? 0) + 1);
    }
    expect(ends.size).toBeGreaterThan(8);
    expect([...ends.values()].every((count) => count === 2)).toBe(true);
  });
});
