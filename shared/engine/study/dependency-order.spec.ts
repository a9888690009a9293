import { describe, expect, it } from 'vitest';
import { dependencyOrder } from './dependency-order';

const orderOf = (graph: Record<string, string[]>) =>
  dependencyOrder(Object.keys(graph), (name) => graph[name]);

describe('dependencyOrder', () => {
  it('puts every name behind those it depends on', () => {
    expect(orderOf({ a: ['c', 'b'], b: ['d'], c: ['b'], d: [] })).toEqual({
      order: ['d', 'b', 'c', 'a'],
      cycles: [],
    });
  });

  it('finds cycles, also of one name, and goes on', () => {
    const { order, cycles } = orderOf({ a: ['b'], b: ['c'], c: ['b'], d: ['d'], e: [] });
    expect(cycles).toEqual([['b', 'c'], ['d']]);
    expect([...order].sort()).toEqual(['a', 'b', 'c', 'd', 'e']);
  });
});
