import { describe, expect, it } from 'vitest';
import type { Result, Study } from '../../../../../shared/contracts';
import { answersOf } from './answers-of';

const study: Study = {
  format: 'tareline-study',
  version: 1,
  machine: { template: 'mass-spring-damper' },
  parameters: [
    { id: 'm', label: 'Payload', unit: 'kg', nominal: 300, low: 40, high: 480 },
    { id: 'k', label: 'Belt stiffness', unit: 'kN/m', nominal: 150, low: 120, high: 185 },
  ],
  payload: 'm',
  rating: { payload: 480, step: 25, tests: [{ name: 'static', factor: 1.25 }] },
  requirements: [{ measure: 'stability' }],
};

const result: Result = {
  format: 'tareline-result',
  version: 1,
  engine: '1',
  studyHash: 'sha256:0',
  nominal: {
    stable: true,
    poles: [],
    decayRate: 1,
    dampingRatio: 0.3,
    gainMargin: null,
    phaseMargin: null,
    delayMargin: null,
    modulusMargin: null,
  },
  bands: { verdict: 'holds', proof: 'proved' },
  largestPayload: {
    provedTo: 571.26,
    failsAt: 572.31,
    searchedUpTo: 2400,
    proof: 'proved',
    requirement: 'dampingRatio',
    witness: { m: 572.31, k: 120 },
    frequency: 15.9,
  },
  smallestPayload: { provedTo: 0, failsAt: null, searchedDownTo: 0, proof: 'proved' },
  bandStretch: { provedTo: 1.3819, failsAt: 1.3833, searchedUpTo: 10, proof: 'proved' },
  rating: { allowed: 456.9, plate: 450, limitedBy: 'static' },
  work: { boxes: 505, milliseconds: 31 },
};
const rated = { ratedLow: 40, ratedHigh: 480 };

function change(part: Partial<Result>): string {
  return answersOf({ ...result, ...part }, study, rated).sentence;
}

describe('answersOf', () => {
  it('says proved and failing payload, rounded apart', () => {
    const answers = answersOf(result, study, rated);
    expect(answers.sentence).toBe('Proved to 571.2\u2009kg; fails at 572.4\u2009kg.');
    expect(answers.figures).toContainEqual({ label: 'Reserve', text: '+91.2\u2009kg' });
    expect(answers.figures).toContainEqual({
      label: 'Plate, with the static test ×\u00a01.25',
      text: '450\u2009kg',
    });
    expect(answers.facts).toContainEqual({ label: 'Bands may grow together', text: '×\u00a01.38' });
    expect(answers.facts).toContainEqual({
      label: 'Critical frequency',
      text: '2.53\u2009Hz, 15.9\u2009rad/s',
    });
    expect(answers.failingPoint).toEqual([
      { label: 'Payload', text: '572.4\u2009kg, limit' },
      { label: 'Belt stiffness', text: '120\u2009kN/m, low' },
    ]);
    expect(answers.tests).toEqual([{ at: 562.5, label: '1.25' }]);
  });

  it('never says "proved" alone for an approximated delay or for samples', () => {
    const largest = result.largestPayload;
    if (largest === null) throw new Error('the fixture has a largest payload');
    expect(change({ delay: { approximated: true, phaseShortfall: 0.01 } })).toMatch(
      /^Proved for the approximated delay to 571\.2/,
    );
    expect(change({ largestPayload: { ...largest, proof: 'sampled' } })).toMatch(
      /^Sampled, not proved, to 571\.2/,
    );
  });

  it('says where the search ended and what stays open', () => {
    const open = { provedTo: 2400, failsAt: null, searchedUpTo: 2400, proof: 'proved' as const };
    expect(change({ largestPayload: open })).toBe(
      'Proved to 2400\u2009kg, where the search ends and nothing heavier is known to fail.',
    );
    const smallest = { provedTo: 52.38461, failsAt: 52.30461, searchedDownTo: 0, proof: 'proved' as const };
    expect(change({ largestPayload: open, smallestPayload: smallest })).toBe(
      'Proved from 52.39 to 2400\u2009kg, where the search ends and nothing heavier is known to fail; ' +
        'fails at 52.3\u2009kg.',
    );
    expect(change({ largestPayload: { ...open, provedTo: 600, undecided: true } })).toContain(
      'beyond it neither proved nor refuted',
    );
    expect(change({ largestPayload: { ...open, provedTo: null, failsAt: 300 } })).toContain(
      'fails at the nominal payload of 300\u2009kg',
    );
  });

  it('tells the light end where it fails', () => {
    const smallest = { provedTo: 52.38461, failsAt: 52.30461, searchedDownTo: 0, proof: 'proved' as const };
    const answers = answersOf({ ...result, smallestPayload: smallest }, study, rated);
    expect(answers.sentence).toBe('Proved from 52.39 to 571.2\u2009kg; fails at 52.3 and at 572.4\u2009kg.');
    expect(answers.ranges).toMatchObject({ failsBelow: 52.30461, failsAbove: 572.31 });
    expect(answers.figures).toContainEqual({ label: 'Reserve', text: '\u221212.4\u2009kg' });
  });
});
