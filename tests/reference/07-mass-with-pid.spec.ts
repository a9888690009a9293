import { describe, expect, it } from 'vitest';
import { runStudy } from './support/run-study';
import { expectLargest, expectWitness } from './support/two-sided';

// A mass on a spring and damper under an ideal PID law: m s³ + (c + Kd) s² + (k + Kp) s + Ki is stable if and only if
// m < (c + Kd)(k + Kp)/Ki (derived; Routh 1877).
const control = { law: 'pid', input: 'u', output: 'q', kp: 400, ki: 2000, kd: 40 };
const run = (damper: object, spring: object, mass: object = {}) =>
  runStudy({
    machine: { template: 'mass-spring-damper' },
    parameters: [
      { id: 'm', nominal: 5, minimum: 0, ...mass },
      { id: 'm0', nominal: 0 },
      { id: 'k', nominal: 100, ...spring },
      { id: 'c', nominal: 2, ...damper },
    ],
    control,
    payload: 'm',
    searchUpTo: 50,
  });

describe('a mass with a PID law', () => {
  it('carries up to 10.5 kg', () => {
    // Derived.
    const { largestPayload, smallestPayload, nominal } = run({}, {});
    expect(nominal.poles).toHaveLength(3);
    expectLargest(largestPayload, 10.5, 5);
    expect(largestPayload?.failsAt).toBeCloseTo(10.5, 3);
    expect(largestPayload?.frequency).toBeCloseTo(Math.sqrt(500 / 10.5), 3);
    // The mass matrix is singular at 0: the search down ends at a thousandth of the nominal mass.
    expect(smallestPayload).toMatchObject({ provedTo: 0.005, failsAt: null, searchedDownTo: 0.005 });
  });

  it('with bands on damper and spring is limited at their low ends', () => {
    // Derived: (1.5 + 40)(80 + 400)/2000 = 9.96 kg.
    const { largestPayload } = run({ low: 1.5, high: 2.5 }, { low: 80, high: 120 });
    expectLargest(largestPayload, 9.96, 5);
    expectWitness(largestPayload, { m: 9.96, k: 80, c: 1.5 }, 1e-4);
    expect(largestPayload?.frequency).toBeCloseTo(Math.sqrt(480 / 9.96), 3);
  });

  it('stretches its bands to the derived factor', () => {
    // Derived: 2000 (5 + 5κ) = (42 − 0.5κ)(500 − 20κ), the smaller root.
    const { bandStretch, bands } = run({ low: 1.5, high: 2.5 }, { low: 80, high: 120 }, { low: 1, high: 10 });
    const factor = (11090 - Math.sqrt(11090 * 11090 - 4 * 10 * 11000)) / 20;
    expectLargest(bandStretch, factor);
    expectWitness(bandStretch, { m: 5 + 5 * factor, k: 100 - 20 * factor, c: 2 - 0.5 * factor });
    expect(bands.verdict).toBe('fails');
  });

  it('fails at once where the bands reach below the nominal limit', () => {
    // Derived: the limit is below the nominal 5 kg wherever (c + 40)(k + 400) < 10000, such as at c = −18, k = 40.
    const { largestPayload } = run({ low: -18, high: 2 }, { low: 40, high: 120 });
    expect(largestPayload).toMatchObject({ provedTo: null, failsAt: 5, requirement: 'stability' });
  });
});
