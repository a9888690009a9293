import { describe, expect, it } from 'vitest';
import { finestUntil, gridLadder } from './finest-grid';

const nodesOf = ({ columns, rows }: { columns: number; rows: number }) => columns * rows;

describe('gridLadder', () => {
  it('ends at the wanted grid and begins at a coarse one, each about four times as fine', () => {
    expect(gridLadder({ columns: 201, rows: 101 })).toEqual([
      { columns: 5, rows: 5 },
      { columns: 8, rows: 5 },
      { columns: 14, rows: 8 },
      { columns: 26, rows: 14 },
      { columns: 51, rows: 26 },
      { columns: 101, rows: 51 },
      { columns: 201, rows: 101 },
    ]);
  });

  it('is the wanted grid alone where that is coarse', () => {
    expect(gridLadder({ columns: 2, rows: 5 })).toEqual([{ columns: 2, rows: 5 }]);
  });
});

describe('finestUntil', () => {
  /** Computes grids on a clock that moves by one for every so many nodes. */
  const compute = (until: number, perNode: number) => {
    let now = 0;
    const computed: number[] = [];
    const answer = finestUntil(
      { columns: 201, rows: 201 },
      until,
      () => now,
      (grid) => {
        now += nodesOf(grid) * perNode;
        computed.push(grid.columns);
        return grid.columns;
      },
    );
    return { answer, computed, now };
  };

  it('answers by the finest grid that is done in time', () => {
    const { answer, now } = compute(150, 0.1);
    expect(answer).toBe(26);
    expect(now).toBeLessThanOrEqual(150);
    expect(compute(1e6, 0.1).answer).toBe(201);
  });

  it('answers by the coarsest grid whatever that takes', () => {
    expect(compute(150, 1000).computed).toEqual([5]);
    expect(compute(-1, 0.1).computed).toEqual([5]);
  });
});
