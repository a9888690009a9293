import { describe, expect, it } from 'vitest';
import { requirementLevelFault, type LevelMeasure } from './requirement';

describe('requirementLevelFault', () => {
  it.each<[LevelMeasure, number[], number[]]>([
    ['decayRate', [0, 0.2, 1e6], [-1e-300, NaN, Infinity]],
    ['dampingRatio', [0, 0.999], [1, -0.1, NaN]],
    ['gainMargin', [1, 2], [0.999, 0, Infinity]],
    ['phaseMargin', [1e-9, 3.14], [0, -1, Math.PI, 45, 720, NaN]],
    ['modulusMargin', [1e-9, 1], [0, 1.001, NaN]],
  ])('%s', (measure, usable, unusable) => {
    for (const value of usable) expect(requirementLevelFault(measure, value)).toBeUndefined();
    for (const value of unusable) expect(requirementLevelFault(measure, value)).toMatch(/must/);
  });

  it('says what degrees are in radians', () => {
    expect(requirementLevelFault('phaseMargin', 30)).toMatch(/30 degrees are 0\.5236/);
    expect(requirementLevelFault('phaseMargin', 400)).toMatch(/45 degrees are 0\.7854/);
  });
});
