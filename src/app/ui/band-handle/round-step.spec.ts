import { describe, expect, it } from 'vitest';
import { clamped, roundStep, toStep } from './round-step';

describe('roundStep', () => {
  it('is the next lower step that people count in', () => {
    expect(roundStep(9)).toBe(5);
    expect(roundStep(4.2)).toBe(2);
    expect(roundStep(1)).toBe(1);
    expect(roundStep(0.0031)).toBe(0.002);
    expect(roundStep(900)).toBe(500);
  });

  it('keeps a round number that the logarithm reads a little low', () => {
    expect(roundStep(1000)).toBe(1000);
    expect(roundStep(0.2)).toBe(0.2);
  });

  it('is 0 where there is no range', () => {
    expect([0, -3, Number.NaN, Infinity].map(roundStep)).toEqual([0, 0, 0, 0]);
  });
});

describe('toStep', () => {
  it('leaves no digits of the division behind', () => {
    expect(toStep(0.30000000000000004, 0.1)).toBe(0.3);
    expect(toStep(571.26, 0.5)).toBe(571.5);
    expect(toStep(571.26, 0)).toBe(571.26);
  });
});

describe('clamped', () => {
  it('holds to the ends', () => {
    expect([-1, 5, 11].map((value) => clamped(value, 0, 10))).toEqual([0, 5, 10]);
  });
});
