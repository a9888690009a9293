import type { Measure } from '../../../../shared/contracts';
import type { RunState, RunSummary } from '../../../../shared/contracts/api';

/** Measures as the page says them. */
const MEASURE_WORDS: Record<Measure, string> = {
  stability: 'stability',
  decayRate: 'decay rate',
  dampingRatio: 'damping ratio',
  gainMargin: 'gain margin',
  phaseMargin: 'phase margin',
  modulusMargin: 'modulus margin',
};

export function measureWords(measure: string): string {
  return Object.hasOwn(MEASURE_WORDS, measure)
    ? MEASURE_WORDS[measure as keyof typeof MEASURE_WORDS]
    : measure;
}

export const RUN_STATE_WORDS: Record<RunState, string> = {
  queued: 'Waiting to run',
  running: 'Running',
  done: 'Done',
  failed: 'Run failed',
  cancelled: 'Run cancelled',
};

export interface VerdictFacts {
  readonly verdict: 'holds' | 'fails' | 'undecided';
  readonly proof: 'proved' | 'sampled' | null;
  readonly approximated: boolean;
}

/** The verdict on the bands in a few words. A delay in its Padé form is never "proved" without saying so. */
export function verdictWords({ verdict, proof, approximated }: VerdictFacts): string {
  switch (verdict) {
    case 'fails':
      return 'Fails inside the bands';
    case 'undecided':
      return 'Undecided';
    case 'holds':
      if (proof === 'sampled') return 'Holds at every sample';
      return approximated ? 'Holds, for the approximated delay' : 'Holds, proved';
  }
}

/** The verdict of a run that has one. */
export function verdictOf(run: RunSummary | null): VerdictFacts | undefined {
  if (run === null || run.verdict === null) return undefined;
  return { verdict: run.verdict, proof: run.proof, approximated: run.approximated };
}

/** "Proved", "sampled" or "proved for the approximated delay". */
export function proofWords(proof: 'proved' | 'sampled' | null | undefined, approximated: boolean): string {
  if (proof === 'sampled') return 'sampled, not proved';
  return approximated ? 'proved for the approximated delay' : 'proved';
}
