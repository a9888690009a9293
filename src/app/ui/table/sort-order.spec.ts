import { describe, expect, it } from 'vitest';
import { readSortOrder, sortRows, writeSortOrder } from './sort-order';

describe('sort order', () => {
  it('reads back what it writes', () => {
    const fallback = { column: 'name', falling: false };
    for (const order of [fallback, { column: 'reserve', falling: true }]) {
      expect(readSortOrder(writeSortOrder(order), fallback)).toEqual(order);
    }
    expect(readSortOrder(null, fallback)).toBe(fallback);
  });

  it('keeps rows without a value last in both directions', () => {
    const rows = [{ v: 2 }, { v: undefined }, { v: -45 }, { v: 91 }];
    expect(sortRows(rows, (row) => row.v, false).map((row) => row.v)).toEqual([-45, 2, 91, undefined]);
    expect(sortRows(rows, (row) => row.v, true).map((row) => row.v)).toEqual([91, 2, -45, undefined]);
  });

  it('counts numbers in names', () => {
    expect(sortRows(['LT-10', 'LT-2'], (name) => name, false)).toEqual(['LT-2', 'LT-10']);
  });
});
