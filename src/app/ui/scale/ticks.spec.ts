import { describe, expect, it } from 'vitest';
import { scaleFromZero } from './ticks';

describe('scaleFromZero', () => {
  it('covers the largest value in round steps', () => {
    expect(scaleFromZero(888, 5)).toEqual({ end: 1000, step: 200, ticks: [0, 200, 400, 600, 800, 1000] });
    expect(scaleFromZero(3.57, 5).ticks).toEqual([0, 1, 2, 3, 4]);
  });

  it('ends on a value that is a round step itself', () => {
    expect(scaleFromZero(1000, 5).end).toBe(1000);
    expect(scaleFromZero(0.3, 6).ticks).toEqual([0, 0.05, 0.1, 0.15, 0.2, 0.25, 0.3]);
  });

  it('has a scale where there is nothing to show', () => {
    expect(scaleFromZero(0, 5)).toMatchObject({ end: 1 });
    expect(scaleFromZero(Number.NaN, 5)).toMatchObject({ end: 1 });
  });
});
