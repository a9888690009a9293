import type { Result, Study } from '../../../../../../shared/contracts';

/** A study for specs, with this low end of its stiffness. */
export function exampleStudy({ low }: { low: number }): Study {
  return {
    format: 'tareline-study',
    version: 1,
    machine: { template: 'mass-spring-damper' },
    parameters: [
      { id: 'm', unit: 'kg', nominal: 300, low: 40, high: 480 },
      { id: 'k', unit: 'kN/m', nominal: 150, low, high: 185 },
    ],
    payload: 'm',
    requirements: [{ measure: 'stability' }],
  };
}

/** A result for specs; its figures are invented. */
export function exampleResult({ provedTo, stretch }: { provedTo: number; stretch: number }): Result {
  return {
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
    largestPayload: { provedTo, failsAt: provedTo + 1, searchedUpTo: 2400, proof: 'proved' },
    smallestPayload: { provedTo: 0, failsAt: null, searchedDownTo: 0, proof: 'proved' },
    bandStretch: { provedTo: stretch, failsAt: null, searchedUpTo: 10, proof: 'proved' },
    work: { boxes: 1, milliseconds: 1 },
  };
}
