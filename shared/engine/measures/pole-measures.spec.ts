import { describe, expect, it } from 'vitest';
import { dampingRatio } from './damping-ratio';
import { decayRate } from './decay-rate';

describe('decay rate', () => {
  it('is the distance of the rightmost pole from the axis', () => {
    expect(decayRate(Float64Array.of(-3, -0.5, -2), 3)).toBe(0.5);
    expect(decayRate(Float64Array.of(-3, 0.25), 2)).toBe(-0.25);
    expect(decayRate(Float64Array.of(-3, 0.25), 1)).toBe(3);
    expect(decayRate(new Float64Array(0), 0)).toBe(Infinity);
  });
});

describe('damping ratio', () => {
  it.each([
    // ζ and logarithmic decrement 2πζ/√(1−ζ²); overshoot and decrement are closed forms of ζ.
    [0.05, 0.3146],
    [0.1, 0.6315],
    [0.2, 1.2825],
    [0.3, 1.976],
    [0.4, 2.7422],
    [0.5, 3.6276],
    [0.6, 4.7124],
    [0.7, 6.1588],
    [0.8, 8.3776],
  ])('%d goes with a logarithmic decrement of %d', (ratio, decrement) => {
    const re = Float64Array.of(-decrement, -decrement);
    const im = Float64Array.of(2 * Math.PI, -2 * Math.PI);
    expect(dampingRatio(re, im, 2)).toBeCloseTo(ratio, 4);
  });

  it.each([
    [0.05, 85.45],
    [0.1, 72.92],
    [0.2, 52.66],
    [0.3, 37.23],
    [0.4, 25.38],
    [0.5, 16.3],
    [0.6, 9.48],
    [0.7, 4.6],
    [0.8, 1.52],
  ])('%d goes with an overshoot of %d %%', (ratio, overshoot) => {
    const ratioFromPoles = dampingRatio(
      Float64Array.of(Math.log(overshoot / 100), -400),
      Float64Array.of(Math.PI, 0),
      2,
    );
    expect(ratioFromPoles).toBeCloseTo(ratio, 3);
  });

  it('is 1 for real stable poles, −1 for real unstable ones, 0 at the origin and on the axis', () => {
    expect(dampingRatio(Float64Array.of(-2, -1e-9), Float64Array.of(0, 0), 2)).toBe(1);
    expect(dampingRatio(Float64Array.of(2), Float64Array.of(0), 1)).toBe(-1);
    expect(dampingRatio(Float64Array.of(-2, 0), Float64Array.of(0, 0), 2)).toBe(0);
    expect(dampingRatio(Float64Array.of(0, 0), Float64Array.of(3, -3), 2)).toBeCloseTo(0, 15);
    expect(dampingRatio(new Float64Array(0), new Float64Array(0), 0)).toBe(1);
  });

  it('does not overflow', () => {
    expect(dampingRatio(Float64Array.of(-3e200), Float64Array.of(4e200), 1)).toBeCloseTo(0.6, 15);
    expect(dampingRatio(Float64Array.of(-3e-200), Float64Array.of(4e-200), 1)).toBeCloseTo(0.6, 15);
  });
});
