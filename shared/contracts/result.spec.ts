import { describe, expect, it } from 'vitest';
import { resultSchema, type Result } from './result';

const result: Result = {
  format: 'tareline-result',
  version: 1,
  engine: '1',
  studyHash: 'sha256:00',
  nominal: {
    stable: true,
    poles: [{ re: -1.2, im: 3.4 }],
    decayRate: 1.2,
    dampingRatio: 0.33,
    gainMargin: { up: null, down: 0.32 },
    phaseMargin: 0.81,
    delayMargin: null,
    modulusMargin: 0.715,
  },
  bands: { verdict: 'holds', proof: 'proved' },
  largestPayload: {
    provedTo: 571.2,
    failsAt: 572.3,
    searchedUpTo: 2400,
    proof: 'proved',
    requirement: 'stability',
    witness: { m: 572.3 },
    frequency: null,
    reason: 'a pole leaves through infinity',
  },
  smallestPayload: {
    provedTo: 0.999999,
    failsAt: null,
    searchedDownTo: 0,
    proof: 'sampled',
    undecided: true,
    openShare: 0.01,
  },
  bandStretch: null,
  work: { boxes: 505, milliseconds: 31 },
};

describe('resultSchema', () => {
  it('keeps a result as it is', () => {
    expect(resultSchema.parse(result)).toEqual(result);
  });

  it('refuses what no result may hold', () => {
    expect(resultSchema.safeParse({ ...result, bands: { verdict: 'good', proof: 'proved' } }).success).toBe(
      false,
    );
    expect(resultSchema.safeParse({ ...result, work: { boxes: Infinity, milliseconds: 1 } }).success).toBe(
      false,
    );
    expect(resultSchema.safeParse({ ...result, largestPayload: undefined }).success).toBe(false);
  });
});
