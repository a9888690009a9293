import { describe, expect, it } from 'vitest';
import { companionMachine, companionPlant, staticGain } from './support/companion-machine';
import { runStudy } from './support/run-study';
import { expectLargest, expectSmallest } from './support/two-sided';

// Ranges of one loop gain K from textbooks; each also follows from the Routh test.
const limits: [string, (number | string)[], number, number, number][] = [
  // s (s² + s + 1)(s + 2) + K: K < 14/9. Ogata, Modern Control Engineering (seen).
  ['s(s² + s + 1)(s + 2) + K below 14/9', [1, 3, 3, 2, 'K'], 1, 14 / 9, Math.sqrt(2 / 3)],
  // s³ + 18 s² + 77 s + K: K < 1386. Nise, Control Systems Engineering, example 6.9 (seen).
  ['s³ + 18s² + 77s + K below 1386', [1, 18, 77, 'K'], 700, 1386, Math.sqrt(77)],
];

describe('the range of a gain', () => {
  it.each(limits)('%s, found as the largest payload', (_, polynomial, nominal, limit, frequency) => {
    const { largestPayload } = runStudy({
      machine: companionMachine(polynomial),
      parameters: [{ id: 'K', nominal }],
      payload: 'K',
      searchUpTo: 5 * limit,
    });
    expectLargest(largestPayload, limit, nominal);
    expect(largestPayload?.frequency).toBeCloseTo(frequency, 2);
  });

  it.each(limits)('%s, found as a band stretch', (_, polynomial, nominal, limit) => {
    const { bandStretch } = runStudy({
      machine: companionMachine(polynomial),
      parameters: [{ id: 'K', nominal, low: 0.9 * nominal, high: 1.1 * nominal, minimum: 0.01 * nominal }],
    });
    expectLargest(bandStretch, (limit - nominal) / (1.1 * nominal - nominal));
  });

  it('s(s² + s + 1)(s + 2) + K below 14/9, found as a gain margin', () => {
    // Ogata (seen): with K = 1 the gain margin is the limit itself.
    const { nominal } = runStudy({
      machine: companionPlant([1], [1, 3, 3, 2, 0]),
      control: staticGain(1),
      parameters: [],
    });
    expect(nominal.gainMargin?.up).toBeCloseTo(14 / 9, 6);
    // Derived: downwards only factor 0 puts a pole on the axis.
    expect(nominal.gainMargin?.down).toBeNull();
  });

  it('s(s − 1)(s + 6) + K(s + 1) above 7.5, found as the smallest payload', () => {
    // Franklin, Powell & Emami-Naeini (memory); derived: 5(K − 6) > K. At the limit s² = −(K − 6) = −1.5.
    const { smallestPayload, largestPayload } = runStudy({
      machine: companionMachine([1, 5, 'K - 6', 'K']),
      parameters: [{ id: 'K', nominal: 10 }],
      payload: 'K',
      searchUpTo: 1000,
    });
    expectSmallest(smallestPayload, 7.5, 10);
    expect(smallestPayload?.frequency).toBeCloseTo(Math.sqrt(1.5), 2);
    expect(largestPayload).toMatchObject({ provedTo: 1000, failsAt: null });
  });

  it('s(s − 1)(s + 6) + K(s + 1) above 7.5, found as a gain margin downwards', () => {
    const { nominal } = runStudy({
      machine: companionPlant([1, 1], [1, 5, -6, 0]),
      control: staticGain(10),
      parameters: [],
    });
    expect(nominal.stable).toBe(true);
    expect(nominal.gainMargin?.down).toBeCloseTo(0.75, 6);
    expect(nominal.gainMargin?.up).toBeNull();
  });
});
