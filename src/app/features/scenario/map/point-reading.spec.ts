import { describe, expect, it } from 'vitest';
import type { NominalAnswer } from '../../../../../shared/contracts';
import { readingFacts } from './point-reading';

const answer: NominalAnswer = {
  stable: true,
  poles: [],
  decayRate: 0.81234,
  dampingRatio: 0.2,
  gainMargin: { up: 3.456, down: null },
  phaseMargin: Math.PI / 4,
  delayMargin: 0.0123,
  modulusMargin: null,
};
const textOf = (reading: NominalAnswer, label: string) =>
  readingFacts(reading).find((fact) => fact.label === label)?.text;

describe('readingFacts', () => {
  it('reads every measure in the units that people use', () => {
    expect(textOf(answer, 'Decay rate')).toBe('0.812\u20091/s');
    expect(textOf(answer, 'Phase margin')).toBe('45°');
    expect(textOf(answer, 'Delay margin')).toBe('12.3\u2009ms');
    expect(textOf(answer, 'Gain margin')).toBe('×\u00a03.46');
    expect(textOf({ ...answer, gainMargin: { up: null, down: 0.2 } }, 'Gain margin')).toBe(
      'unlimited, down to ×\u00a00.2',
    );
  });

  it('says that a margin has no limit', () => {
    expect(textOf(answer, 'Modulus margin')).toBe('unlimited');
  });

  it('reads no margin of an unstable loop', () => {
    const unstable = readingFacts({ ...answer, stable: false, dampingRatio: -0.1 });
    expect(unstable.map(({ label }) => label)).toEqual(['Loop', 'Damping ratio', 'Decay rate']);
    expect(unstable[1].text).toBe('\u22120.1');
  });
});
