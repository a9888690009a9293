import { describe, expect, it } from 'vitest';
import type { ParameterFacts } from '../store/parameter-facts';
import { axisRange, stillShows } from './axis-range';

const facts = (numbers: Partial<ParameterFacts>): ParameterFacts => ({
  id: 'k',
  label: 'Belt stiffness',
  symbol: 'k',
  unit: 'kN/m',
  nominal: 150,
  low: undefined,
  high: undefined,
  minimum: undefined,
  maximum: undefined,
  hasBand: true,
  isPayload: false,
  ...numbers,
});

describe('axisRange', () => {
  it('shows the band and half of it on each side, to round ends', () => {
    expect(axisRange(facts({ low: 120, high: 185 }))).toEqual({ low: 80, high: 220 });
  });

  it('goes beyond a nominal value without a band by half of it', () => {
    expect(axisRange(facts({}))).toEqual({ low: 60, high: 240 });
  });

  it('stays within the physical ends', () => {
    expect(axisRange(facts({ low: 20, high: 500, minimum: 0, maximum: 550 }))).toEqual({ low: 0, high: 550 });
  });

  it('also shows where it fails, unless that is far away', () => {
    expect(axisRange(facts({ low: 40, high: 480, minimum: 0 }), 790)?.high).toBe(1200);
    expect(axisRange(facts({ low: 40, high: 480, minimum: 0 }), 7900)?.high).toBe(800);
  });

  it('has none where a number is not plain, or nothing can vary', () => {
    expect(axisRange(facts({ nominal: undefined }))).toBeUndefined();
    expect(axisRange(facts({ minimum: 150, maximum: 150 }))).toBeUndefined();
  });
});

describe('stillShows', () => {
  it('holds until the band goes beyond, or is too small to take hold of', () => {
    const range = { low: 80, high: 220 };
    expect(stillShows(range, facts({ low: 90, high: 200 }))).toBe(true);
    expect(stillShows(range, facts({ low: 70, high: 200 }))).toBe(false);
    expect(stillShows(range, facts({ low: 149.9, high: 150.1 }))).toBe(false);
    expect(stillShows(range, facts({}))).toBe(true);
  });
});
