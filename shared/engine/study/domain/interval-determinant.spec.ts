import { describe, expect, it } from 'vitest';
import { intervalDeterminant } from './interval-determinant';

const points = (rows: number[][]) => rows.map((row) => row.map((value) => ({ low: value, high: value })));

describe('intervalDeterminant', () => {
  it.each<[number[][], number]>([
    [[[3]], 3],
    [
      [
        [1, 2],
        [3, 4],
      ],
      -2,
    ],
    [
      [
        [0, 0, 2],
        [0, 3, 0],
        [5, 0, 0],
      ],
      -30,
    ],
    [
      [
        [2, 1, 0, 3],
        [1, 0, 2, 1],
        [0, 4, 1, 1],
        [3, 1, 1, 2],
      ],
      37,
    ],
    [
      [
        [1, 1],
        [0, 0],
      ],
      0,
    ],
  ])('of %j is %d', (rows, determinant) => {
    const { low, high } = intervalDeterminant(points(rows));
    expect([low + 0, high + 0]).toEqual([determinant, determinant]);
  });

  it('encloses what a range of entries gives', () => {
    const { low, high } = intervalDeterminant([
      [
        { low: 1, high: 2 },
        { low: -1, high: 1 },
      ],
      [
        { low: 0, high: 1 },
        { low: 3, high: 4 },
      ],
    ]);
    expect([low, high]).toEqual([2, 9]);
  });

  it('knows nothing of a very large matrix', () => {
    const rows = Array.from({ length: 13 }, (_, i) =>
      Array.from({ length: 13 }, (_, j) => (i === j ? 1 : 0)),
    );
    expect(intervalDeterminant(points(rows))).toEqual({ low: -Infinity, high: Infinity });
  });
});
