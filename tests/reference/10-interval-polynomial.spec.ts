import { describe, expect, it } from 'vitest';
import { companionMachine } from './support/companion-machine';
import { runStudy } from './support/run-study';
import { expectLargest, expectWitness } from './support/two-sided';

// s³ + [2,3] s² + [0.5,1] s + [1,2]. Kharitonov 1978; the numbers seen in a control textbook whose printed list of the
// failing members is wrong, so that the verdict is tested, and each of the four polynomials as derived.
const machine = companionMachine([1, 'a2', 'a1', 'a0']);
const parameters = [
  { id: 'a2', nominal: 2.5, low: 2, high: 3 },
  { id: 'a1', nominal: 0.75, low: 0.5, high: 1 },
  { id: 'a0', nominal: 1.5, low: 1, high: 2 },
];

describe('an interval polynomial', () => {
  const { bands, bandStretch } = runStudy({ machine, parameters });

  it('is not robustly stable', () => {
    expect(bands).toMatchObject({ verdict: 'fails', proof: 'proved', requirement: 'stability' });
    const { a2, a1, a0 } = bands.witness as { a2: number; a1: number; a0: number };
    expect(a2 * a1).toBeLessThan(a0);
  });

  // Derived: stable if and only if a2·a1 > a0.
  it.each([
    [3, 0.5, 1, true],
    [3, 1, 1, true],
    [2, 1, 2, false],
    [2, 0.5, 2, false],
  ])('s³ + %d s² + %d s + %d is stable: %s', (a2, a1, a0, stable) => {
    const { nominal } = runStudy({
      machine,
      parameters: [
        { id: 'a2', nominal: a2 },
        { id: 'a1', nominal: a1 },
        { id: 'a0', nominal: a0 },
      ],
    });
    expect(nominal.stable).toBe(stable);
  });

  it('has s³ + 2s² + s + 2 on the border, with poles at ±j', () => {
    // Derived: (s + 2)(s² + 1).
    const { nominal, bands: verdict } = runStudy({
      machine,
      parameters: [
        { id: 'a2', nominal: 2 },
        { id: 'a1', nominal: 1 },
        { id: 'a0', nominal: 2 },
      ],
    });
    expect(nominal.decayRate).toBeCloseTo(0, 12);
    expect(nominal.poles[0].im).toBeCloseTo(1, 12);
    expect(verdict.verdict).not.toBe('holds');
  });

  it('has the derived band stretch', () => {
    // Derived: (2.5 − 0.5κ)(0.75 − 0.25κ) = 1.5 + 0.5κ, so κ = 6 − √33.
    const factor = 6 - Math.sqrt(33);
    expectLargest(bandStretch, factor);
    expectWitness(bandStretch, { a2: 2.5 - 0.5 * factor, a1: 0.75 - 0.25 * factor, a0: 1.5 + 0.5 * factor });
  });
});
