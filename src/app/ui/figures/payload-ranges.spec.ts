import { describe, expect, it } from 'vitest';
import { layOutRanges } from './payload-ranges';

describe('layOutRanges', () => {
  it('puts the load mark at the end of the proved range and hatches beyond it', () => {
    const layout = layOutRanges(
      { rated: { low: 40, high: 480 }, proved: { low: 0, high: 570 }, failsAbove: 571 },
      1000,
    );
    expect(layout.rated).toEqual({ from: 0.04, to: 0.48 });
    expect(layout.proved).toEqual({ from: 0, to: 0.57 });
    expect(layout.ratedAndProved).toEqual({ from: 0.04, to: 0.48 });
    expect(layout.above).toEqual({ from: 0.57, to: 1, fails: true });
    expect(layout.below).toBeUndefined();
    expect(layout.marks).toEqual([0.57]);
  });

  it('marks both ends where the light end fails too', () => {
    const layout = layOutRanges(
      { rated: { low: 40, high: 480 }, proved: { low: 85, high: 497 }, failsBelow: 84, failsAbove: 498 },
      1000,
    );
    expect(layout.ratedAndProved).toEqual({ from: 0.085, to: 0.48 });
    expect(layout.below).toEqual({ from: 0, to: 0.085, fails: true });
    expect(layout.marks).toEqual([0.085, 0.497]);
  });

  it('does not claim a failure where none was found', () => {
    const layout = layOutRanges({ rated: { low: 0, high: 300 }, proved: { low: 0, high: 400 } }, 500);
    expect(layout.above).toEqual({ from: 0.8, to: 1, fails: false });
    expect(layout.marks).toEqual([]);
  });

  it('leaves everything open where nothing is proved', () => {
    const layout = layOutRanges({ rated: { low: 0, high: 300 }, failsAbove: 150 }, 500);
    expect(layout.proved).toBeUndefined();
    expect(layout.above).toEqual({ from: 0, to: 1, fails: true });
    expect(layout.marks).toEqual([0.3]);
  });

  it('cuts what lies beyond the scale, marks included', () => {
    const layout = layOutRanges({ proved: { low: 0, high: 2400 }, failsAbove: 2401 }, 1000);
    expect(layout.proved).toEqual({ from: 0, to: 1 });
    expect(layout.above).toBeUndefined();
    expect(layout.marks).toEqual([]);
  });
});
