import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { BoxHeap, type OpenBox } from './box-heap';

function box(objective: number, order: number): OpenBox {
  const empty = new Float64Array(0);
  return { data: empty, low: empty, high: empty, objective, order, fresh: true };
}

describe('heap of open boxes', () => {
  it('gives the smallest objective first, among equals the newest', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 5 })), (objectives) => {
        const heap = new BoxHeap();
        objectives.forEach((objective, order) => heap.push(box(objective, order)));
        const popped: OpenBox[] = [];
        for (let next = heap.pop(); next !== undefined; next = heap.pop()) popped.push(next);
        const sorted = [...popped].sort((a, b) => a.objective - b.objective || b.order - a.order);
        expect(popped).toEqual(sorted);
        expect(popped).toHaveLength(objectives.length);
        expect(heap.size).toBe(0);
      }),
    );
  });
});
